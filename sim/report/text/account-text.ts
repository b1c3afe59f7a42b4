import type { AccountPage, AccountView, PageLine, PrintScale } from '../../ledger/index.js';
import { accountPage, lineLabel, scaleOf } from '../../ledger/index.js';
import type { CheckResult, ResultLedger } from '../result.js';
import { hanging, left, spread } from './layout.js';

/** How many causes that did nothing are named under an account. */
const NAMED_IDLE = 6;

/** Every ledger as an account with two sides, the last one first to last where there are more than two stations. */
export function accountsText({ stepper }: CheckResult, view: AccountView, width: number): string[] {
  const ledgers = stepper?.ledgers ?? [];
  const scale = scaleOf(ledgers);
  return ledgers.flatMap((ledger) => accountText(ledger, scale, view, width));
}

function accountText(ledger: ResultLedger, scale: PrintScale, view: AccountView, width: number): string[] {
  const page = accountPage(ledger, { view, scale });
  const { received, paidOut, idle } = shownLines(page);
  const half = Math.floor((width - 3) / 2);
  const sides = [received, paidOut].map((lines) =>
    lines.map((line) => amountLine(lineLabel(line), line.printed, half)),
  );
  const height = Math.max(sides[0].length, sides[1].length);
  const [first, second] = sides.map((lines, i) => ruledOff(lines, height, half, i === 1));
  return [
    '',
    spread(`Account ${ledger.from} to ${ledger.to}`, scale.unit, width),
    ruleLine('─', '┬', half, width),
    beside(left('Received', half), left('Paid out', half)),
    ruleLine('─', '┼', half, width),
    ...first.map((line, i) => beside(line, second[i])),
    ruleLine('─', '┼', half, width),
    beside(amountLine('Total', page.total, half), amountLine('Total', page.total, half)),
    ruleLine('═', '╧', half, width),
    ...idleText(idle, width),
  ];
}

/**
 * Lines that print as nil are left out, but for what must always be seen: brought and carried forward, unbooked, and the
 * account `numerical` as one line where none of its causes shows.
 */
function shownLines(page: AccountPage): { received: PageLine[]; paidOut: PageLine[]; idle: PageLine[] } {
  const isNil = ({ role, account, printed }: PageLine): boolean => {
    return Number(printed) === 0 && (role === 'entry' || (role !== 'unbooked' && account !== null));
  };
  const [received, paidOut] = [page.received, page.paidOut].map((lines) => lines.filter((line) => !isNil(line)));
  const nil = [...page.received, ...page.paidOut].filter((line) => isNil(line));
  const numerical = nil.find(({ account }) => account === 'numerical');
  const isShown = [...received, ...paidOut].some(({ account }) => account === 'numerical');
  const idle = nil.filter(({ role, account }) => role === 'entry' && account !== 'numerical');
  if (!numerical || isShown) return { received, paidOut, idle };
  const { cause: _cause, ...line } = numerical;
  const at = paidOut.findIndex(({ role }) => role === 'unbooked' || role === 'carried');
  return { received, paidOut: [...paidOut.slice(0, at), line, ...paidOut.slice(at)], idle };
}

function amountLine(label: string, printed: string, width: number): string {
  return spread(label, ` ${printed}`, width);
}

function beside(first: string, second: string): string {
  return `${first} │ ${second}`.trimEnd();
}

function ruleLine(dash: string, cross: string, half: number, width: number): string {
  return dash.repeat(half + 1) + cross + dash.repeat(width - half - 2);
}

/** Blank lines of the shorter side are ruled off with a Z, as in any account book, so that nothing can be added. */
function ruledOff(lines: string[], height: number, width: number, keepLast: boolean): string[] {
  const blank = height - lines.length;
  const head = keepLast ? lines.slice(0, -1) : lines;
  return [...head, ...zRule(blank, width), ...(keepLast ? lines.slice(-1) : [])];
}

function zRule(height: number, width: number): string[] {
  const [start, end] = [Math.floor(width / 4), Math.ceil((3 * width) / 4)];
  const line = (from: number, text: string): string => left(' '.repeat(from) + text, width);
  if (height === 1) return [line(start, '─'.repeat(end - start))];
  return Array.from({ length: height }, (_, i) => {
    const slash = Math.floor((width + height) / 2) - 1 - i;
    if (i === 0) return line(slash, `╱${'─'.repeat(Math.max(0, end - slash - 1))}`);
    return i < height - 1 ? line(slash, '╱') : line(start, `${'─'.repeat(Math.max(0, slash - start))}╱`);
  });
}

function idleText(idle: readonly PageLine[], width: number): string[] {
  if (idle.length === 0) return [];
  const names = idle.slice(0, NAMED_IDLE).map((line) => lineLabel(line));
  const more = idle.length > NAMED_IDLE ? [`and ${idle.length - NAMED_IDLE} more`] : [];
  return hanging('Nil: ', `${[...names, ...more].join(', ')}.`, width);
}
