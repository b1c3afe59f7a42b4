import { quantityKinds, type QuantityName } from './dimension.js';
import { toDouble } from './exact.js';
import { readUnit } from './unit.js';

/** An SI value in a unit of the table. @throws RangeError where the unit is not known */
export function inUnit(value: number, unit: string): number {
  const read = readUnit(unit);
  if (!read.ok) throw new RangeError(`"${unit}" is no unit of the table.`);
  return value / toDouble(read.unit.factor);
}

/** The unit of the kind in which a value is easily read: the greatest in which it is at least 1, or the least. */
export function displayUnit(value: number, kind: QuantityName): string {
  const { display } = quantityKinds[kind];
  const size = Math.abs(value);
  if (size === 0) return quantityKinds[kind].si === '' ? '' : display[Math.min(1, display.length - 1)];
  return display.findLast((unit) => inUnit(size, unit) >= 1 - 1e-12) ?? display[0];
}

/** A value with a unit as a person would write it: "25 mm", "12.5 N/mm". */
export function formatQuantity(
  value: number,
  kind: QuantityName,
  options: { unit?: string; digits?: number } = {},
): string {
  const { unit = displayUnit(value, kind), digits = 6 } = options;
  const number = plainNumber(inUnit(value, unit), digits);
  return unit === '' ? number : `${number} ${unit}`;
}

/** So many significant digits, without trailing zeros; a true minus is left to the page. */
function plainNumber(value: number, digits: number): string {
  const rounded = Number(value.toPrecision(digits));
  return String(rounded === 0 ? 0 : rounded);
}
