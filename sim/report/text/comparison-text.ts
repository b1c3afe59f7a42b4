import type { Quantity } from '../../ledger/index.js';
import { ACCOUNT_NAMES, ofLabel, QUANTITIES, scaleOf } from '../../ledger/index.js';
import type { ResultAccount, ResultComparison, ResultFigure } from '../comparison-result.js';
import type { CheckResult } from '../result.js';
import { table, type Column } from './layout.js';
import { figure, lengthUnit, massUnit, short, speedUnit, type PrintUnit } from './quantities.js';

/** A difference below this is printed as below it: it tells nothing of the runs. */
const LEAST_PERCENT = 0.001;

/** One line of the three columns. */
interface Line {
  mark: string;
  place: string;
  what: string;
  stepper: string;
  auditor: string;
  hand: string;
  difference: string;
  share: string;
}

/**
 * Stepper, auditor and hand check beside each other: at each station, and then the accounts from the first to the last.
 * A line that is not within tolerance has the mark of the verdict.
 */
export function comparisonText(result: CheckResult, width: number): string[] {
  const { comparison } = result;
  if (!comparison || comparison.stations.length === 0) return [];
  const tolerance = `tolerance ${short(100 * comparison.tolerance)} %`;
  return [
    '',
    ...linesTable(`Compared, ${tolerance}`, stationLines(result, comparison), width),
    ...accountTables(result, comparison, width),
  ];
}

function stationLines(result: CheckResult, { stations }: ResultComparison): Line[] {
  const figures = stations.flatMap((station) => station.figures);
  return stations.flatMap(({ station, figures: at }) =>
    at.filter(isShown).map((each) => {
      const unit = unitOf(each.quantity, figures);
      const name = [QUANTITIES[each.quantity].name, each.of].filter(Boolean).join(' ');
      return lineOf(station, `${name}, ${unit.symbol}`, each, unit, handOf(result, station, each, unit));
    }),
  );
}

/** What a reader compares: instants, speeds and touches; places, angles and spins where they part. */
function isShown({ quantity, within }: ResultFigure): boolean {
  return (
    !within ||
    quantity === 'time' ||
    quantity === 'speed' ||
    quantity === 'approachSpeed' ||
    quantity === 'effectiveMass'
  );
}

/** The hand check gives the speed of a body at the second of its stations. */
function handOf({ handCheck }: CheckResult, station: string, { quantity, of }: ResultFigure, unit: PrintUnit): string {
  if (quantity !== 'speed') return '';
  const speed = handCheck.find((each) => each.to === station && each.of === of)?.speed;
  return typeof speed === 'number' ? figure(speed, unit) : '';
}

function unitOf(quantity: Quantity, figures: readonly ResultFigure[]): PrintUnit {
  const values = figures
    .filter((each) => each.quantity === quantity)
    .flatMap(({ stepper, auditor }) => [stepper, auditor].map((value) => value ?? 0));
  if (quantity === 'x' || quantity === 'y') return lengthUnit(values);
  if (quantity === 'speed' || quantity === 'approachSpeed') return speedUnit(values);
  if (quantity === 'effectiveMass') return massUnit(values);
  return { symbol: QUANTITIES[quantity].unit, size: 1, decimals: quantity === 'spin' ? 3 : 4 };
}

/** The whole of the way, and each stretch of it in which an account parts. */
function accountTables(result: CheckResult, { spans }: ResultComparison, width: number): string[] {
  const { unit, joules, decimals } = scaleOf(result.stepper?.ledgers ?? []);
  const energy = { symbol: unit, size: joules, decimals };
  const shown = spans.filter(({ accounts }, i) => i === spans.length - 1 || accounts.some(({ within }) => !within));
  return shown.flatMap(({ from, to, accounts }) => {
    const lines = accounts
      .filter((each) => !each.within || !isNil(each, energy))
      .map((each) => lineOf('', `${accountLabel(each)}, ${unit}`, each, energy, ''));
    return lines.length === 0 ? [] : ['', ...linesTable(`Work, ${from} to ${to}`, lines, width)];
  });
}

function accountLabel({ account, of }: ResultAccount): string {
  const name = ACCOUNT_NAMES[account as keyof typeof ACCOUNT_NAMES] ?? account;
  return [name, ofLabel(of)].filter(Boolean).join(' ');
}

function isNil({ stepper, auditor }: ResultAccount, unit: PrintUnit): boolean {
  const values = [stepper, auditor].map((value) => Math.abs(value ?? 0));
  return values.every((value) => Number(figure(value, unit)) === 0);
}

function lineOf(place: string, what: string, of: ResultFigure | ResultAccount, unit: PrintUnit, hand: string): Line {
  const print = (value: number | null): string => (value === null ? '–' : figure(value, unit));
  return {
    mark: of.within ? '' : '≠',
    place,
    what,
    stepper: print(of.stepper),
    auditor: print(of.auditor),
    hand: hand === '' ? '–' : hand,
    difference: isTold(of.share) ? short(of.difference / unit.size) : figure(of.difference, unit),
    share: percent(of.share),
  };
}

function isTold(share: number): boolean {
  return 100 * share >= LEAST_PERCENT;
}

function percent(share: number): string {
  return share === 0 || isTold(share) ? short(100 * share) : `< ${LEAST_PERCENT}`;
}

function linesTable(head: string, lines: readonly Line[], width: number): string[] {
  const column = (title: string, key: keyof Line, align: Column['align']): Column => {
    return { head: title, cells: lines.map((line) => line[key]), align };
  };
  const hasPlaces = lines.some(({ place }) => place !== '');
  const named = lines.map(({ place, what }, i) => {
    const isFirst = i === 0 || lines[i - 1].place !== place;
    return { place: isFirst ? place : '', what };
  });
  const naming: Column[] = [
    { head: ' ', cells: lines.map(({ mark }) => mark), align: 'left' },
    ...(hasPlaces ? [{ head: 'At', cells: named.map(({ place }) => place), align: 'left' as const }] : []),
    { head, cells: named.map(({ what }) => what), align: 'left' },
  ];
  const figures = [
    column('Stepper', 'stepper', 'right'),
    column('Auditor', 'auditor', 'right'),
    ...(hasPlaces ? [column('Hand', 'hand', 'right')] : []),
    column('Difference', 'difference', 'right'),
    column('%', 'share', 'right'),
  ];
  return table([...naming, ...figures], naming.length, width);
}
