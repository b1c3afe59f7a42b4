import type { Dop853 } from './dop853.js';

export interface ControlledStep {
  /** Length taken, in scaled time. */
  taken: number;
  /** Length to try next. */
  next: number;
}

const SAFETY = 0.9;
const SHRINK = 0.2;
const GROW = 4;

/**
 * A step whose error estimate is within the tolerances of `scale`, tried from `first` downwards; null when it would
 * be shorter than `least`. Elementary step size control for a method of order 8 (Hairer, Nørsett, Wanner 1993, II.4).
 */
export function controlledStep(
  method: Dop853,
  first: number,
  scale: Float64Array,
  least: number,
): ControlledStep | null {
  for (let h = first; ;) {
    const error = method.try(h, scale);
    if (error <= 1) {
      method.finish();
      return { taken: h, next: h * Math.min(GROW, error > 0 ? SAFETY * error ** (-1 / 8) : GROW) };
    }
    h *= Number.isFinite(error) ? Math.max(SHRINK, SAFETY * error ** (-1 / 8)) : SHRINK;
    if (h < least) return null;
  }
}
