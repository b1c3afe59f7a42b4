import type { MeasureKind } from '../measurement.js';
import { leastOf, peakOf, smoothRuns } from '../peak.js';
import type { RunView } from '../run-view.js';

/**
 * How far a spring, damper or slide moves between its shortest and its longest, or its two farthest places, within a span
 * [m]. Both are found between rows as `peakOf` says.
 */
export const stroke: MeasureKind<'stroke'> = {
  unit: 'm',
  take: (criterion, view) =>
    view.over(criterion, (rows) => {
      const source = travelColumn(criterion.of, view);
      if (typeof source === 'string') return { reason: source };
      const runs = smoothRuns(view.recording, rows, (row) => view.value(row, source.column));
      const [greatest, least] = [peakOf(runs), leastOf(runs)];
      return { value: greatest.value - least.value, resolution: greatest.resolution + least.resolution };
    }),
};

function travelColumn(of: string, { recording }: RunView): { column: number } | string {
  const { springs, dampers, joints } = recording.layout;
  const link = [...springs, ...dampers].find(({ id }) => id === of);
  if (link?.ends.some(({ at }) => at === undefined)) return `${of} turns, and has no stroke`;
  const column = link?.columns.deflection ?? joints.find(({ id }) => id === of)?.columns.position;
  return column === undefined ? `no stroke of ${of} is recorded` : { column };
}
