import type { Entry, Ledger } from '../ledger/index.js';
import { labelOf } from './accounts.js';
import type { CriterionPart } from './result.js';

/**
 * What gave energy to the bodies inside the boundary between two stations, beside some accounts: weights that fell,
 * springs that let go, motion that was used up, drives and loads. The greatest first; what gave less than 1e-6 of the
 * turnover is none.
 */
export function sourcesBeside(ledger: Ledger, beside: readonly Entry[]): CriterionPart[] {
  const motion = { side: 'gives' as const, label: 'Energy of motion', amount: -ledger.kineticChange };
  const least = 1e-6 * ledger.turnover;
  return [motion, ...ledger.entries.filter((entry) => !beside.includes(entry) && isCause(entry)).map(partOf)]
    .filter(({ amount }) => amount > least)
    .sort((a, b) => b.amount - a.amount);
}

const isCause = ({ kind }: Entry): boolean => kind !== 'numerical';

const partOf = (entry: Entry): CriterionPart => ({ side: 'gives', label: labelOf(entry), amount: entry.work });
