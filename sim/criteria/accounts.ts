import { compensatedSum } from '../core/sum.js';
import { ACCOUNT_NAMES, ofLabel, type Entry, type Ledger } from '../ledger/index.js';
import type { AccountSpec } from '../recording/index.js';
import type { CriterionOf } from './measurement.js';
import { isSameOf, type RunView } from './run-view.js';

/** An account as a criterion names it: all of a name, or that of one element. */
export type AccountRef = CriterionOf<'work'>['account'];

/** Entries of a ledger that a criterion means, or why there are none. */
export type Found = { entries: Entry[]; note?: string } | { reason: string };

/**
 * The entries of the bodies inside the boundary that an account means. One that there is none of (a pair that never met,
 * a name that nothing in the mechanism has) did nothing, which is said; one that works on bodies outside only is no
 * account of this boundary.
 */
export function entriesOf(view: RunView, ledger: Ledger, ref: AccountRef): Found {
  const entries = ledger.entries.filter((entry) => means(ref, entry));
  if (entries.length > 0) return { entries };
  const label = labelOfRef(ref);
  if (view.recording.layout.accounts.some((account) => means(ref, account))) {
    return { reason: `the account ${label} works on no body inside the boundary` };
  }
  if (typeof ref === 'string') return { entries, note: `Nothing in this run has an account ${label}.` };
  if (typeof ref.of !== 'string') return { entries, note: `${ofLabel(ref.of)} never met.` };
  return { reason: `this run has no account ${label}` };
}

function means(ref: AccountRef, { account, of }: Pick<AccountSpec, 'account' | 'of'>): boolean {
  return typeof ref === 'string' ? account === ref : account === ref.account && isSameOf(of, ref.of);
}

/** Accounts of several names, each entry once. */
export function entriesOfAll(view: RunView, ledger: Ledger, refs: readonly AccountRef[]): Found {
  const found = refs.map((ref) => entriesOf(view, ledger, ref));
  const missing = found.find((each) => 'reason' in each);
  if (missing) return missing;
  const all = found.flatMap((each) => ('entries' in each ? each.entries : []));
  const notes = found.flatMap((each) => ('note' in each && each.note !== undefined ? [each.note] : []));
  return { entries: [...new Set(all)], ...(notes.length === 0 ? {} : { note: notes.join(' ') }) };
}

export const workOf = (entries: readonly Entry[]): number => compensatedSum(entries.map(({ work }) => work));

export const labelOf = ({ account, of }: Pick<Entry, 'account' | 'of'>): string =>
  [ACCOUNT_NAMES[account], ofLabel(of)].filter(Boolean).join(' ');

const labelOfRef = (ref: AccountRef): string =>
  typeof ref === 'string' ? ref : `${ref.account} of ${ofLabel(ref.of)}`;
