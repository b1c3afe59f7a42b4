import type { Recording } from '../../recording/index.js';
import { bookLedger } from '../book.js';
import type { Entry } from '../ledger.js';
import type { StationRow } from '../stations.js';
import type { CommonSpan } from './common.js';
import type { AccountFigure, SpanComparison } from './figures.js';
import { compareFigures } from './figures.js';
import type { Compared } from './scales.js';

/**
 * Each account's work between two stations in both runs. Accounts are matched by name and by what they are of, a pair in
 * either order; one that a run does not have did nothing there. `numerical` is each method's own, and is not compared.
 * A span that turns over less than 1e-3 of what the run does is one of rest, and is measured on that.
 */
export function compareAccounts(compared: Compared, { from, to }: CommonSpan): SpanComparison {
  const { stepper, auditor, mechanism, scales, least, tolerance } = compared;
  const first = worksBetween(stepper, from.stepper, to.stepper, mechanism.system);
  const second = worksBetween(auditor, from.auditor, to.auditor, mechanism.system);
  const floor = least * Math.max(first.turnover, second.turnover, least * scales.turnover);
  const named = new Map([...second.works, ...first.works]);
  const accounts = [...named].map(([key, { account, of }]): AccountFigure => {
    const [a, b] = [first, second].map(({ works }) => works.get(key)?.work ?? null);
    return { account, of, ...compareFigures(a, b, floor, tolerance) };
  });
  return { from: from.id, to: to.id, accounts };
}

/** One name for an account in both runs. */
export function accountKey({ account, of }: Pick<Entry, 'account' | 'of'>): string {
  return [account, ...(of === null ? [] : [of].flat().toSorted())].join('\n');
}

interface Works {
  turnover: number;
  works: Map<string, Pick<Entry, 'account' | 'of' | 'work'>>;
}

/** Stations that fall together may have another order in the other run: its work then counts backwards. */
function worksBetween(recording: Recording, from: StationRow, to: StationRow, system: readonly string[]): Works {
  const forwards = from.row <= to.row;
  const [early, late] = forwards ? [from, to] : [to, from];
  const span = { from: from.id, to: to.id, fromRow: early.row, toRow: late.row };
  const { entries, turnover } = bookLedger(recording, span, system, { places: false });
  const works: Works['works'] = new Map();
  for (const entry of entries) {
    if (entry.kind === 'numerical') continue;
    const key = accountKey(entry);
    const work = (works.get(key)?.work ?? 0) + (forwards ? entry.work : -entry.work);
    works.set(key, { account: entry.account, of: entry.of, work });
  }
  return { turnover, works };
}
