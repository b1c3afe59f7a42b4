import type { MeasureKind } from '../measurement.js';

/** Whether a station is reached; its value is when [s]. A run that stopped early cannot tell that it never is. */
export const reached: MeasureKind<'reached'> = {
  unit: 's',
  take: ({ at }, view) => {
    const station = view.station(at);
    if (station) return { value: station.time, passes: true };
    if (view.isWhole) return { value: null, passes: false, note: `station ${at} was not reached.` };
    return view.at(at, () => ({ value: null }));
  },
};
