import type { Place } from '../../core/problem.js';
import { norm } from '../../core/vec.js';
import { bodyPoints, diagonal, drawnTrackPoints, pointsIn, trackPoints } from './extent.js';
import { buildTrack, TOUCHING, type TrackPath } from '../../geometry/index.js';
import type { DocumentDraft } from '../document.js';
import { collections, type Collection } from '../fields/ids.js';
import type { Reading } from '../fields/reading.js';
import type { Element } from '../fields/spec.js';
import type { JsonObject } from '../json/value.js';
import type { Mechanism, RunSettings } from '../model.js';
import { resolveBody, type PlacedBody } from './body.js';
import { resolveContacts } from './contacts.js';
import { resolveDamper } from './damper.js';
import { resolveDrive } from './drive.js';
import { resolveJoint } from './joint.js';
import { resolveLoad } from './load.js';
import { resolveSpring } from './spring.js';
import { resolveStation } from './station.js';
import { resolveSizing, resolveSpread } from './study.js';
import { resolveTrack } from './track.js';
import type { Body } from '../kinds/body.js';
import { resolveMoment } from './moment.js';
import { restSpeedOf } from './rest-speed.js';
import { checkMechanism } from '../checks/index.js';

/** Longest run where it ends at a station and the document sets no limit [s]. */
const LONGEST_RUN = 60;

/** The elements that could be resolved; those that are wrong are left out, their problems told. */
export function resolveMechanism(draft: DocumentDraft, tree: JsonObject, reading: Reading): Mechanism {
  const links = linksOf(draft);
  const rough = diagonal([...links, ...drawnTrackPoints(draft.tracks ?? []), ...bodyOrigins(draft)]);
  const tracks = resolved(draft.tracks, (track, place) => resolveTrack(track, TOUCHING * rough, place, reading));
  const paths = new Map(tracks.map((track): [string, TrackPath] => [track.id, buildTrack(track)]));
  const placing = (draft.bodies ?? []).map((element) => resolveBody(element, paths, reading));
  const placed = placing.flatMap((each) => each.placed ?? []);
  const bodies = placing.flatMap((each) => each.body ?? []);
  const extent = extentOf(links, placed, paths, reading);
  const parts = { tracks, bodies, extent };
  const mechanism = { ...heading(draft), ...parts, ...linked(draft, extent, reading), ...study(draft, tree, reading) };
  const { gravity } = mechanism;
  const scene = {
    bodies: placed,
    tracks,
    materialOf: new Map([...bodies, ...tracks].map(({ id, material }) => [id, material])),
    joints: mechanism.joints,
    materials: draft.materials ?? {},
    restSpeed: restSpeedOf(norm(gravity), extent, bodies, tracks),
  };
  const contacts = resolveContacts(draft.contacts ?? [], scene, reading);
  const whole: Mechanism = {
    ...mechanism,
    contacts,
    system: systemOf(draft, bodies, reading),
    run: runOf(draft, reading),
  };
  checkMechanism({ mechanism: whole, draft, placed, paths, places: placesOf(draft), reading });
  return whole;
}

/** Where each element stands, by id. */
function placesOf(draft: DocumentDraft): Map<string, Place> {
  const lists = Object.keys(collections).map((key) => draft[key as Collection] ?? []);
  const places = lists.flatMap((elements) => elements.map(({ place }) => place));
  return new Map(places.flatMap((place) => place.of.map((id): [string, Place] => [id, place])));
}

/** Each element that is right, resolved. */
function resolved<T, R>(elements: Element<T>[] | undefined, resolve: (value: T, place: Place) => R | undefined): R[] {
  return (elements ?? []).flatMap(({ value, place }) => {
    const result = value === undefined ? undefined : resolve(value, place);
    return result === undefined ? [] : [result];
  });
}

const linksOf = ({ joints = [], springs = [], dampers = [], loads = [] }: DocumentDraft) =>
  pointsIn([joints, springs, dampers, loads].flatMap((elements) => elements.map(({ value }) => value ?? null)));

const bodyOrigins = ({ bodies = [] }: DocumentDraft) => bodies.flatMap(({ draft }) => (draft.at ? [draft.at] : []));

function extentOf(
  links: ReturnType<typeof linksOf>,
  placed: readonly PlacedBody[],
  paths: ReadonlyMap<string, TrackPath>,
  reading: Reading,
): number {
  const extent = diagonal([...links, ...placed.flatMap(bodyPoints), ...[...paths.values()].flatMap(trackPoints)]);
  if (extent > 0) return extent;
  reading.applied('', '1 m', 'extent of a mechanism that is a single point');
  return 1;
}

const heading = (draft: DocumentDraft): Pick<Mechanism, 'title' | 'sheet' | 'notes' | 'gravity'> => ({
  title: draft.title ?? '',
  sheet: draft.sheet ?? {},
  notes: draft.notes ?? '',
  gravity: draft.gravity ?? [0, 0],
});

function linked(draft: DocumentDraft, extent: number, reading: Reading) {
  const touching = TOUCHING * extent;
  return {
    joints: resolved(draft.joints, (joint, place) => resolveJoint(joint, touching, place, reading)),
    springs: resolved(draft.springs, (spring, place) => resolveSpring(spring, touching, place, reading)),
    dampers: resolved(draft.dampers, (damper, place) => resolveDamper(damper, touching, place, reading)),
    drives: resolved(draft.drives, (drive, place) => resolveDrive(drive, place, reading)),
    loads: resolved(draft.loads, (load, place) => resolveLoad(load, place, reading)),
    latches: resolved(draft.latches, ({ id, joint, releasesAt }) => ({ id, joint, releasesAt })),
    stations: resolved(draft.stations, (station, place) => resolveStation(station, place, reading)),
  };
}

function study(
  draft: DocumentDraft,
  tree: JsonObject,
  reading: Reading,
): Pick<Mechanism, 'criteria' | 'spread' | 'sizing' | 'demonstration'> {
  const spread = draft.spread && resolveSpread(draft.spread, tree, { pointer: '/spread', of: [] }, reading);
  const sizing = draft.sizing && resolveSizing(draft.sizing, tree, { pointer: '/sizing', of: [] }, reading);
  return {
    criteria: resolved(draft.criteria, (criterion) => criterion),
    ...(spread && { spread }),
    ...(sizing && { sizing }),
    demonstration: draft.demonstration ?? [],
  };
}

function systemOf(draft: DocumentDraft, bodies: readonly Body[], reading: Reading): string[] {
  if (draft.system) return [...new Set(draft.system)];
  const all = bodies.map((body) => body.id);
  if (!('system' in draft)) reading.applied('/system', all, 'all bodies are inside the boundary');
  return all;
}

function runOf({ run }: DocumentDraft, reading: Reading): RunSettings {
  if (!run) return { until: { time: 0 }, atMost: 0 };
  const until = resolveMoment(run.until);
  const { step, tolerance, timeBudget } = run;
  const longest = 'time' in until ? until.time : LONGEST_RUN;
  if (run.atMost === undefined && !('time' in until)) {
    reading.applied('/run/atMost', `${LONGEST_RUN} s`, 'a run that ends at a station ends in any case');
  }
  return {
    until,
    atMost: run.atMost ?? longest,
    ...(step !== undefined && { step }),
    ...(tolerance !== undefined && { tolerance }),
    ...(timeBudget !== undefined && { timeBudget }),
  };
}
