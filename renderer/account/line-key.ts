import type { AccountLine } from '../../sim/ledger/index.js';

type Key = Omit<AccountLine, 'segment' | 'amount'> & { segment?: number | undefined };

/** Tells the lines of a page apart. */
export function lineKey({ role, account, of, cause, segment }: Key): string {
  return [role, account, of, cause, segment].map((part) => String(part ?? '')).join('|');
}
