import { BEHIND } from './modes.js';
import type { ContactPoint } from './unilateral.js';

/** Says at the start which points face their surface from its solid side. */
export function armAtStart(points: readonly ContactPoint[], q: Float64Array, v: Float64Array): void {
  for (const point of points) {
    point.locate(q);
    point.isArmed = point.gap >= -BEHIND;
    point.mark(q, v);
  }
}

/** Keeps up, step by step, which open points face their surface. */
export function armOnTheWay(points: readonly ContactPoint[], q: Float64Array, v: Float64Array): void {
  for (const point of points) {
    point.locate(q);
    if (point.isClosed) continue;
    if (!point.isValid) point.isArmed = true;
    else if (!point.isArmed) point.isArmed = point.gap >= 0;
    else if (point.gap < -BEHIND && !point.pair.compliant) point.isArmed = false;
    point.mark(q, v);
  }
}
