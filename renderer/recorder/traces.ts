import type { Strip } from '../../sim/drawing/strip.js';
import type { Recording } from '../../sim/recording/recording.js';
import { bodyOf, valueAt } from '../../sim/recording/reader.js';

/** A line of the lower chart, over the samples of the strip. */
export interface Trace {
  values: Float64Array;
  /** Greatest value of the whole run, not of the samples only. */
  peak: number;
}

/** A body slower than this all along stands still [m/s]: it is pinned, and what is left is rounding. */
const rounding = 1e-9;

/** Speed of a body's mass centre [m/s]; null for one that stands still. */
export function speedTrace(recording: Recording, { rows }: Strip, body: string): Trace | null {
  const columns = bodyOf(recording, body)?.columns;
  if (!columns) return null;
  const speed = (row: number) => Math.hypot(valueAt(recording, row, columns.vx), valueAt(recording, row, columns.vy));
  const trace = traceOf(recording, rows, speed);
  return trace.peak > rounding ? trace : null;
}

export interface ForceTrace extends Trace {
  id: string;
}

/** The force of the spring that pulls or pushes hardest in the run [N]; null where there is no linear spring that works. */
export function forceTrace(recording: Recording, { rows }: Strip, linear: readonly string[]): ForceTrace | null {
  const traces = recording.layout.springs
    .filter(({ id }) => linear.includes(id))
    .map(({ id, columns }) => ({ id, ...traceOf(recording, rows, (row) => Math.abs(valueAt(recording, row, columns.force))) })); // prettier-ignore
  const [hardest] = traces.filter(({ peak }) => peak > 0).sort((a, b) => b.peak - a.peak);
  return hardest ?? null;
}

function traceOf(recording: Recording, rows: Int32Array, value: (row: number) => number): Trace {
  let peak = 0;
  for (let row = 0; row < recording.rowCount; row++) peak = Math.max(peak, value(row));
  return { values: Float64Array.from(rows, value), peak };
}
