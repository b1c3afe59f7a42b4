import { expect } from 'vitest';
import type { Run } from './run.js';

/** What every run must show: it ended by itself, in finite numbers, and its account closes to 1e-12 of the turnover. */
export function expectSound(ran: Run): void {
  expect(ran.recording.end).toBe('reachedEnd');
  const { rows, rowCount, layout } = ran.recording;
  expect(rows.subarray(0, rowCount * layout.width).every(Number.isFinite)).toBe(true);
  expect(ran.openShare()).toBeLessThanOrEqual(1e-12);
}

/** Relative error of a value. */
export const relative = (value: number, exact: number): number => Math.abs(value / exact - 1);

/** Expects a value within a relative bound, and prints the figure. */
export function expectWithin(what: string, value: number, exact: number, bound: number): void {
  const off = relative(value, exact);
  console.log(
    `${what}: ${value.toPrecision(9)} (exact ${exact.toPrecision(9)}, off by ${off.toExponential(1)}, bound ${bound.toExponential(0)})`,
  );
  expect(off).toBeLessThanOrEqual(bound);
}
