import type { Mechanism } from '../mechanism/model.js';
import type { Finding, Recording } from '../recording/index.js';
import { compareStation } from './comparison/at-station.js';
import { compareAccounts } from './comparison/between.js';
import { commonSpans, commonStations, oneSidedStations, type OneSided } from './comparison/common.js';
import { offDocument, type OffDocument } from './comparison/document-check.js';
import type { Role, SpanComparison, StationComparison } from './comparison/figures.js';
import { partingOf, type Parting } from './comparison/parting.js';
import { impactsTogether, remediesFor, type Remedy, type Together } from './comparison/remedies.js';
import { scalesOf, wholeTurnover, type Compared } from './comparison/scales.js';
import {
  nothingCompared,
  offDocumentFinding,
  oneSidedFinding,
  partingFindings,
  remedyFinding,
} from './comparison/words.js';
import { closes, numericalShare, NUMERICAL_LIMIT } from './findings.js';
import { bookLedger } from './book.js';
import { stationRows, stationSpans } from './stations.js';

/** The greatest share by which two runs that agree may differ. */
export const AGREEMENT = 5e-3;

/** A figure below this share of its scale is compared on that, as the contract has it. */
const LEAST = 1e-3;

export type Verdict = 'agrees' | 'differs' | 'unaudited';

/** Two runs of one mechanism beside each other. */
export interface Comparison {
  verdict: Verdict;
  tolerance: number;
  /** At every station both reached, by the auditor's time. */
  stations: StationComparison[];
  /** Between each two of them, and from first to last where there are more than two. */
  spans: SpanComparison[];
  oneSided: OneSided[];
  /** Whether the accounts of each run close. */
  closed: Record<Role, boolean>;
  /** What each method itself made or lost, at worst, as a share of the turnover. */
  numerical: Record<Role, number>;
  /** Where they part; nothing where all figures are within tolerance. */
  parting: Parting | null;
  /** What a run had otherwise than the document. */
  off: OffDocument[];
  /** The first instant at which several pairs strike at once. */
  together: Together | null;
  remedies: Remedy[];
  findings: Finding[];
}

/** Whether it is worth running the mechanism from a start a hair away: the runs part for no known reason, or may. */
export function mayBeSensitive({ off, parting, oneSided, together }: Comparison): boolean {
  return off.length === 0 && (parting !== null || oneSided.length > 0 || together !== null);
}

export interface ComparisonOptions {
  /** Greatest share that counts as agreement; default `AGREEMENT`. */
  tolerance?: number;
}

/**
 * Compare the runs of two solvers: at every station both reached, time, places, speeds, spins and the touch; between
 * stations each account's work on the bodies inside the boundary.
 *
 *     share = |stepper − auditor| / max(|stepper|, |auditor|, 1e-3 of the scale)
 *
 * with the greatest speed of either run, the mechanism's extent, and the turnover between the stations as scales. The
 * verdict is `agrees` where every share is within tolerance, no station was reached by one run alone, both runs have the
 * document's masses and potentials, both accounts close, and `numerical` is below its limit in both; `differs` where one
 * of these fails; `unaudited` where none fails, but one run stopped before its end or there was nothing to compare.
 *
 * @param stepper the run to be judged
 * @param auditor the independent run that judges it; which solvers made the two is not looked at
 */
export function compareRuns(
  mechanism: Mechanism,
  stepper: Recording,
  auditor: Recording,
  options: ComparisonOptions = {},
): Comparison {
  const tolerance = options.tolerance ?? AGREEMENT;
  const scales = scalesOf(mechanism, [stepper, auditor]);
  const compared: Compared = { mechanism, stepper, auditor, scales, least: LEAST, tolerance };
  const common = commonStations(stepper, auditor);
  const stations = common.map((station) => compareStation(compared, station));
  const spans = commonSpans(common).map((span) => ({ span, comparison: compareAccounts(compared, span) }));
  const parting = partingOf(compared, stations, spans);
  const off = offDocument(
    compared,
    spans.map(({ span }) => span),
  );
  const oneSided = oneSidedStations(stepper, auditor).filter((station) => isTelling(compared, station));
  const books = { stepper: booksOf(mechanism, stepper), auditor: booksOf(mechanism, auditor) };
  const together = impactsTogether(compared);
  const found = { numerical: books.stepper.numerical / NUMERICAL_LIMIT, together };
  const remedies = off.length === 0 ? remediesFor(compared, common, parting, found) : [];
  const isDifferent = parting !== null || off.length > 0 || oneSided.length > 0 || !Object.values(books).every(isSound);
  const isWhole = stepper.end === 'reachedEnd' && auditor.end === 'reachedEnd' && common.length > 0;
  return {
    verdict: isDifferent ? 'differs' : isWhole ? 'agrees' : 'unaudited',
    tolerance,
    stations,
    spans: spans.map(({ comparison }) => comparison),
    oneSided,
    closed: { stepper: books.stepper.closed, auditor: books.auditor.closed },
    numerical: { stepper: books.stepper.numerical, auditor: books.auditor.numerical },
    parting,
    off,
    together,
    remedies,
    findings: [
      ...(parting ? partingFindings(parting, common.find(({ id }) => id === parting.station)?.auditor.time ?? 0) : []),
      ...oneSided.map(oneSidedFinding),
      ...off.map(offDocumentFinding),
      ...remedies.map(remedyFinding),
      ...(common.length === 0 ? [nothingCompared()] : []),
    ],
  };
}

/**
 * Whether a station that one run alone reached is a difference: not where the other had stopped by then, nor so near the
 * end of the run that the other may be within tolerance of reaching it.
 */
function isTelling({ stepper, auditor, scales, tolerance }: Compared, { reachedBy, time }: OneSided): boolean {
  const other = reachedBy === 'stepper' ? auditor : stepper;
  const end = other.rowCount === 0 ? 0 : other.rows[(other.rowCount - 1) * other.layout.width];
  return other.end === 'reachedEnd' ? time < scales.duration * (1 - tolerance) : time < end * (1 - tolerance);
}

interface Books {
  closed: boolean;
  numerical: number;
}

const isSound = ({ closed, numerical }: Books): boolean => closed && numerical <= NUMERICAL_LIMIT;

function booksOf({ system }: Mechanism, recording: Recording): Books {
  const run = wholeTurnover(recording, system);
  const spans = stationSpans(stationRows(recording));
  const ledgers = spans.map((span) => bookLedger(recording, span, system, { places: false }));
  return {
    closed: ledgers.every((ledger) => closes(ledger) && ledger.findings.length === 0),
    numerical: Math.max(0, ...ledgers.map((ledger) => numericalShare(ledger, run))),
  };
}
