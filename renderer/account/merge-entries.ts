import type { Entry, Ledger } from '../../sim/ledger/index.js';
import type { AccountName } from '../../sim/recording/recording.js';

/** Accounts that are one line on the page: one field of gravity, one method; their parts are in the entry's detail. */
const oneLine = ['gravity', 'numerical'] as const satisfies AccountName[];

/**
 * A ledger as the page prints it: gravity of all bodies is one entry and stands first; all that is numerical is one and
 * stands last, next to what is unbooked.
 */
export function mergeEntries(ledger: Ledger): Ledger {
  const named = (name: AccountName) => ledger.entries.filter(({ account }) => account === name);
  const others = ledger.entries.filter(({ account }) => !oneLine.some((name) => name === account));
  const [gravity, numerical] = oneLine.map((name) => asOne(named(name)));
  return { ...ledger, entries: [...gravity, ...others, ...numerical] };
}

function asOne(parts: readonly Entry[]): readonly Entry[] {
  return parts.length < 2 ? parts : [sumOf(parts[0], parts)];
}

function sumOf({ account, kind }: Entry, parts: readonly Entry[]): Entry {
  const byBody: Record<string, number> = {};
  for (const [body, work] of parts.flatMap((part) => Object.entries(part.byBody)))
    byBody[body] = (byBody[body] ?? 0) + work;
  return {
    account,
    of: null,
    kind,
    work: parts.reduce((sum, { work }) => sum + work, 0),
    heat: parts.reduce((sum, { heat }) => sum + heat, 0),
    byBody,
    places: parts.flatMap(({ places }) => places),
  };
}
