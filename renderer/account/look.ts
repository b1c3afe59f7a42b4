import { patternOf, type PatternName } from '../../sim/drawing/patterns.js';
import type { PageLine } from '../../sim/ledger/index.js';
import type { AccountName, AccountSpec, Recording } from '../../sim/recording/recording.js';

const frictions: readonly AccountName[] = ['friction', 'joint-friction', 'rolling-resistance'];

const samePair = (a: AccountSpec['of'], b: AccountSpec['of']) => [a].flat().join() === [b].flat().join();

/** The look of an account in this run: friction accounts take the two hatches by turns, as they come in the run. */
export function accountLook(recording: Recording | null, account: AccountName, of: AccountSpec['of']): PatternName {
  const list = recording?.layout.accounts.filter((each) => frictions.includes(each.account)) ?? [];
  const index = list.findIndex((each) => each.account === account && samePair(each.of, of));
  return patternOf(account, Math.max(0, index));
}

export function lineLook(recording: Recording | null, { account, of, role }: PageLine): PatternName {
  if (account !== null) return accountLook(recording, account, of);
  return role === 'unbooked' || role === 'rounding' ? 'unbooked' : 'motion';
}
