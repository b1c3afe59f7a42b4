import type { Bounds } from '../mechanism/kinds/criterion.js';

/** A value this near to its limit is at it: what rounding leaves of two equal numbers. */
const ROUNDING = 1e-12;

export interface Verdict {
  margin: number;
  marginShare?: number;
  passes: boolean;
}

/**
 * How far a value is within its limits, in its unit and as a share of the nearer limit; below nil outside. A value at the
 * limit passes. Nothing where there is no limit.
 */
export function judgeBounds(value: number, { atMost, atLeast, between }: Bounds): Verdict | null {
  const least = between?.[0] ?? atLeast;
  const most = between?.[1] ?? atMost;
  const sides = [
    ...(least === undefined ? [] : [{ limit: least, margin: value - least }]),
    ...(most === undefined ? [] : [{ limit: most, margin: most - value }]),
  ];
  if (sides.length === 0) return null;
  const { limit, margin } = sides.reduce((a, b) => (b.margin < a.margin ? b : a));
  return {
    margin,
    ...(limit === 0 ? {} : { marginShare: margin / Math.abs(limit) }),
    passes: margin >= -ROUNDING * Math.max(Math.abs(limit), Math.abs(value)),
  };
}
