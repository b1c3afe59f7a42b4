import { ledgerFindings } from '../ledger/index.js';
import type { Mechanism } from '../mechanism/model.js';
import type { Finding, Recording, RunEnd } from '../recording/index.js';
import type { BookedRun } from './booked-run.js';

/** What a reader must know of the runs: of each its own findings, its accounts and how it ended, and what both missed. */
export function runsFindings(mechanism: Mechanism, runs: readonly BookedRun[]): Finding[] {
  if (runs.length === 0) return [];
  const recordings = runs.map(({ recording }) => recording);
  return [...runs.flatMap((run) => runFindings(mechanism, run)), ...missedStations(mechanism, recordings)];
}

function runFindings({ system }: Mechanism, { recording, ledgers }: BookedRun): Finding[] {
  return [
    ...ledgerFindings(recording, ledgers, system),
    ...endFinding(recording),
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

/** Stations that none of the runs reached. */
function missedStations({ stations }: Mechanism, runs: readonly Recording[]): Finding[] {
  const events = runs.flatMap((run) => run.events);
  const reached = new Set(events.map((event) => (event.kind === 'station' ? event.station : null)));
  return stations
    .filter(({ id }) => !reached.has(id))
    .map(({ id }) => {
      const text = `Station ${id} was not reached before the end of the run.`;
      return { severity: 'warning', code: 'station-not-reached', text, of: [id] };
    });
}

/** Findings that two runs share, once. */
export function distinct(findings: readonly Finding[]): Finding[] {
  const texts = findings.map(({ code, text }) => `${code} ${text}`);
  return findings.filter((_, i) => texts.indexOf(texts[i]) === i);
}
