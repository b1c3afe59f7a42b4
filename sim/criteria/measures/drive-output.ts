import { compensatedSum } from '../../core/sum.js';
import type { AccountSpec } from '../../recording/index.js';
import type { Measurement } from '../measurement.js';
import type { Sample } from '../peak.js';
import type { Rows, RunView } from '../run-view.js';

/** A measure of a drive's account, where the run has it. */
export function ofDrive(view: RunView, id: string, take: (drive: AccountSpec) => Measurement): Measurement {
  const drive = view.recording.layout.accounts.find(({ account, of }) => account === 'drive' && of === id);
  return drive ? take(drive) : { reason: `the run has no drive ${id}` };
}

/** What a drive put out within a span, on all its bodies [J]. */
export function outputOf(view: RunView, { columns }: AccountSpec, rows: Rows): number {
  return compensatedSum(columns.work.map((column) => view.change(rows, column)));
}

/** What a drive took in within a span [J]: its output, where it has no column for it. */
export function inputOf(view: RunView, drive: AccountSpec, rows: Rows): number {
  const { input } = drive.columns;
  return input === undefined ? outputOf(view, drive, rows) : view.change(rows, input);
}

/** Rows nearer than this share of the mean distance are put together: the work between them is mostly rounding. */
const TOGETHER = 0.25;

/**
 * Mean power of a drive from row to row [W], at the middle of each interval, cut at impacts, whose work is done in no
 * time. At the ends of each piece, where the last three means lie on a line, it is carried on to the end.
 */
export function powerRuns(view: RunView, drive: AccountSpec, { fromRow, toRow }: Rows): Sample[][] {
  const least = (TOGETHER * (view.time(toRow) - view.time(fromRow))) / (toRow - fromRow || 1);
  const runs: Sample[][] = [];
  for (let first = fromRow; first < toRow;) {
    let last = first;
    while (last < toRow && view.time(last + 1) > view.time(last)) last++;
    const means = meansOf(view, drive, { fromRow: first, toRow: last }, least);
    if (means.length > 0) runs.push(withEnds(means, view.time(first), view.time(last)));
    first = last + 1;
  }
  return runs;
}

function meansOf(view: RunView, drive: AccountSpec, { fromRow, toRow }: Rows, least: number): Sample[] {
  const means: Sample[] = [];
  let start = fromRow;
  for (let row = fromRow + 1; row <= toRow; row++) {
    const time = view.time(row) - view.time(start);
    const isRest = row < toRow && view.time(toRow) - view.time(row) < least;
    if ((time < least && row < toRow) || isRest) continue;
    const value = outputOf(view, drive, { fromRow: start, toRow: row }) / time;
    means.push({ time: view.time(start) + time / 2, value });
    start = row;
  }
  return means;
}

function withEnds(means: readonly Sample[], start: number, end: number): Sample[] {
  const first = carried(means.slice(0, 3), start);
  const last = carried(means.slice(-3).reverse(), end);
  return [...(first ? [first] : []), ...means, ...(last ? [last] : [])];
}

/** The line through the first two of three means, at a time, if the third is on it too, or nearly. */
function carried([a, b, c]: readonly Sample[], time: number): Sample | null {
  if (!a || !b || !c) return null;
  const near = (b.value - a.value) / (b.time - a.time);
  const far = (c.value - b.value) / (c.time - b.time);
  if (Math.abs(far - near) > 0.5 * Math.abs(near)) return null;
  // The slope at the end itself, from how it changes.
  const slope = near + ((near - far) / (a.time - c.time)) * (time - (a.time + b.time) / 2) * 0.5;
  return { time, value: a.value + slope * (time - a.time) };
}
