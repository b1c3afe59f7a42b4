import type { CriterionOf, Measurement } from '../measurement.js';
import { isSameOf, type RunView } from '../run-view.js';

/** What an impact of the pair at a station measured: that of the station itself, or one of the pair at the same row. */
export function atTouch(
  { of, at }: CriterionOf<'approachSpeed' | 'effectiveMass'>,
  view: RunView,
  figure: 'approachSpeed' | 'effectiveMass',
): Measurement {
  const marked = view.mechanism.stations.find(({ id }) => id === at)?.when;
  const isOwn = marked?.kind === 'touch' && isSameOf(marked.pair, of);
  return view.at(at, ({ row, touch }) => {
    if (touch && isOwn) return { value: touch[figure] };
    const struck = view.touches(of).filter((event) => event.row === row);
    if (struck.length === 0) return { reason: `${of.join(' and ')} do not strike each other at station ${at}` };
    return { value: struck.reduce((a, b) => (b.approachSpeed > a.approachSpeed ? b : a))[figure] };
  });
}
