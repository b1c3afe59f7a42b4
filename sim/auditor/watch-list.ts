import type { StationWatch } from '../recording/station-watch.js';
import type { Assembly } from './assembly.js';
import type { FrictionGroup } from './dynamics.js';
import type { DryFriction } from './element.js';
import { RoundOnTrack } from './contact/round-on-track.js';
import type { SoftPoint } from './contact/soft-point.js';
import { isDouble, STILL, touches } from './modes.js';
import type { StateMotion } from './motion.js';
import { ContactPoint, type Unilateral } from './unilateral.js';

/** What a value passing zero means. */
export type Happening =
  | { kind: 'closes'; what: Unilateral }
  | { kind: 'opens'; what: Unilateral }
  | { kind: 'breaksLoose'; what: FrictionGroup | DryFriction | SoftPoint; sliding: () => 1 | -1 }
  | { kind: 'stops'; what: FrictionGroup | DryFriction | SoftPoint }
  | { kind: 'presses'; what: SoftPoint }
  | { kind: 'letsGo'; what: SoftPoint }
  | { kind: 'clears'; what: SoftPoint }
  | { kind: 'restart' }
  | { kind: 'rests' }
  | { kind: 'releases'; latch: string }
  | { kind: 'station'; index: number };

/** A scalar of the state that is positive until something happens. */
export interface Watch {
  /** Value at the state that the dynamics were last solved at. */
  value(q: Float64Array, v: Float64Array): number;
  /** How far below zero it must be to count. */
  tolerance: number;
  happening: Happening;
}

const FORCE = 1e-10;
const SEAM = 1e-12;
/** Two gaps that are the same length differ by less; one this deep is clear of the corner. */
const ROUNDING = 1e-12;

/** Everything to be watched in the present mode. `isNear` leaves out points that no step can close. */
export function watchList(
  assembly: Assembly,
  stations: StationWatch,
  motion: StateMotion,
  latches: readonly { id: string; left: () => number }[],
  isNear: (point: ContactPoint) => boolean,
): Watch[] {
  const { dynamics, soft, springs, dampers } = assembly;
  const { unilaterals, frictions } = dynamics.parts;
  const list: Watch[] = [];
  const closed = unilaterals.filter(({ isClosed }) => isClosed);
  for (const what of unilaterals) {
    if (what.isClosed) list.push(...closedWatches(what));
    else {
      const carrier = carrierOf(what, closed, motion);
      list.push(...(carrier ? riddenWatches(what, carrier) : openWatches(what, isNear)));
    }
  }
  for (const group of dynamics.groups) list.push(...groupWatches(group));
  for (const friction of frictions) if (friction.isActive) list.push(frictionWatch(friction));
  for (const point of soft) list.push(...softWatches(point, isNear));
  for (const spring of springs) {
    spring.bends(motion.q).forEach((_, k) => list.push(signed((q) => spring.bends(q)[k], motion, SEAM)));
  }
  for (const damper of dampers) {
    if (Number.isFinite(damper.onset(motion.q, motion.v)))
      list.push(signed((q, v) => damper.onset(q, v), motion, STILL));
  }
  for (const { id, left } of latches)
    list.push({ value: left, tolerance: FORCE, happening: { kind: 'releases', latch: id } });
  for (const index of stations.smooth()) {
    list.push({
      value: (q, v) => stations.signedValue(index, motion.at(q, v)),
      tolerance: stations.blurOf(index),
      happening: { kind: 'station', index },
    });
  }
  return list;
}

/** Another point of its pair that is closed at the very place: where that goes, this goes. */
function carrierOf(what: Unilateral, closed: readonly Unilateral[], { q, v }: StateMotion): Unilateral | undefined {
  if (!(what instanceof ContactPoint)) return undefined;
  what.locate(q);
  if (!what.isValid || !touches(what)) return undefined;
  what.aim(q, v, 0);
  return closed.find((one) => isDouble(what, [one]));
}

/**
 * Two tracks' ends are one corner, and what goes round it is on either's end, to the last digit; until it comes onto the
 * flank of the second, where the first no longer carries it.
 */
function riddenWatches(what: Unilateral, carrier: Unilateral): Watch[] {
  if (!(what instanceof RoundOnTrack && carrier instanceof RoundOnTrack)) return [];
  const value = (q: Float64Array): number => {
    carrier.locate(q);
    what.locate(q);
    return what.isValid ? what.gap - carrier.gap : Infinity;
  };
  return [{ value, tolerance: ROUNDING, happening: { kind: 'closes', what } }];
}

function closedWatches(what: Unilateral): Watch[] {
  const list: Watch[] = [{ value: () => what.lambda, tolerance: FORCE, happening: { kind: 'opens', what } }];
  if (what instanceof ContactPoint) {
    list.push({ value: () => what.seam(), tolerance: SEAM, happening: { kind: 'restart' } });
  }
  return list;
}

function openWatches(what: Unilateral, isNear: (point: ContactPoint) => boolean): Watch[] {
  if (what instanceof ContactPoint && (!what.isArmed || !isNear(what))) return [];
  const value = (q: Float64Array): number => {
    what.locate(q);
    return what.isValid ? what.gap : Infinity;
  };
  return [{ value, tolerance: what.slack, happening: { kind: 'closes', what } }];
}

function groupWatches(group: FrictionGroup): Watch[] {
  const { pair, members } = group;
  if (!pair.friction) return [];
  if (group.sliding !== 0) {
    const value = (_q: Float64Array, v: Float64Array): number => group.sliding * members[0].slip(v);
    return [{ value, tolerance: STILL, happening: { kind: 'stops', what: group } }];
  }
  const bound = (): number => pair.staticFriction * members.reduce((sum, { lambda }) => sum + lambda, 0);
  return [
    {
      value: () => bound() - Math.abs(group.lambda),
      tolerance: FORCE,
      happening: { kind: 'breaksLoose', what: group, sliding: () => (group.lambda > 0 ? -1 : 1) },
    },
  ];
}

function frictionWatch(friction: DryFriction): Watch {
  if (friction.sliding !== 0) {
    const value = (_q: Float64Array, v: Float64Array): number => friction.sliding * friction.row.rate(v);
    return { value, tolerance: STILL, happening: { kind: 'stops', what: friction } };
  }
  return {
    value: () => friction.bound() - Math.abs(friction.lambda),
    tolerance: FORCE,
    happening: { kind: 'breaksLoose', what: friction, sliding: () => (friction.lambda > 0 ? -1 : 1) },
  };
}

function softWatches(what: SoftPoint, isNear: (point: ContactPoint) => boolean): Watch[] {
  const { point } = what;
  const located = (q: Float64Array): number => {
    point.locate(q);
    return point.isValid ? point.gap : Infinity;
  };
  if (!what.isPressed && what.hasLetGo) {
    const force = (q: Float64Array, v: Float64Array): number => {
      located(q);
      point.aim(q, v, 0);
      return -what.forceAt(point.gap, point.rate(v));
    };
    return [
      { value: (q) => -located(q), tolerance: SEAM, happening: { kind: 'clears', what } },
      { value: force, tolerance: FORCE, happening: { kind: 'presses', what } },
    ];
  }
  if (!what.isPressed) {
    if (!point.isArmed || !isNear(point)) return [];
    return [{ value: located, tolerance: point.slack, happening: { kind: 'presses', what } }];
  }
  const list: Watch[] = [
    { value: () => what.normal, tolerance: FORCE, happening: { kind: 'letsGo', what } },
    { value: () => point.seam(), tolerance: SEAM, happening: { kind: 'restart' } },
  ];
  if (!what.rubs) return list;
  if (what.sliding !== 0) {
    const value = (_q: Float64Array, v: Float64Array): number => what.sliding * point.slip(v);
    list.push({ value, tolerance: STILL, happening: { kind: 'stops', what } });
  } else {
    list.push({
      value: () => point.pair.staticFriction * what.normal - Math.abs(what.friction),
      tolerance: FORCE,
      happening: { kind: 'breaksLoose', what, sliding: () => (what.friction > 0 ? -1 : 1) },
    });
  }
  return list;
}

/** A value that may pass zero either way; only the integration begins anew there. */
function signed(value: (q: Float64Array, v: Float64Array) => number, motion: StateMotion, tolerance: number): Watch {
  const start = value(motion.q, motion.v);
  let sign = Math.abs(start) <= tolerance ? 0 : Math.sign(start);
  return {
    value(q, v) {
      const now = value(q, v);
      if (sign === 0) sign = Math.sign(now) || 1;
      return sign * now;
    },
    tolerance,
    happening: { kind: 'restart' },
  };
}
