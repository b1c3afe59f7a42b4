import { compensatedSum } from '../core/sum.js';
import type { AccountName } from '../recording/index.js';
import type { AccountLine, AccountView } from './account-lines.js';
import { asStored, asWork, splitBySegment } from './account-lines.js';
import type { BookedLedger } from './ledger.js';
import { apportion, roundHalfUp } from './rounding.js';

/** The unit an account is printed in, and how many decimals. */
export interface PrintScale {
  unit: string;
  /** [J] of one unit. */
  joules: number;
  decimals: number;
}

/** A line as printed: an amount above or equal to nil on one of the two sides, and the digits it is printed with. */
export interface PageLine extends Omit<AccountLine, 'amount'> {
  /** [J], not rounded; positive. */
  amount: number;
  /** In `unit`s, rounded so that each side adds up in print. */
  printed: string;
}

/** An account between two stations as a two-sided page. The printed lines of each side add up to the printed total. */
export interface AccountPage {
  from: string;
  to: string;
  scale: PrintScale;
  received: PageLine[];
  paidOut: PageLine[];
  total: string;
}

export interface PageOptions {
  view?: AccountView;
  scale?: PrintScale;
  /** Split entries by track segment. */
  split?: boolean;
}

/** Each unit and the least total it is used for [J]. */
const UNITS: readonly { unit: string; joules: number; from: number }[] = [
  { unit: 'kJ', joules: 1e3, from: 1e4 },
  { unit: 'J', joules: 1, from: 1 },
  { unit: 'mJ', joules: 1e-3, from: 1e-3 },
  { unit: 'µJ', joules: 1e-6, from: 1e-6 },
  { unit: 'nJ', joules: 1e-9, from: 0 },
];
const DECIMALS = 3;

/** One scale for all pages of a report, so that what one carries forward is printed as the next brings it forward. */
export function scaleOf(ledgers: readonly BookedLedger[]): PrintScale {
  const greatest = Math.max(0, ...ledgers.map((ledger) => totalOf(asStored(ledger), Infinity)));
  const fitting = UNITS.find(({ from }) => greatest >= from);
  const { unit, joules } = greatest > 0 && fitting ? fitting : UNITS[1];
  return { unit, joules, decimals: DECIMALS };
}

/**
 * Set out a ledger as an account with two sides. Energy there at the first station and works done on the bodies inside
 * are received; works taken from them and the energy left at the second station are paid out, whatever is nil too.
 * Roundings are chosen so that the printed lines add up; should they be unable to, a `rounding` line shows it.
 */
export function accountPage(ledger: BookedLedger, options: PageOptions = {}): AccountPage {
  const scale = options.scale ?? scaleOf([ledger]);
  const lines = options.view === 'stored' ? asStored(ledger) : asWork(ledger);
  const split = options.split ? splitBySegment(ledger, lines) : lines;
  const digits = scale.joules / 10 ** scale.decimals;
  const total = roundHalfUp(totalOf(split, digits) / digits);
  const side = (lines: AccountLine[]): PageLine[] => roundSide(lines, total, scale, digits);
  return {
    from: ledger.from,
    to: ledger.to,
    scale,
    received: side(split.filter((line) => isReceived(line, digits))),
    paidOut: side(split.filter((line) => !isReceived(line, digits))),
    total: print(total, scale),
  };
}

/** Causes that as a rule give: where they did nothing, they are listed under what was received. */
const GIVERS: ReadonlySet<AccountName | null> = new Set(['gravity', 'spring', 'drive', 'load'] as const);

/** @param digits the least amount that shows in print [J]: the unbooked is paid out unless it is a gain that shows */
function isReceived({ role, account, amount }: AccountLine, digits: number): boolean {
  if (role === 'brought') return true;
  if (role === 'carried') return false;
  if (role === 'unbooked') return roundHalfUp(amount / digits) > 0;
  return amount > 0 || (amount === 0 && GIVERS.has(account));
}

/** What is received in all [J]; what is paid out is the same, as the lines add up to nil. */
function totalOf(lines: readonly AccountLine[], digits: number): number {
  return compensatedSum(lines.filter((line) => isReceived(line, digits)).map(({ amount }) => amount));
}

/**
 * Round one side to a total. Lines that other pages repeat (brought and carried forward) and the unbooked are rounded
 * each for itself; the works take up what is left.
 */
function roundSide(lines: AccountLine[], total: number, scale: PrintScale, digits: number): PageLine[] {
  const sizes = lines.map(({ amount }) => Math.abs(amount) / digits);
  const isFree = (i: number): boolean => lines[i].role === 'entry';
  const fixed = sizes.map((size, i) => (isFree(i) ? 0 : roundHalfUp(size)));
  const free = sizes.filter((_, i) => isFree(i));
  const { parts, left } = apportion(free, total - fixed.reduce((sum, part) => sum + part, 0));
  let next = 0;
  const printed = lines.map((line, i) => pageLine(line, isFree(i) ? parts[next++] : fixed[i], scale));
  return left === 0 ? printed : withRounding(printed, pageLine(ROUNDING, left, scale));
}

const ROUNDING: AccountLine = { role: 'rounding', account: null, of: null, amount: 0 };

/** The rounding stands before what is carried forward. */
function withRounding(lines: PageLine[], rounding: PageLine): PageLine[] {
  const end = lines.findIndex(({ role }) => role === 'carried');
  return end < 0 ? [...lines, rounding] : [...lines.slice(0, end), rounding, ...lines.slice(end)];
}

function pageLine(line: AccountLine, units: number, scale: PrintScale): PageLine {
  return { ...line, amount: Math.abs(line.amount), printed: print(units, scale) };
}

/** Whole last digits as a decimal number: 17305 with three decimals is 17.305. */
function print(units: number, { decimals }: PrintScale): string {
  const digits = String(Math.abs(units)).padStart(decimals + 1, '0');
  const number = decimals === 0 ? digits : `${digits.slice(0, -decimals)}.${digits.slice(-decimals)}`;
  return units < 0 ? `−${number}` : number;
}
