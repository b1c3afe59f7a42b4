import type { CriterionResult } from '../../sim/criteria/index.js';
import { limitsOf } from './criterion-figures.js';

/** Where a value lies between its limits [px]. */
export interface LimitScale {
  allowed: [number, number][];
  forbidden: [number, number][];
  limits: number[];
  /** Nothing where there is none. */
  value: number | null;
}

/** Room at either end [px], so that the pointer is whole. */
const margin = 5;

/** From nil to a third beyond the furthest limit; a value further off stands at the end. */
export function limitScale(result: CriterionResult, width: number): LimitScale | null {
  const limits = limitsOf(result).sort((a, b) => a - b);
  if (limits.length === 0) return null;
  const reach = Math.max(...limits.map(Math.abs)) || Math.abs(result.value ?? 0) || 1;
  const low = limits[0] < 0 ? limits[0] - reach / 3 : 0;
  const high = limits[limits.length - 1] > 0 ? limits[limits.length - 1] + reach / 3 : 0;
  const [from, to] = low === high ? [-reach, reach] : [Math.min(low, 0), Math.max(high, 0)];
  const x = (value: number) => margin + Math.min(1, Math.max(0, (value - from) / (to - from))) * (width - 2 * margin);
  const marks = limits.map(x);
  const [first, last] = [marks[0], marks[marks.length - 1]];
  const [before, after] = [[0, first] as [number, number], [last, width] as [number, number]];
  const value = result.value === null ? null : x(result.value);
  if (result.between) return { allowed: [[first, last]], forbidden: [before, after], limits: marks, value };
  const isMost = result.atMost !== undefined;
  return { allowed: [isMost ? before : after], forbidden: [isMost ? after : before], limits: marks, value };
}
