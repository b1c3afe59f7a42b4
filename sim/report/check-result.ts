import type { Problem } from '../core/problem.js';
import { evaluateCriteria } from '../criteria/index.js';
import { consecutiveLedgers, handCheck, ledgerFindings } from '../ledger/index.js';
import type { Ledger } from '../ledger/index.js';
import type { Mechanism } from '../mechanism/model.js';
import type { Finding, Recording, RunEnd } from '../recording/index.js';
import { onlyFinite } from './finite.js';
import type { CheckResult, ResultFinding } from './result.js';
import { runResult } from './run-result.js';

/** All that a check found out about one file. */
export interface CheckInput {
  /** Name of the file, as the user gave it. */
  file: string;
  title: string;
  /** Nothing where the file has errors. */
  mechanism: Mechanism | null;
  /** The stepper's run; nothing where it did not run. */
  stepper: Recording | null;
  /** What reading the file found. */
  problems?: readonly Problem[];
  /** What was found before a run, such as kinds that are not simulated. */
  findings?: readonly Finding[];
}

/**
 * The result of a check, `joulewright-result/1`. Every number in it is finite: one that is not becomes 0 and a finding of
 * code `non-finite`. While no auditor runs, the verdict is `unaudited`, with a finding that says so, and the criteria are
 * judged on the stepper's run.
 */
export function checkResult(input: CheckInput): CheckResult {
  const { mechanism, stepper } = input;
  const judged = mechanism ? evaluateCriteria(mechanism, stepper) : { criteria: [], findings: [] };
  const ledgers = mechanism && stepper ? consecutiveLedgers(stepper, mechanism.system) : [];
  return onlyFinite({
    format: 'joulewright-result/1',
    file: input.file,
    title: input.title,
    verdict: 'unaudited',
    findings: [
      ...(input.problems ?? []).map(problemFinding),
      ...(input.findings ?? []),
      ...(mechanism && stepper ? runFindings(mechanism, stepper, ledgers) : []),
      ...judged.findings,
      ...(mechanism ? [UNAUDITED] : []),
    ],
    stepper: mechanism && stepper ? runResult(mechanism, stepper, ledgers) : null,
    auditor: null,
    handCheck: mechanism && stepper ? handCheck(mechanism, stepper) : [],
    criteria: judged.criteria,
  });
}

const UNAUDITED: Finding = {
  severity: 'note',
  code: 'unaudited',
  text: 'No auditor has run this mechanism: the figures are the stepper’s alone, and nothing independent agrees with them yet.',
  of: [],
};

function problemFinding({ severity, code, text, of, pointer }: Problem): ResultFinding {
  return { severity, code, text, of, pointer };
}

function runFindings(mechanism: Mechanism, recording: Recording, ledgers: readonly Ledger[]): Finding[] {
  return [
    ...ledgerFindings(recording, ledgers, mechanism.system),
    ...endFinding(recording),
    ...missedStations(mechanism, recording),
    ...(ledgers.length === 0 ? [NO_ACCOUNT] : []),
  ];
}

const NO_ACCOUNT: Finding = {
  severity: 'note',
  code: 'no-account',
  text: 'Fewer than two stations were reached, so there is no account; an account runs from one station to another.',
  of: [],
};

const ENDS: Record<Exclude<RunEnd, 'reachedEnd'>, string> = {
  stepTooSmall: 'the step it needed became too small',
  maxSteps: 'it took more steps than it may',
  nonFinite: 'a number was no longer finite; the last good state is the last one recorded',
  noSolution: 'the forces at a contact have no solution',
  eventsAccumulate: 'impacts followed each other without end',
  timeBudget: 'its time budget was spent',
  cancelled: 'it was halted',
  notSimulated: 'the mechanism has a kind that is not simulated yet',
};

/** A run that did not come to its end is an error: what is reported is the part that was run. */
function endFinding({ end, solver, rows, rowCount, layout }: Recording): Finding[] {
  if (end === 'reachedEnd') return [];
  const at = rowCount > 0 ? rows[(rowCount - 1) * layout.width] : 0;
  const text = `The ${solver} stopped at ${Number(at.toPrecision(4))} s, before the end of the run: ${ENDS[end]}.`;
  return [{ severity: 'error', code: 'run-stopped', text, of: [], at }];
}

function missedStations({ stations }: Mechanism, { events }: Recording): Finding[] {
  const reached = new Set(events.map((event) => (event.kind === 'station' ? event.station : null)));
  return stations
    .filter(({ id }) => !reached.has(id))
    .map(({ id }) => {
      const text = `Station ${id} was not reached before the end of the run.`;
      return { severity: 'warning', code: 'station-not-reached', text, of: [id] };
    });
}
