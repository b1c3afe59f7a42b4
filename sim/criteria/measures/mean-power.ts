import type { MeasureKind } from '../measurement.js';
import { ofDrive, outputOf } from './drive-output.js';

/** Work of a drive at its output over the time it takes [W]. */
export const meanPower: MeasureKind<'meanPower'> = {
  unit: 'W',
  take: (criterion, view) =>
    view.over(criterion, (rows) =>
      ofDrive(view, criterion.of, (drive) => {
        const time = view.time(rows.toRow) - view.time(rows.fromRow);
        if (time === 0) return { reason: 'no time passes between its two ends' };
        return { value: outputOf(view, drive, rows) / time };
      }),
    ),
};
