import {
  asWork,
  compareFigures,
  splitBySegment,
  type AccountFigure,
  type AccountLine,
  type AccountPage,
  type Figure,
  type Ledger,
  type PageLine,
} from '../../sim/ledger/index.js';
import { lineKey } from '../account/line-key.js';
import { mergeEntries } from '../account/merge-entries.js';

/** A printed line, as both solvers have it. */
export interface ComparedLine {
  line: PageLine;
  /** Of its whole account: what the contract compares. */
  figure: Figure;
  /** Whether this part of the account is the same too. Rows tell parts apart only as finely as they were recorded. */
  isSamePart: boolean;
}

/**
 * Entries below this share of the turnover are compared on it, as the contract has it; a page that turns over less than
 * this share of the run is one of rest, and is measured on that.
 */
const least = 1e-3;

/**
 * The printed lines of a page in both ledgers, by their key. A line that sums accounts is not within tolerance while one
 * of those differs.
 *
 * @param parted accounts of the page that differ
 * @param ofRun what the whole run turns over [J]
 */
export function compareLines(
  ledgers: readonly [stepper: Ledger, auditor: Ledger],
  { received, paidOut }: AccountPage,
  parted: readonly AccountFigure[],
  { ofRun, tolerance }: { ofRun: number; tolerance: number },
): Map<string, ComparedLine> {
  const [wholes, parts] = [ledgers.map(wholeLines), ledgers.map(partLines)];
  const floor = least * Math.max(...ledgers.map(({ turnover }) => turnover), least * ofRun);
  const compare = (lines: readonly Map<string, AccountLine>[], key: string) => {
    const [a, b] = lines.map((each) => each.get(key)?.amount ?? null);
    return compareFigures(a, b, floor, tolerance);
  };
  const compared = [...received, ...paidOut].filter(isCompared).map((line): [string, ComparedLine] => {
    const figure = compare(wholes, bothKey({ ...line, segment: undefined }));
    const isParted = parted.some(({ account, of }) => account === line.account && isOf(line, of));
    const within = figure.within && !isParted;
    const isSamePart = line.segment === undefined || compare(parts, bothKey(line)).within;
    return [lineKey(line), { line, figure: { ...figure, within }, isSamePart }];
  });
  return new Map(compared);
}

function wholeLines(ledger: Ledger): Map<string, AccountLine> {
  return new Map(asWork(mergeEntries(ledger)).map((line) => [bothKey(line), line]));
}

function partLines(ledger: Ledger): Map<string, AccountLine> {
  const merged = mergeEntries(ledger);
  return new Map(splitBySegment(merged, asWork(merged)).map((line) => [bothKey(line), line]));
}

/** The key of a line whose pair either solver may have the other way round. */
function bothKey(line: Omit<AccountLine, 'segment'> & { segment?: number | undefined }): string {
  const { of } = line;
  return lineKey({ ...line, of: Array.isArray(of) && of[0] > of[1] ? [of[1], of[0]] : of });
}

/** Both solvers make up the frame and every account; what is numerical or unbooked is each one's own. */
const isCompared = ({ role, account }: PageLine) =>
  role !== 'unbooked' && role !== 'rounding' && account !== 'numerical';

/** Whether a line is that of an account: the same elements in either order, or all of its name. */
export function isOf(line: Pick<PageLine, 'of'>, of: PageLine['of']): boolean {
  return line.of === null || [line.of].flat().toSorted().join() === [of ?? ''].flat().toSorted().join();
}
