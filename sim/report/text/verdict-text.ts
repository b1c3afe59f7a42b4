import { accountPage, numericalShare, scaleOf } from '../../ledger/index.js';
import type { CheckResult, ResultLedger } from '../result.js';
import { spread } from './layout.js';
import { short } from './quantities.js';

/** A share below this is printed as below it. */
const LEAST_PERCENT = 0.001;

const MARKS = { agrees: '=', differs: '≠', unaudited: ' ' };
const WORDS = {
  agrees: ['Agrees', 'stepper and auditor'],
  differs: ['Differs', 'stepper against auditor'],
  unaudited: ['Unaudited', 'the stepper alone'],
};

/**
 * The corner of the title block: the verdict's mark in its box, dashed while nothing has audited the run; beside it what
 * is unbooked and what the method made, at worst.
 */
export function verdictText({ verdict, stepper, auditor }: CheckResult, width: number): string[] {
  const [top, side, bottom] = verdict === 'unaudited' ? ['┌╌╌╌┐', '╎', '└╌╌╌┘'] : ['┌───┐', '│', '└───┘'];
  const [word, who] = stepper ? WORDS[verdict] : ['Unaudited', auditor ? 'the auditor alone' : 'not run'];
  const ledgers = stepper?.ledgers ?? [];
  const figures = ledgers.length === 0 ? ['', ''] : [unbooked(ledgers), numerical(ledgers)];
  return [
    '',
    top,
    spread(`${side} ${MARKS[verdict]} ${side}  ${word}, ${who}`, figures.filter(Boolean).join(' · '), width).trimEnd(),
    bottom,
  ];
}

function unbooked(ledgers: readonly ResultLedger[]): string {
  const worst = ledgers.reduce((a, b) => (Math.abs(b.unbooked) > Math.abs(a.unbooked) ? b : a));
  const scale = scaleOf(ledgers);
  const page = accountPage(worst, { scale });
  const line = [...page.received, ...page.paidOut].find(({ role }) => role === 'unbooked');
  return `Unbooked ${line?.printed ?? ''} ${scale.unit}`;
}

function numerical(ledgers: readonly ResultLedger[]): string {
  const run = Math.max(...ledgers.map(({ turnover }) => turnover));
  const percent = 100 * Math.max(...ledgers.map((ledger) => numericalShare(ledger, run)));
  return percent > 0 && percent < LEAST_PERCENT ? `numerical < ${LEAST_PERCENT} %` : `numerical ${short(percent)} %`;
}
