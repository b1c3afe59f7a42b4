import { compensatedSum } from '../../core/sum.js';
import type { Entry } from '../../ledger/index.js';
import { labelOf } from '../accounts.js';
import { figure } from '../figure.js';
import type { CriterionOf, MeasureKind, Measurement } from '../measurement.js';
import type { CriterionPart } from '../result.js';
import type { Rows, RunView } from '../run-view.js';

/**
 * Energy a spring gives up between two stations over what the path takes:
 *
 *     (stored at `from` − stored at `to`) / (rise of potential energy + losses + kinetic energy required at `to`)
 *
 * What the path takes is the work that every other account took from the bodies inside the boundary: weights lifted,
 * friction, damping, impacts, other springs, loads. One that gave some is below nil among it. What the method made or
 * lost is left out. Above 1 the mass arrives with more than it must.
 */
export const returnMargin: MeasureKind<'returnMargin'> = {
  unit: '',
  take: (criterion, view) => view.over(criterion, (rows) => margin(criterion, view, rows)),
};

function margin(criterion: CriterionOf<'returnMargin'>, view: RunView, rows: Rows): Measurement {
  const { spring, kineticEnergy, to } = criterion;
  const account = view.recording.layout.accounts.find(({ account: name, of }) => name === 'spring' && of === spring);
  if (account?.columns.stored === undefined) return { reason: `the run has no spring ${spring}` };
  const ledger = view.ledger(rows);
  const given = -view.change(rows, account.columns.stored);
  const others = ledger.entries.filter(({ account: name, of }) => !(name === 'spring' && of === spring));
  const takes = [
    ...takers(others),
    { side: 'takes' as const, label: `Motion required at ${to}`, amount: kineticEnergy },
  ];
  const parts: CriterionPart[] = [
    { side: 'gives', label: labelOf({ account: 'spring', of: spring }), amount: given },
    ...takes,
  ];
  const taken = compensatedSum(takes.map(({ amount }) => amount));
  // What is left of amounts that cancel is rounding.
  const least = 1e-12 * compensatedSum(parts.map(({ amount }) => Math.abs(amount)));
  if (taken <= least) return { reason: 'the path takes no energy, so that nothing is left to compare with', parts };
  const note = `the bodies also start with ${figure(ledger.kineticFrom)} J of motion, which is not counted.`;
  return { value: given / taken, parts, ...(ledger.kineticFrom > least ? { note } : {}) };
}

/** What each account took from the bodies inside, those that did nothing left out. */
function takers(entries: readonly Entry[]): CriterionPart[] {
  return entries
    .filter(({ kind, work }) => kind !== 'numerical' && work !== 0)
    .map((entry) => ({ side: 'takes', label: labelOf(entry), amount: -entry.work }));
}
