import type { Place } from '../../core/problem.js';
import { inside, type Reading } from '../fields/reading.js';
import type { Moment } from '../kinds/load.js';

type MomentDocument = number | { station: string };

export const resolveMoment = (given: MomentDocument): Moment => (typeof given === 'number' ? { time: given } : given);

/** The span an element acts in; one that ends before it begins is a problem. */
export function resolveSpan(
  { from, until }: { from?: MomentDocument; until?: MomentDocument },
  place: Place,
  reading: Reading,
): { from?: Moment; until?: Moment } {
  if (typeof from === 'number' && typeof until === 'number' && until <= from) {
    const found = `from ${from} s until ${until} s`;
    reading.report('empty-span', inside(place, 'until'), { found, accepted: 'an end after the beginning' });
  }
  return {
    ...(from !== undefined && { from: resolveMoment(from) }),
    ...(until !== undefined && { until: resolveMoment(until) }),
  };
}
