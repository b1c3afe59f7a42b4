import { inside, type Reading } from '../fields/reading.js';
import { inKind } from '../fields/read-quantity.js';
import type { Measured } from '../fields/spec.js';
import type { Place } from '../../core/problem.js';
import { norm, rotate, toBody, unit, type Vec } from '../../core/vec.js';
import type { CamFollower, CamSegment, CamShape } from '../kinds/body.js';
import type { CamDocument } from '../kinds/cam.js';
import { formatQuantity } from '../units/format.js';
import type { Pose } from './rest.js';

type SegmentDocument = CamDocument['segments'][number];

/** A full turn adds up to this much [rad]: degrees in decimals rarely do so to the last bit. */
const TURN_TOLERANCE = 1e-9;

/**
 * The cam with its rises in SI and its follower in body coordinates; undefined, with problems told, where its segments
 * are no full turn or its follower cannot ride on it.
 */
export function resolveCam(cam: CamDocument, pose: Pose, place: Place, reading: Reading): CamShape | undefined {
  const { baseRadius, turns } = cam;
  const isSwinging = cam.follower.kind === 'roller' && cam.follower.pivot !== undefined;
  const segments = cam.segments.map((segment, i) =>
    resolveSegment(segment, isSwinging ? 'angle' : 'length', inside(inside(place, 'segments'), i), reading),
  );
  if (!segments.every((segment) => segment !== undefined)) return undefined;
  if (!checkTurn(segments, inside(place, 'segments'), reading)) return undefined;
  const follower = resolveFollower(cam.follower, pose);
  const shape: CamShape = { kind: 'cam', baseRadius, turns, segments, follower };
  return checkReach(shape, inside(place, 'follower'), reading) ? shape : undefined;
}

/** The follower's trace point must be able to lie on its lowest circle. */
function checkReach({ baseRadius, follower }: CamShape, place: Place, reading: Reading): boolean {
  const { kind, radius, offset, pivot, arm = 0 } = follower;
  const circle = baseRadius + radius;
  const far = pivot ? norm(pivot) : 0;
  const isReached = pivot ? Math.abs(far - arm) < circle && circle < far + arm : Math.abs(offset) < circle;
  if (isReached || kind === 'flat') return true;
  const found = pivot ? 'an arm that does not reach the base circle' : 'an offset beyond the base circle';
  const accepted = `a trace point that can lie ${formatQuantity(circle, 'length')} from the cam's origin`;
  reading.report('cam-follower', place, { found, accepted });
  return false;
}

/** Directions and places are given on the sheet as drawn. */
function resolveFollower(follower: CamDocument['follower'], { at, angle }: Pose): CamFollower {
  const { kind, offset } = follower;
  const along = unit(rotate(follower.along, -angle));
  if (kind !== 'roller') return { kind, offset, along, radius: 0 };
  const { radius, pivot, arm } = follower;
  return {
    kind,
    offset,
    along,
    radius,
    ...(pivot && { pivot: toBody(at, angle, pivot) }),
    ...(arm !== undefined && { arm }),
  };
}

function resolveSegment(
  segment: SegmentDocument,
  kind: 'length' | 'angle',
  place: Place,
  reading: Reading,
): CamSegment | undefined {
  if ('dwell' in segment) return { lift: 0, over: segment.dwell, law: 'dwell' };
  const key = 'rise' in segment ? 'rise' : 'fall';
  const size = inKind('rise' in segment ? segment.rise : segment.fall, kind, inside(place, key), reading);
  if (size === undefined) return undefined;
  if (size <= 0) {
    reading.report('out-of-range', inside(place, key), { found: String(size), accepted: `a ${kind} above 0` });
    return undefined;
  }
  const lift = key === 'rise' ? size : -size;
  const { over, law } = segment;
  if (law !== 'table') return { lift, over, law };
  const table = segment.table && resolveTable(segment.table, kind, inside(place, 'table'), reading);
  if (table && spans(table, over, lift)) return { lift, over, law, table };
  if (table || !segment.table) {
    const found = segment.table ? 'a table that does not fit its segment' : 'no table';
    const accepted = 'rising angles from [0, 0] to the segment’s angle and displacement';
    reading.report('cam-table', inside(place, 'table'), { found, accepted });
  }
  return undefined;
}

function resolveTable(
  rows: [Measured, Measured][],
  kind: 'length' | 'angle',
  place: Place,
  reading: Reading,
): Vec[] | undefined {
  const table = rows.map(([x, y], i): Vec | undefined => {
    const angle = inKind(x, 'angle', inside(inside(place, i), 0), reading);
    const displacement = inKind(y, kind, inside(inside(place, i), 1), reading);
    return angle === undefined || displacement === undefined ? undefined : [angle, displacement];
  });
  return table.every((row) => row !== undefined) ? table : undefined;
}

function spans(table: Vec[], over: number, lift: number): boolean {
  const first = table[0];
  const last = table[table.length - 1];
  const isNear = (a: number, b: number, size: number): boolean => Math.abs(a - b) <= 1e-9 * Math.abs(size);
  const isRising = table.every((row, i) => i === 0 || row[0] > table[i - 1][0]);
  return isRising && first[0] === 0 && first[1] === 0 && isNear(last[0], over, over) && isNear(last[1], lift, lift);
}

function checkTurn(segments: CamSegment[], place: Place, reading: Reading): boolean {
  const turn = segments.reduce((sum, segment) => sum + segment.over, 0);
  const lift = segments.reduce((sum, segment) => sum + segment.lift, 0);
  const greatest = segments.reduce((most, segment) => Math.max(most, Math.abs(segment.lift)), 0);
  if (Math.abs(turn - 2 * Math.PI) > TURN_TOLERANCE) {
    const found = `${Number(((turn * 180) / Math.PI).toPrecision(9))} deg in all`;
    reading.report('cam-turn', place, { found, accepted: '360 deg in all' });
    return false;
  }
  if (Math.abs(lift) <= 1e-9 * greatest) return true;
  reading.report('cam-turn', place, {
    found: 'rises and falls that differ',
    accepted: 'falls that take back the rises',
  });
  return false;
}
