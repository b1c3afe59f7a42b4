import type { AccountName } from '../recording/index.js';
import type { BookedLedger, Entry } from './ledger.js';

/** How gravity and springs are shown: by the work they do, or by the energy they hold at the two stations. */
export type AccountView = 'work' | 'stored';

/**
 * One amount of an account, before rounding. `brought` opens the account with what was there at the first station,
 * `carried` closes it with what is there at the second: energy of motion where `account` is null, else energy stored.
 */
export interface AccountLine {
  role: 'brought' | 'entry' | 'unbooked' | 'rounding' | 'carried';
  account: AccountName | null;
  of: string | [string, string] | null;
  cause?: string;
  /** The place of this part, where an entry is split by track segment. */
  on?: string;
  segment?: number;
  /** [J], positive where received, negative where paid out; `carried` is negative as long as it is there. */
  amount: number;
}

/** An account by the work of every cause: energy of motion in, works, unbooked, energy of motion out. The sum is nil. */
export function asWork(ledger: BookedLedger): AccountLine[] {
  return framed(ledger, [], ledger.entries.map(workLine), []);
}

/**
 * The same account with what gravity and springs hold at the two stations in place of their work. Height is counted from
 * the lower of the two stations, a spring from relaxed, so that no store is below nil.
 */
export function asStored(ledger: BookedLedger): AccountLine[] {
  const stores = ledger.entries.filter(({ kind }) => kind === 'stored').map(storeOf);
  const others = ledger.entries.filter(({ kind }) => kind !== 'stored');
  return framed(
    ledger,
    stores.map(({ entry, from }) => storeLine('brought', entry, from)),
    others.map(workLine),
    stores.map(({ entry, to }) => storeLine('carried', entry, -to)),
  );
}

/**
 * Split entries by the track segments where their work was done, as a drawing shows them. What was done at no place
 * keeps a line of its own.
 */
export function splitBySegment(ledger: BookedLedger, lines: readonly AccountLine[]): AccountLine[] {
  return lines.flatMap((line) => {
    const entry = ledger.entries.find((e) => e.account === line.account && e.of === line.of && e.cause === line.cause);
    const onSegments = entry?.places.filter(({ segment }) => segment !== undefined) ?? [];
    if (line.role !== 'entry' || onSegments.length < 2) return [line];
    const parts = onSegments.map(({ on, segment, work }): AccountLine => ({ ...line, on, segment, amount: work }));
    const rest = line.amount - parts.reduce((sum, { amount }) => sum + amount, 0);
    return Math.abs(rest) > Math.max(1e-9 * Math.abs(line.amount), 1e-12 * ledger.turnover)
      ? [...parts, { ...line, amount: rest }]
      : absorb(parts, rest);
  });
}

/** The rounding of a split belongs to its greatest part, so that the parts still add up. */
function absorb(parts: AccountLine[], rest: number): AccountLine[] {
  const greatest = parts.reduce((a, b) => (Math.abs(b.amount) > Math.abs(a.amount) ? b : a));
  return parts.map((part) => (part === greatest ? { ...part, amount: part.amount + rest } : part));
}

function framed(
  ledger: BookedLedger,
  before: AccountLine[],
  entries: AccountLine[],
  after: AccountLine[],
): AccountLine[] {
  return [
    { role: 'brought', account: null, of: null, amount: ledger.kineticFrom },
    ...before,
    ...entries,
    { role: 'unbooked', account: null, of: null, amount: ledger.unbooked },
    ...after,
    { role: 'carried', account: null, of: null, amount: -ledger.kineticTo },
  ];
}

function workLine({ account, of, cause, work }: Entry): AccountLine {
  return { role: 'entry', account, of, ...(cause === undefined ? {} : { cause }), amount: work };
}

function storeLine(role: 'brought' | 'carried', { account, of }: Entry, amount: number): AccountLine {
  return { role, account, of, amount };
}

/** What a store holds at both ends; its work is their difference by definition, so that the account stays closed. */
function storeOf(entry: Entry): { entry: Entry; from: number; to: number } {
  const from = entry.account === 'gravity' ? 0 : (entry.stored?.from ?? 0);
  const to = from - entry.work;
  const level = Math.min(0, from, to);
  return { entry, from: from - level, to: to - level };
}
