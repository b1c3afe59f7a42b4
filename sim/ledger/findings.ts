import type { Finding, NumericalCause, Recording } from '../recording/index.js';
import { bookLedger } from './book.js';
import type { BookedLedger, Entry, Ledger } from './ledger.js';

/** A ledger is open when more than this share of its turnover is unbooked. */
export const CLOSURE_LIMIT = 1e-9;

/** The greatest share of the turnover that the method itself may make or lose, by each cause and in all. */
export const NUMERICAL_LIMIT = 5e-3;

/** Between stations where nearly nothing happens, shares are of this share of the whole run's turnover. */
const QUIET = 1e-6;

const CAUSES: Record<NumericalCause, string> = {
  'force-truncation': 'the length of its steps',
  'solver-residual': 'what its contact solver left unsolved',
  'velocity-projection': 'turning velocities back onto the joints',
  'position-projection': 'moving bodies back onto joints and tracks',
  clamp: 'its limit on how far a body moves in a step',
};

/** Whether the accounts of a ledger explain its change of kinetic energy, to rounding. */
export function closes({ unbooked, turnover, resolution }: Ledger): boolean {
  return Math.abs(unbooked) <= Math.max(CLOSURE_LIMIT * turnover, resolution);
}

/**
 * What the method made or lost, Σ|work| of the numerical entries over the turnover; 0 where there is neither.
 *
 * @param run turnover of a whole run [J]: a span in which nearly nothing happens is then measured on 1e-6 of it
 */
export function numericalShare(ledger: BookedLedger, run = 0): number {
  return shareOf(numericalEntries(ledger), Math.max(ledger.turnover, QUIET * run));
}

/**
 * What a reader of these ledgers must know: the solver's own findings, numbers that were not finite, ledgers that do not
 * close (`ledger-open`, an error) and what the method made or lost above its limit (`numerical-over-limit`, a warning).
 *
 * @param ledgers of one boundary, as `consecutiveLedgers` books them
 */
export function ledgerFindings(recording: Recording, ledgers: readonly Ledger[], system: readonly string[]): Finding[] {
  const run = runTurnover(recording, system);
  return [
    ...recording.findings,
    ...ledgers.flatMap((ledger) => ledger.findings),
    ...ledgers.filter((ledger) => !closes(ledger)).map((ledger) => openFinding(ledger, recording)),
    ...ledgers.flatMap((ledger) => numericalFindings(ledger, run, recording)),
  ];
}

function runTurnover(recording: Recording, system: readonly string[]): number {
  if (recording.rowCount === 0) return 0;
  const whole = { from: '', to: '', fromRow: 0, toRow: recording.rowCount - 1 };
  return bookLedger(recording, whole, system, { places: false }).turnover;
}

function openFinding({ from, to, unbooked, turnover }: Ledger, { solver }: Recording): Finding {
  const text =
    `The ${solver}’s account from station ${from} to ${to} does not close: ${figure(unbooked)} J of ${figure(turnover)} J turned ` +
    'over are unbooked. No account explains them, so no figure of this account can be relied on.';
  return { severity: 'error', code: 'ledger-open', text, of: [from, to] };
}

function numericalFindings(ledger: Ledger, run: number, recording: Recording): Finding[] {
  const entries = numericalEntries(ledger);
  const scale = Math.max(ledger.turnover, QUIET * run);
  const above = entries.filter((entry) => shareOf([entry], scale) > NUMERICAL_LIMIT);
  if (above.length > 0) return above.map((entry) => numericalFinding(ledger, [entry], scale, recording));
  return shareOf(entries, scale) > NUMERICAL_LIMIT ? [numericalFinding(ledger, entries, scale, recording)] : [];
}

function numericalFinding({ from, to }: Ledger, entries: Entry[], scale: number, recording: Recording): Finding {
  const work = entries.reduce((sum, entry) => sum + Math.abs(entry.work), 0);
  const did = entries.length > 1 ? 'made or lost' : entries[0].work > 0 ? 'made' : 'lost';
  const causes = entries.map(({ cause }) => CAUSES[cause as NumericalCause]).join(' and ');
  const text =
    `From station ${from} to ${to} the ${recording.solver} itself ${did} ${figure(work)} J by ${causes}: ` +
    `${figure((100 * work) / scale)} % of the turnover, where ${100 * NUMERICAL_LIMIT} % is the limit. ${remedy(recording)}`;
  return { severity: 'warning', code: 'numerical-over-limit', text, of: [from, to] };
}

function remedy({ solver, step }: Recording): string {
  if (solver === 'auditor') return 'Take a tighter tolerance.';
  return step === undefined ? 'Take a smaller step.' : `Take a smaller step; it is ${figure(step)} s now.`;
}

function numericalEntries({ entries }: BookedLedger): Entry[] {
  return entries.filter(({ kind }) => kind === 'numerical');
}

function shareOf(entries: readonly Entry[], turnover: number): number {
  const work = entries.reduce((sum, entry) => sum + Math.abs(entry.work), 0);
  return work === 0 || turnover === 0 ? 0 : work / turnover;
}

function figure(value: number): string {
  return String(Number(value.toPrecision(3)));
}
