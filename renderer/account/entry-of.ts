import type { Entry, Ledger, PageLine } from '../../sim/ledger/index.js';

/** The ledger's entries behind a printed line: one, or several where the page merged them; none for the frame's lines. */
export function entryOf(ledger: Ledger, { role, account, of }: PageLine): Entry[] {
  if (role !== 'entry') return [];
  const same = (other: PageLine['of']) => of === null || [other].flat().join() === [of].flat().join();
  return ledger.entries.filter((entry) => entry.account === account && same(entry.of));
}
