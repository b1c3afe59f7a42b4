import { figure } from '../figure.js';
import type { MeasureKind } from '../measurement.js';
import { leastOf, peakOf } from '../peak.js';
import { ofDrive, powerRuns } from './drive-output.js';

/**
 * Greatest power a drive delivers at its output [W], from its work between rows; work in an impact is done in no time and
 * has no power. Where it brakes harder than it drives, a note says how hard.
 */
export const peakPower: MeasureKind<'peakPower'> = {
  unit: 'W',
  take: (criterion, view) =>
    view.over(criterion, (rows) =>
      ofDrive(view, criterion.of, (drive) => {
        const runs = powerRuns(view, drive, rows);
        if (runs.length === 0) return { reason: 'no time passes between its two ends' };
        const { value, time, resolution } = peakOf(runs);
        const braking = -leastOf(runs).value;
        const note = { note: `it brakes with up to ${figure(braking)} W.` };
        return { value, at: time, resolution, ...(braking > value ? note : {}) };
      }),
    ),
};
