import { scaleOf } from '../../ledger/index.js';
import type { CheckResult, ResultCriterion } from '../result.js';
import { columnWidth, fit, table, type Column } from './layout.js';
import { digits, figure, type PrintUnit } from './quantities.js';

/** Room for a column of joules and the gaps beside it. */
const AMOUNT = 14;

/** Units of the SI that the trade reads better in others. */
const READ_IN: Readonly<Record<string, Pick<PrintUnit, 'symbol' | 'size'>>> = {
  m: { symbol: 'mm', size: 1e-3 },
  rad: { symbol: '°', size: Math.PI / 180 },
};

/**
 * The acceptance criteria: what was measured, the limit, how much of the limit is left, whether it passes, and on whose
 * run; under them what each ratio is made of. Why one was not evaluated is among the findings.
 */
export function criteriaText({ criteria, stepper }: CheckResult, width: number): string[] {
  if (criteria.length === 0) return [];
  const units = criteria.map(unitOf);
  const passed = criteria.filter(({ passes }) => passes === true).length;
  const { unit, joules, decimals } = scaleOf(stepper?.ledgers ?? []);
  const energy = { symbol: unit, size: joules, decimals };
  const told = ({ id, name }: ResultCriterion): string => (name === undefined ? id : `${id}  ${name}`);
  const columns: Column[] = [
    { head: 'Measured', cells: criteria.map((each, i) => measured(each, units[i])), align: 'right' },
    { head: 'Limit', cells: criteria.map((each, i) => limit(each, units[i])), align: 'left' },
    { head: 'Margin', cells: criteria.map(margin), align: 'right' },
    { head: `${passed} of ${criteria.length} pass`, cells: criteria.map(outcome), align: 'left' },
    { head: 'By', cells: criteria.map(({ by }) => by ?? '–'), align: 'left' },
  ];
  const room = columns.reduce((left, column) => left - columnWidth(column) - 2, width);
  const names: Column = { head: 'Criteria', cells: criteria.map((each) => fit(told(each), room)), align: 'left' };
  return [
    '',
    ...table([names, ...columns], columns.length + 1, width),
    ...criteria.flatMap((each) => ratioText(each, energy, width)),
  ];
}

/** What a criterion is printed in. */
type Unit = Pick<PrintUnit, 'symbol' | 'size'>;

function unitOf({ unit, measure }: ResultCriterion): Unit {
  if (measure === 'efficiency' || measure === 'claimedEfficiency') return { symbol: '%', size: 0.01 };
  return READ_IN[unit] ?? { symbol: unit, size: 1 };
}

const inUnit = (value: number, { symbol, size }: Unit): string => `${digits(value / size, 4)} ${symbol}`.trimEnd();

function measured({ value }: ResultCriterion, unit: Unit): string {
  return value === null ? '–' : inUnit(value, unit);
}

function limit({ measure, atMost, atLeast, between, claimed }: ResultCriterion, unit: Unit): string {
  if (between) return `${digits(between[0] / unit.size, 4)} to ${inUnit(between[1], unit)}`;
  if (atMost !== undefined) return `≤ ${inUnit(atMost, unit)}`;
  if (atLeast !== undefined) return `≥ ${inUnit(atLeast, unit)}`;
  if (claimed !== undefined) return `claimed ${inUnit(claimed, unit)}`;
  return measure === 'reached' ? 'reached' : '';
}

function margin({ margin: left, marginShare }: ResultCriterion): string {
  if (left === undefined) return '';
  const [value, unit] = marginShare === undefined ? [left, ''] : [100 * marginShare, ' %'];
  return `${value >= 0 ? '+' : ''}${digits(value, 3)}${unit}`;
}

function outcome({ passes }: ResultCriterion): string {
  return passes === null ? 'not evaluated' : passes ? 'pass' : 'FAIL';
}

/** What a ratio is made of: what is there beside what it must pay for. */
function ratioText({ id, parts }: ResultCriterion, energy: PrintUnit, width: number): string[] {
  if (!parts) return [];
  const half = Math.floor(width / 2) - AMOUNT;
  const columnsOf = (side: 'gives' | 'takes', head: string): Column[] => {
    const lines = parts.filter((part) => part.side === side);
    const filled = [...lines, ...Array<undefined>(parts.length - lines.length).fill(undefined)];
    return [
      { head, cells: filled.map((part) => fit(part?.label ?? '', half)), align: 'left' },
      { head: energy.symbol, cells: filled.map((part) => (part ? figure(part.amount, energy) : '')), align: 'right' },
    ];
  };
  const columns = [...columnsOf('gives', `${id}: gives`), ...columnsOf('takes', 'takes')];
  return ['', ...table(columns, columns.length, width).filter((line) => line !== '')];
}
