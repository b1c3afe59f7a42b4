import { compensatedSum } from '../../core/sum.js';
import type { Entry, Ledger } from '../../ledger/index.js';
import { entriesOfAll, labelOf } from '../accounts.js';
import { figure, listed, percent } from '../figure.js';
import type { CriterionOf, MeasureKind, Measurement } from '../measurement.js';
import type { CriterionPart } from '../result.js';
import type { Rows, RunView } from '../run-view.js';
import { sourcesBeside } from '../sources.js';

/** Rounding of a ratio that is 1. */
const ROUNDING = 1e-9;

/**
 * Useful work over work put in, between two stations:
 *
 *     −Σ work of the useful accounts / Σ work of the input accounts
 *
 * Useful is what an account takes from the bodies inside the boundary: a load overcome, a weight lifted, a spring wound. A
 * drive counts with what it takes in, which its own efficiency makes more than its output. Above 1 it is none: something
 * else gave energy that the input leaves out, and which that was is the reason why it cannot be evaluated.
 */
export const efficiency: MeasureKind<'efficiency'> = {
  unit: '',
  take: (criterion, view) => view.over(criterion, (rows) => ratio(criterion, view, rows)),
};

function ratio({ useful, input }: CriterionOf<'efficiency'>, view: RunView, rows: Rows): Measurement {
  const ledger = view.ledger(rows);
  const [out, into] = [entriesOfAll(view, ledger, useful), entriesOfAll(view, ledger, input)];
  if ('reason' in out) return out;
  if ('reason' in into) return into;
  const gives = into.entries.map((entry) => part('gives', entry, entry.input ?? entry.work));
  const takes = out.entries.map((entry) => part('takes', entry, -entry.work));
  const parts = [...gives, ...takes];
  const [given, taken] = [total(gives), total(takes)];
  if (given <= 0)
    return { reason: `the input accounts put in ${figure(given)} J, so that there is nothing to share`, parts };
  const value = taken / given;
  const sources = sourcesBeside(ledger, [...into.entries, ...out.entries]);
  if (value > 1 + ROUNDING)
    return { reason: whyAbove(value, given, taken, sources, ledger), parts: [...parts, ...sources] };
  const notes = [out.note, into.note, besides(sources)].filter((note) => note !== undefined);
  return { value: Math.min(1, value), parts, ...(notes.length > 0 ? { note: notes.join(' ') } : {}) };
}

const part = (side: CriterionPart['side'], entry: Entry, amount: number): CriterionPart => {
  return { side, label: labelOf(entry), amount };
};
const total = (parts: readonly CriterionPart[]): number => compensatedSum(parts.map(({ amount }) => amount));

const given = (sources: readonly CriterionPart[]): string =>
  listed(sources.map(({ label, amount }) => `${label} (${figure(amount)} J)`));

function whyAbove(
  value: number,
  input: number,
  useful: number,
  sources: readonly CriterionPart[],
  { unbooked }: Ledger,
): string {
  const head = `useful over input is ${percent(value)}, and no efficiency is above 100 %`;
  const withAll = useful / (input + total(sources));
  if (sources.length === 0) return `${head}; no other account gave energy, and ${figure(unbooked)} J are unbooked`;
  const rest = withAll <= 1 + ROUNDING ? `, with which it is ${percent(withAll)}` : '';
  return `${head}: the input leaves out what came from ${given(sources)}${rest}`;
}

const besides = (sources: readonly CriterionPart[]): string | undefined =>
  sources.length === 0 ? undefined : `energy came from ${given(sources)} besides, which the input does not name.`;
