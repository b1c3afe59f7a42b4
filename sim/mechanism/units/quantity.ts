import { sameDimension, type Dimension } from './dimension.js';
import { decimal, one, over, plus, times, toDouble, type Exact } from './exact.js';
import type { Unit, UnitFault } from './unit-product.js';
import { readUnit } from './unit.js';

/** A quantity read from text: its value in SI, the double nearest to what was typed. */
export interface Quantity {
  value: number;
  dimension: Dimension;
  /** False for a number without a unit. */
  hasUnit: boolean;
}

export interface QuantityFault {
  code: UnitFault['code'] | 'ambiguous-number' | 'number-range';
  found: string;
  accepted: string;
}

export type QuantityResult = { ok: true; quantity: Quantity } | { ok: false; fault: QuantityFault };

/** No quantity is longer than this; it keeps the exact arithmetic short. */
const LONGEST = 120;

const wanted = 'a number with a unit, such as "25 mm", "12.5 N/mm", "1 1/2 in" or "5 ft 3 in"';

const numberAt =
  /\s*([+-]?)(?:(?:(\d+)(?: +|-))?(\d+)\/(\d+)|(\d{1,3}(?: \d{3})+(?:[.,]\d+)?|\d+(?:[.,]\d*)?|[.,]\d+)(e[+-]?\d{1,4})?)(?![.,\d])/iy;
/** A unit ends where, after a space, the next number begins. */
const unitAt = /(?:(?!\s+[+-]?[.,]?\d).)*/y;

/**
 * Reads a number with a unit: "25 mm", "3,5 mm", "1/4 in", "1 1/2 in", "5 ft 3 in", "−2 N m", "1e3 mm", "30 %".
 * A comma is a decimal mark; where it might as well group thousands ("1,500") the text is refused as ambiguous.
 */
export function readQuantity(text: string): QuantityResult {
  if (text.length > LONGEST) return fault('quantity-syntax', `${text.length} characters`, wanted);
  const plain = normalized(text);
  const terms = termsOf(plain);
  if (!Array.isArray(terms)) return { ok: false, fault: terms };
  const [first] = terms;
  if (terms.some((term) => !sameDimension(term.unit.dimension, first.unit.dimension))) {
    return fault('quantity-syntax', `"${text}"`, 'parts of one kind, as in "5 ft 3 in"');
  }
  const size = terms.map((term) => times(term.size, term.unit.factor)).reduce(plus);
  const value = toDouble(size) * first.sign;
  if (!Number.isFinite(value) || (value === 0 && size.n !== 0n)) {
    return fault('number-range', `"${text}"`, 'a size between 5e-324 and 1.8e308');
  }
  return { ok: true, quantity: { value, dimension: first.unit.dimension, hasUnit: first.hasUnit } };
}

const fault = (code: QuantityFault['code'], found: string, accepted: string): { ok: false; fault: QuantityFault } => ({
  ok: false,
  fault: { code, found, accepted },
});

/** One spelling for each sign: minus, micro, primes, spaces; feet and inches apart. */
function normalized(text: string): string {
  return (
    text
      .replace(/[−–]/g, '-')
      .replace(/μ/g, 'µ')
      .replace(/[′’]/g, "'")
      .replace(/[″”]/g, '"')
      .replace(/[\u00a0\u2009\u202f\t]/g, ' ')
      // The dash of 5'-3" joins, and so does none.
      .replace(/'-?(?=\d)/g, "' ")
      .trim()
  );
}

interface Term {
  sign: 1 | -1;
  size: Exact;
  unit: Unit;
  hasUnit: boolean;
}

function termsOf(text: string): Term[] | QuantityFault {
  const terms: Term[] = [];
  let at = 0;
  do {
    numberAt.lastIndex = at;
    const number = numberAt.exec(text);
    if (!number || (terms.length > 0 && number[1] !== '')) return syntax(text);
    if (/^[1-9]\d{0,2},\d{3}$/.test(number[5] ?? '')) return ambiguous(number[5]);
    const size = sizeOf(number);
    if (!size) return syntax(text);
    unitAt.lastIndex = numberAt.lastIndex;
    const unitText = unitAt.exec(text)?.[0] ?? '';
    const read = readUnit(unitText);
    if (!read.ok) return read.fault;
    terms.push({ sign: number[1] === '-' ? -1 : 1, size, unit: read.unit, hasUnit: unitText.trim() !== '' });
    at = numberAt.lastIndex + unitText.length;
  } while (at < text.length);
  return terms.length > 1 && terms.some((term) => !term.hasUnit) ? syntax(text) : terms;
}

const syntax = (text: string): QuantityFault => ({ code: 'quantity-syntax', found: `"${text}"`, accepted: wanted });

const ambiguous = (digits: string): QuantityFault => ({
  code: 'ambiguous-number',
  found: digits,
  accepted: `${digits.replace(',', '.')} or ${digits.replace(',', '')}`,
});

function sizeOf([, , whole, above, below, digits, exponent = '']: RegExpExecArray): Exact | undefined {
  if (digits !== undefined) return decimal(digits.replace(/ /g, '').replace(',', '.') + exponent);
  if (Number(below) === 0) return undefined;
  const fraction = over(decimal(above), decimal(below));
  return whole === undefined ? fraction : plus(times(decimal(whole), one), fraction);
}
