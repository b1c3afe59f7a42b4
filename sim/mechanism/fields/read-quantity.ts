import type { Place } from '../../core/problem.js';
import type { Vec } from '../../core/vec.js';
import { describe, type JsonValue } from '../json/value.js';
import { dimensionText, fits, quantityKinds, sameDimension, type QuantityName } from '../units/dimension.js';
import { readQuantity } from '../units/quantity.js';
import { accepts } from './accepts.js';
import { inside, type Reading } from './reading.js';
import type { Measured, QuantitySpec, Range, TableSpec, VectorSpec } from './spec.js';

/** A quantity whose dimension is not known beforehand. */
export function readMeasure(value: JsonValue, place: Place, reading: Reading): Measured | undefined {
  if (typeof value === 'number') return { value, dimension: null, text: String(value) };
  if (typeof value !== 'string') {
    reading.report('wrong-type', place, { found: describe(value), accepted: 'a number, or a text with a unit' });
    return undefined;
  }
  const result = readQuantity(value);
  if (result.ok) return { value: result.quantity.value, dimension: result.quantity.dimension, text: value };
  const { code, found, accepted } = result.fault;
  reading.report(code, place, { found, accepted });
  return undefined;
}

/** The SI value, where its dimension is that of `kind`. A bare number is in SI. */
export function inKind(given: Measured, kind: QuantityName, place: Place, reading: Reading): number | undefined {
  const { dimension, says, example } = quantityKinds[kind];
  if (given.dimension === null || fits(given.dimension, dimension)) return given.value;
  const accepted = `${says}, such as "${example}"`;
  const isMassForForce = sameDimension(quantityKinds.mass.dimension, given.dimension) && kind === 'force';
  const hint = isMassForForce ? ' (a weight in pounds is lbf, in kilograms kgf)' : '';
  const found = `"${given.text}" (${dimensionText(given.dimension)})`;
  reading.report('wrong-dimension', place, { found, accepted: accepted + hint });
  return undefined;
}

export function readKind(kind: QuantityName, value: JsonValue, place: Place, reading: Reading): number | undefined {
  const given = readMeasure(value, place, reading);
  return given && inKind(given, kind, place, reading);
}

export function readQuantitySpec(
  spec: QuantitySpec,
  value: JsonValue,
  place: Place,
  reading: Reading,
): number | undefined {
  const size = readKind(spec.kind, value, place, reading);
  if (size === undefined || isWithin(size, spec.range)) return size;
  reading.report('out-of-range', place, { found: describe(value), accepted: accepts(spec) });
  return undefined;
}

export const isWithin = (size: number, { above, atLeast, below, atMost, notZero, whole }: Range): boolean =>
  (above === undefined || size > above) &&
  (atLeast === undefined || size >= atLeast) &&
  (below === undefined || size < below) &&
  (atMost === undefined || size <= atMost) &&
  (!notZero || size !== 0) &&
  (!whole || Number.isInteger(size));

export function readVector(spec: VectorSpec, value: JsonValue, place: Place, reading: Reading): number[] | undefined {
  if (!Array.isArray(value) || value.length !== spec.size) {
    reading.report('wrong-type', place, { found: describe(value), accepted: accepts(spec) });
    return undefined;
  }
  const parts = value.map((part, i) => readKind(spec.kind, part, inside(place, i), reading));
  if (!parts.every((part) => part !== undefined)) return undefined;
  if (!spec.notZero || parts.some((part) => part !== 0)) return parts;
  reading.report('no-direction', place, { found: '[0, 0]', accepted: 'a vector with a direction' });
  return undefined;
}

export function readTable(spec: TableSpec, value: JsonValue, place: Place, reading: Reading): Vec[] | undefined {
  if (!Array.isArray(value) || value.length < 2) {
    reading.report('wrong-type', place, { found: describe(value), accepted: `two or more ${accepts(spec)}` });
    return undefined;
  }
  const rows = value.map((row, i) => readRow(spec, row, inside(place, i), reading));
  if (!rows.every((row) => row !== undefined)) return undefined;
  const fall = rows.findIndex((row, i) => i > 0 && row[0] <= rows[i - 1][0]);
  if (fall < 0) return rows;
  const found = `${describe((value[fall] as JsonValue[])[0])} after ${describe((value[fall - 1] as JsonValue[])[0])}`;
  reading.report('not-rising', inside(place, fall), { found, accepted: 'first numbers that rise from pair to pair' });
  return undefined;
}

function readRow(spec: TableSpec, value: JsonValue, place: Place, reading: Reading): Vec | undefined {
  if (!Array.isArray(value) || value.length !== 2) {
    reading.report('wrong-type', place, { found: describe(value), accepted: accepts(spec) });
    return undefined;
  }
  const x = readKind(spec.x, value[0], inside(place, 0), reading);
  const y = readKind(spec.y, value[1], inside(place, 1), reading);
  return x === undefined || y === undefined ? undefined : [x, y];
}
