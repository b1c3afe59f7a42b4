import { rotate, subtract, add, type Vec } from '../../core/vec.js';
import { joinTracks, type TrackPath } from '../../geometry/index.js';
import type { Body } from '../../mechanism/kinds/body.js';
import type { ContactPair } from '../../mechanism/kinds/contact.js';
import type { Joint, PointOn } from '../../mechanism/kinds/joint.js';
import type { Mechanism } from '../../mechanism/model.js';
import {
  bodyAtRow,
  contactOf,
  poseAtTime,
  timeOfRow,
  valueAt,
  type BodySpec,
  type ContactSpec,
  type Pose,
  type Recording,
} from '../../recording/index.js';
import { refuse } from './refusal.js';

/**
 * What the hand check may know: the document's data, and of the recording only where each body was, what it touched, and
 * what happened. No force, energy or account of a run is read.
 */
export class Scene {
  readonly tracks: TrackPath[];
  private readonly bodies: Map<string, Body>;
  private readonly specs: Map<string, BodySpec>;
  private readonly contacts: Map<ContactPair, ContactSpec | undefined>;
  private readonly pairs: Map<string, ContactPair[]>;
  /** Rows before a blow, by body. */
  private readonly blows: Map<string, number[]>;

  constructor(
    readonly mechanism: Mechanism,
    readonly recording: Recording,
  ) {
    this.tracks = joinTracks(mechanism.tracks, mechanism.extent);
    this.bodies = new Map(mechanism.bodies.map((body) => [body.id, body]));
    this.specs = new Map(recording.layout.bodies.map((spec) => [spec.id, spec]));
    this.contacts = new Map(mechanism.contacts.map((pair) => [pair, contactOf(recording, pair.between)]));
    this.blows = this.blowRows();
    this.pairs = new Map(
      mechanism.bodies.map(({ id }) => [id, mechanism.contacts.filter(({ between }) => between.includes(id))]),
    );
  }

  isBody(id: string): boolean {
    return this.bodies.has(id);
  }

  body(id: string): Body {
    return this.bodies.get(id) ?? refuse(`There is no body ${id}.`);
  }

  /** How often a body is struck between two rows; several touches at one row are one blow. */
  blowsOf(id: string, fromRow: number, toRow: number): number {
    const rows = this.blows.get(id) ?? [];
    return rows.filter((row) => row >= fromRow && row < toRow).length;
  }

  private blowRows(): Map<string, number[]> {
    const joints = new Map(this.mechanism.joints.map((joint) => [joint.id, 'between' in joint ? joint.between : []]));
    const blows = new Map<string, number[]>(this.mechanism.bodies.map(({ id }) => [id, []]));
    for (const event of this.recording.events) {
      if (event.kind !== 'touch' && event.kind !== 'limit') continue;
      for (const part of event.kind === 'touch' ? event.pair : (joints.get(event.joint) ?? [])) {
        const rows = blows.get(part);
        if (rows && rows.at(-1) !== event.row) rows.push(event.row);
      }
    }
    return blows;
  }

  private spec(id: string): BodySpec {
    return this.specs.get(id) ?? refuse(`The run has no body ${id}.`);
  }

  /** Where the centre of mass is, and the angle, at a time [s]. */
  pose(id: string, time: number): Pose {
    const spec = this.spec(id);
    return poseAtTime(this.recording, spec, time);
  }

  /** The same at a row. */
  poseAtRow(id: string, row: number): Pose {
    const spec = this.spec(id);
    const { x, y, angle } = bodyAtRow(this.recording, spec, row);
    return { x, y, angle };
  }

  /** Which way it moves at a row: velocity [m/s] and spin [rad/s], for their signs and for whether it rolls. */
  heading(id: string, row: number): { vx: number; vy: number; spin: number } {
    const spec = this.spec(id);
    return bodyAtRow(this.recording, spec, row);
  }

  time(row: number): number {
    return timeOfRow(this.recording, row);
  }

  /** Whether a pair touches at a row. */
  touches(pair: ContactPair, row: number): boolean {
    const spec = this.contacts.get(pair);
    return spec !== undefined && valueAt(this.recording, row, spec.columns.points) > 0;
  }

  /** Unit normal of a pair at a row, in the direction from its second to its first. */
  normal(pair: ContactPair, row: number): Vec {
    const spec = this.contacts.get(pair) ?? refuse(`The run has no contact ${pair.between.join('/')}.`);
    return [valueAt(this.recording, row, spec.columns.nx), valueAt(this.recording, row, spec.columns.ny)];
  }

  /** Contact pairs of a body with anything. */
  pairsOf(id: string): ContactPair[] {
    return this.pairs.get(id) ?? [];
  }

  /** Joints that hold a body at a row, but for those a latch has let go. */
  jointsOf(id: string, row: number): Exclude<Joint, { kind: 'gear' | 'rack' | 'screw' }>[] {
    const released = this.releasedBy(row);
    return this.mechanism.joints
      .filter((joint) => joint.kind !== 'gear' && joint.kind !== 'rack' && joint.kind !== 'screw')
      .filter(
        (joint) => joint.between.includes(id) || (joint.kind === 'rope' && joint.through.some(({ of }) => of === id)),
      )
      .filter((joint) => !released.has(joint.id));
  }

  /** Gears, racks and screws that tie a joint to another. */
  tiesOf(joint: string): Joint[] {
    return this.mechanism.joints.filter((tie) => {
      if (tie.kind === 'gear') return tie.joints.includes(joint);
      return (tie.kind === 'rack' || tie.kind === 'screw') && (tie.pin === joint || tie.slide === joint);
    });
  }

  private releasedBy(row: number): Set<string> {
    const gone = this.recording.events.flatMap((event) =>
      event.kind === 'release' && event.row <= row ? [event.latch] : [],
    );
    return new Set(this.mechanism.latches.filter(({ id }) => gone.includes(id)).map(({ joint }) => joint));
  }

  /** Centre of mass as drawn [m]. */
  drawnCenter(id: string): Vec {
    const { at, angle, centerOfMass } = this.body(id);
    return add(at, rotate(centerOfMass, angle));
  }

  /** Where a point fixed to a part is when its body has a pose [m]. */
  place({ of, at }: PointOn, pose: (body: string) => Pose): Vec {
    if (!this.isBody(of)) return at;
    const now = pose(of);
    const arm = rotate(subtract(at, this.drawnCenter(of)), now.angle - this.body(of).angle);
    return [now.x + arm[0], now.y + arm[1]];
  }
}
