/** A unit that a column is printed in, chosen once for all of its figures so that they can be compared. */
export interface PrintUnit {
  symbol: string;
  /** SI of one unit. */
  size: number;
  decimals: number;
}

const LENGTHS: readonly PrintUnit[] = [
  { symbol: 'm', size: 1, decimals: 3 },
  { symbol: 'mm', size: 1e-3, decimals: 1 },
  { symbol: 'µm', size: 1e-6, decimals: 1 },
];
const SPEEDS: readonly PrintUnit[] = [
  { symbol: 'm/s', size: 1, decimals: 4 },
  { symbol: 'mm/s', size: 1e-3, decimals: 2 },
];
const MASSES: readonly PrintUnit[] = [
  { symbol: 'kg', size: 1, decimals: 4 },
  { symbol: 'g', size: 1e-3, decimals: 3 },
];

/** Millimetres up to 10 m, as the drawing trade has them. */
export function lengthUnit(values: readonly number[]): PrintUnit {
  return chosen(LENGTHS, values, [10, 1e-3, 0]);
}

export function speedUnit(values: readonly number[]): PrintUnit {
  return chosen(SPEEDS, values, [0.5, 0]);
}

export function massUnit(values: readonly number[]): PrintUnit {
  return chosen(MASSES, values, [0.1, 0]);
}

/** The first unit whose least greatest value is reached; where all values are nil, the first of all. */
function chosen(units: readonly PrintUnit[], values: readonly number[], from: readonly number[]): PrintUnit {
  const greatest = Math.max(0, ...values.map(Math.abs));
  return greatest === 0 ? units[0] : units[from.findIndex((least) => greatest >= least)];
}

/** A figure in a unit, without its symbol; minus is a minus sign, and nil has none. */
export function figure(value: number, { size, decimals }: PrintUnit): string {
  const digits = (value / size).toFixed(decimals);
  return /^-0(\.0*)?$/.test(digits) ? digits.slice(1) : digits.replace('-', '−');
}

/** A figure with its symbol, for running text: three significant digits in the unit that suits it alone. */
export function time(seconds: number): string {
  if (seconds !== 0 && Math.abs(seconds) < 1e-3) return `${short(seconds / 1e-6)} µs`;
  if (seconds !== 0 && Math.abs(seconds) < 1) return `${short(seconds / 1e-3)} ms`;
  return `${short(seconds)} s`;
}

/** Three significant digits, without trailing zeros. */
export function short(value: number): string {
  return digits(value, 3);
}

/** So many significant digits, without trailing zeros. */
export function digits(value: number, count: number): string {
  return String(Number(value.toPrecision(count))).replace('-', '−');
}
