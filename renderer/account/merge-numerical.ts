import type { Entry, Ledger } from '../../sim/ledger/index.js';

/** A ledger with the causes of `numerical` as one entry, for the page; the causes stay in the ledger itself. */
export function mergeNumerical(ledger: Ledger): Ledger {
  const causes = ledger.entries.filter(({ account }) => account === 'numerical');
  if (causes.length < 2) return ledger;
  const { cause: _, ...first } = causes[0];
  const merged: Entry = {
    ...first,
    work: causes.reduce((sum, { work }) => sum + work, 0),
    heat: causes.reduce((sum, { heat }) => sum + heat, 0),
    byBody: sumOf(causes.map(({ byBody }) => byBody)),
    places: causes.flatMap(({ places }) => places),
  };
  return { ...ledger, entries: [...ledger.entries.filter(({ account }) => account !== 'numerical'), merged] };
}

function sumOf(parts: readonly Record<string, number>[]): Record<string, number> {
  const sum: Record<string, number> = {};
  for (const [body, work] of parts.flatMap((part) => Object.entries(part))) sum[body] = (sum[body] ?? 0) + work;
  return sum;
}
