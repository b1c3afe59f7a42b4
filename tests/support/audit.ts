import { expect } from 'vitest';
import { runAuditor, startAudit, type AuditorOptions } from '../../sim/auditor/index.js';
import { readMechanism } from '../../sim/mechanism/index.js';
import { mechanismOf, Run, type Parts } from './run.js';

/** Closure and drift every audited run must show, as parts of its turnover and of its size. */
export const CLOSURE = 1e-9;
export const DRIFT = 1e-10;

/** Runs a document on the auditor. */
export function audit(parts: Parts, options: AuditorOptions = {}): Run {
  const mechanism = mechanismOf(parts);
  return new Run(mechanism, runAuditor(mechanism, options));
}

/** Runs a document for no longer than so many seconds of wall clock; null where the document is refused. */
export function auditWithin(
  seconds: number,
  parts: Parts,
  options: AuditorOptions = {},
): { ran: Run; isDone: boolean } | null {
  const { mechanism } = readMechanism(JSON.stringify({ format: 'joulewright/1', ...parts }));
  if (!mechanism) return null;
  const run = startAudit(mechanism, options);
  const until = Date.now() + 1000 * seconds;
  while (!run.done && Date.now() < until) run.advance(50);
  return { ran: new Run(mechanism, run.recording()), isDone: run.done };
}

/** Every number of a run is finite. */
export function isFinite({ recording: { rows, rowCount, layout } }: Run): boolean {
  return rows.subarray(0, rowCount * layout.width).every(Number.isFinite);
}

/** Reached its end in finite numbers, closes, and drifts no further than it may. */
export function expectAudited(ran: Run, { drift = DRIFT, numerical = CLOSURE } = {}): void {
  expect(ran.recording.end).toBe('reachedEnd');
  expect(isFinite(ran)).toBe(true);
  expect(ran.openShare()).toBeLessThanOrEqual(CLOSURE);
  expect(ran.recording.counters.drift).toBeLessThanOrEqual(drift);
  expect(ran.numericalShare()).toBeLessThanOrEqual(numerical);
}
