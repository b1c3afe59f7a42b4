import type { CriterionResult } from '../../sim/criteria/index.js';
import { figures } from '../format/quantity.js';

/** A unit that a criterion is printed in. */
interface PrintUnit {
  symbol: string;
  /** SI of one unit. */
  size: number;
}

/** The units of each SI unit, and from which size on; the first is for nil. */
const units: Record<string, readonly (PrintUnit & { from: number })[]> = {
  m: [
    { symbol: 'mm', size: 1e-3, from: 0 },
    { symbol: 'm', size: 1, from: 10 },
  ],
  s: [
    { symbol: 's', size: 1, from: 0.01 },
    { symbol: 'ms', size: 1e-3, from: 0 },
  ],
  J: [
    { symbol: 'J', size: 1, from: 0.01 },
    { symbol: 'mJ', size: 1e-3, from: 0 },
    { symbol: 'kJ', size: 1e3, from: 1e4 },
  ],
  N: [
    { symbol: 'N', size: 1, from: 0 },
    { symbol: 'kN', size: 1e3, from: 1e4 },
  ],
  W: [
    { symbol: 'W', size: 1, from: 0 },
    { symbol: 'kW', size: 1e3, from: 1e4 },
  ],
  rad: [{ symbol: '°', size: Math.PI / 180, from: 0 }],
};

const percent: PrintUnit = { symbol: '%', size: 0.01 };

/** One unit for value and limits, chosen by the greatest of them. */
export function unitOf(result: CriterionResult): PrintUnit {
  if (result.measure === 'efficiency' || result.measure === 'claimedEfficiency') return percent;
  const list = units[result.unit] ?? [{ symbol: result.unit, size: 1, from: 0 }];
  const most = Math.max(Math.abs(result.value ?? 0), ...limitsOf(result).map(Math.abs));
  const fitting = list.filter(({ from }) => most >= from).sort((a, b) => b.from - a.from);
  return most === 0 ? list[0] : fitting[0];
}

/** All numbers that the value is held against, in SI. */
export function limitsOf({ atMost, atLeast, between, claimed }: CriterionResult): number[] {
  return [atMost, atLeast, ...(between ?? []), claimed].filter((limit) => limit !== undefined);
}

/** The value to four figures, or as many as tell on which side of its limits it is. */
export function valueText(result: CriterionResult): string {
  const { value } = result;
  if (value === null) return '–';
  const { symbol, size } = unitOf(result);
  const onSides = (given: number) =>
    limitsOf(result)
      .map((limit) => Math.sign(given - limit))
      .join();
  const digits = [4, 5, 6, 7, 8].find((count) => {
    const printed = Number((value / size).toPrecision(count)) * size;
    return onSides(printed) === onSides(value) || limitsOf(result).some((limit) => isSame(limit, value));
  });
  return `${figures(value / size, digits ?? 8)} ${symbol}`.trim();
}

const isSame = (a: number, b: number) => Math.abs(a - b) <= 1e-9 * Math.abs(a);

export function limitText(result: CriterionResult): string {
  const { size } = unitOf(result);
  const print = (limit: number) => figures(limit / size, 4);
  const { atMost, atLeast, between, claimed } = result;
  if (between) return `${print(between[0])} to ${print(between[1])}`;
  if (atMost !== undefined) return `≤ ${print(atMost)}`;
  if (atLeast !== undefined) return `≥ ${print(atLeast)}`;
  if (claimed !== undefined) return `claimed ${print(claimed)}`;
  return result.measure === 'reached' ? 'reached' : '';
}

/** The outcome in a word; what could not be judged counts as failed. */
export function outcomeWord({ passes, by }: CriterionResult): string {
  if (by === null) return 'not run';
  return passes === null ? 'no value' : passes ? 'pass' : 'fail';
}

/** What is measured, in words, where the document gives the criterion no name: `peakForce` is "Peak force". */
export function measureWords({ measure }: CriterionResult): string {
  const words = measure.replace(/[A-Z]/g, (letter) => ` ${letter.toLowerCase()}`);
  return words[0].toUpperCase() + words.slice(1);
}
