import { readQuantity } from '../../sim/mechanism/index.js';
import { MOST_STEPS } from '../../sim/stepper/index.js';
import { UsageError } from './command.js';

/** The step given with `--step` [s]: a positive time, with its unit or in seconds. */
export function readStep(typed: string): number {
  const read = readQuantity(typed);
  const accepted = 'accepted is a time above 0, such as "0.25 ms" or 0.00025 (seconds)';
  if (!read.ok) throw new UsageError(`--step: found "${typed}"; ${accepted}.`);
  const { value, dimension, hasUnit } = read.quantity;
  const isTime = !hasUnit || dimension.every((exponent, i) => exponent === (i === 2 ? 1 : 0));
  if (!isTime || !(value > 0)) throw new UsageError(`--step: found "${typed}"; ${accepted}.`);
  return value;
}

/** Refuses a step that a run of `duration` cannot be made of. @param step [s] @param duration at most [s] */
export function checkStep(step: number, duration: number): void {
  if (step <= duration && duration / step <= MOST_STEPS) return;
  const least = Number((duration / MOST_STEPS).toPrecision(3));
  throw new UsageError(
    `--step: found ${step} s; accepted, for a run of ${duration} s, is ${least} s to ${duration} s.`,
  );
}
