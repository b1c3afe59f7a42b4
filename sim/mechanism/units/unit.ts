import { suggest } from '../../core/suggest.js';
import { decimal, one, over, times } from './exact.js';
import { prefixPowers, unitRows } from './table.js';
import { readProduct, type Unit, type UnitResult } from './unit-product.js';

const bases: Record<string, Unit> = {
  m: { factor: one, dimension: [1, 0, 0, 0] },
  g: { factor: decimal('0.001'), dimension: [0, 1, 0, 0] },
  s: { factor: one, dimension: [0, 0, 1, 0] },
  rad: { factor: one, dimension: [0, 0, 0, 1] },
  rev: { factor: { n: 2n, d: 1n, pi: 1 }, dimension: [0, 0, 0, 1] },
};

/** Symbols that take an SI prefix. */
export const prefixedSymbols: ReadonlySet<string> = new Set([
  'm',
  'g',
  's',
  'rad',
  ...unitRows.filter((row) => row.prefixes).map((row) => row.symbol),
]);

const units = new Map<string, Unit>(Object.entries(bases));
for (const row of unitRows) units.set(row.symbol, defined(row.is));

/** A definition of the table: digits, or a fraction of digits, then a unit. */
function defined(definition: string): Unit {
  const [number, ...rest] = definition.split(' ');
  const [above, below = '1'] = number.split('/');
  const read = readUnit(rest.join(' '));
  if (!read.ok) throw new RangeError(`The table of units defines ${definition} by something not defined before it.`);
  return { factor: times(over(decimal(above), decimal(below)), read.unit.factor), dimension: read.unit.dimension };
}

/** Every symbol without a prefix, in the order of the table. */
export const unitSymbols = (): string[] => [...units.keys()];

function unitBySymbol(symbol: string): Unit | undefined {
  const plain = units.get(symbol);
  if (plain) return plain;
  for (const [prefix, exponent] of Object.entries(prefixPowers)) {
    const rest = symbol.slice(prefix.length);
    const unit = symbol.startsWith(prefix) && prefixedSymbols.has(rest) ? units.get(rest) : undefined;
    if (unit) return { factor: times(decimal(`1e${exponent}`), unit.factor), dimension: unit.dimension };
  }
  return undefined;
}

/** Reads a unit of the table, with prefixes, products, quotients and powers; an unknown one gets a suggestion. */
export function readUnit(text: string): UnitResult {
  const read = readProduct(text, unitBySymbol);
  if (read.ok || read.fault.code !== 'unknown-unit') return read;
  const near = suggest(read.fault.found, unitSymbols());
  return near ? { ok: false, fault: { ...read.fault, accepted: `a known unit; did you mean ${near}?` } } : read;
}
