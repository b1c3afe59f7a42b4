import { apportion, roundHalfUp } from '../rounding.js';
import { number, type Token } from './tokens.js';

/** Quantities that a hand check prints. */
export type Quantity =
  | 'mass'
  | 'length'
  | 'speed'
  | 'spin'
  | 'angle'
  | 'slope'
  | 'inertia'
  | 'force'
  | 'torque'
  | 'rate'
  | 'angular-rate'
  | 'acceleration'
  | 'ratio';

interface Unit {
  symbol?: string;
  size: number;
  /** Used from this value in SI upwards. */
  from: number;
}

const UNITS: Record<Quantity, readonly Unit[]> = {
  mass: [
    { symbol: 'kg', size: 1, from: 0.1 },
    { symbol: 'g', size: 1e-3, from: 0 },
  ],
  length: [
    { symbol: 'm', size: 1, from: 1 },
    { symbol: 'mm', size: 1e-3, from: 1e-4 },
    { symbol: 'µm', size: 1e-6, from: 0 },
  ],
  speed: [
    { symbol: 'm/s', size: 1, from: 0.01 },
    { symbol: 'mm/s', size: 1e-3, from: 0 },
  ],
  spin: [{ symbol: 'rad/s', size: 1, from: 0 }],
  angle: [{ symbol: 'rad', size: 1, from: 0 }],
  slope: [{ symbol: '°', size: Math.PI / 180, from: 0 }],
  inertia: [{ symbol: 'kg m²', size: 1, from: 0 }],
  force: [
    { symbol: 'kN', size: 1e3, from: 1e4 },
    { symbol: 'N', size: 1, from: 0 },
  ],
  torque: [{ symbol: 'N m', size: 1, from: 0 }],
  rate: [
    { symbol: 'N/mm', size: 1e3, from: 1e3 },
    { symbol: 'N/m', size: 1, from: 0 },
  ],
  'angular-rate': [{ symbol: 'N m/rad', size: 1, from: 0 }],
  acceleration: [{ symbol: 'm/s²', size: 1, from: 0 }],
  ratio: [{ size: 1, from: 0 }],
};

/** A quantity in the unit that suits it, to four significant figures. */
export function quantity(value: number, kind: Quantity): Token {
  const units = UNITS[kind];
  const { symbol, size } = value === 0 ? units[0] : (units.find(({ from }) => Math.abs(value) >= from) ?? units[0]);
  return number(fourFigures(value / size), symbol);
}

/** Four significant figures without an exponent; a shorter number stays as it is typed. */
export function fourFigures(value: number): string {
  const rounded = Number(value.toPrecision(4));
  const isTyped = Math.abs(value - rounded) <= 1e-6 * Math.abs(value);
  const decimals = Math.min(12, Math.max(0, 3 - Math.floor(Math.log10(Math.abs(rounded || 1)))));
  const text = rounded.toFixed(decimals);
  return (isTyped && decimals > 0 ? text.replace(/\.?0+$/, '') : text).replace('-', '−');
}

/** Unit and decimals in which the amounts of one sum are printed. */
interface SumScale {
  unit: string;
  joules: number;
  decimals: number;
}

/** Four figures of the result, and four or five of the greatest amount, so that no amount is falsely exact. */
export function sumScale(amounts: readonly number[], result: number): SumScale {
  const greatest = Math.max(...amounts.map(Math.abs), Math.abs(result));
  const [unit, joules] =
    greatest >= 1e4
      ? ['kJ', 1e3]
      : greatest >= 0.1 || greatest === 0
        ? ['J', 1]
        : greatest >= 1e-4
          ? ['mJ', 1e-3]
          : ['µJ', 1e-6];
  const figures = (value: number): number => 3 - Math.floor(Math.log10(value / joules));
  const most = greatest === 0 ? 3 : figures(greatest);
  const wished = result === 0 ? most : figures(Math.abs(result));
  return { unit, joules, decimals: Math.min(9, Math.max(0, most, Math.min(wished, most + 1))) };
}

/** Amounts and their total rounded so that the printed ones add up to the printed total; `left` is what cannot. */
export function printedSum(
  amounts: readonly number[],
  scale: SumScale,
): { amounts: number[]; total: number; left: number } {
  const least = scale.joules / 10 ** scale.decimals;
  const total = roundHalfUp(amounts.reduce((whole, amount) => whole + amount, 0) / least);
  const { parts, left } = apportion(
    amounts.map((amount) => amount / least),
    total,
  );
  return { amounts: parts, total, left };
}

/** A whole number of last digits as a figure of the scale. */
export function printed(count: number, { decimals }: SumScale): string {
  return (count / 10 ** decimals).toFixed(decimals).replace('-', '−');
}
