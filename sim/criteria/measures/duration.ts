import type { MeasureKind } from '../measurement.js';

/** Time from one station to another [s]. */
export const duration: MeasureKind<'duration'> = {
  unit: 's',
  take: ({ from, to }, view) =>
    view.at(from, (start) =>
      view.at(to, (end) =>
        end.time < start.time
          ? { reason: `station ${to} was reached before station ${from}` }
          : { value: end.time - start.time },
      ),
    ),
};
