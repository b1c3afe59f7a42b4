import type { Place } from '../../core/problem.js';
import { inside, type Reading } from '../fields/reading.js';
import { fieldAt } from '../fields/lookup.js';
import { inKind } from '../fields/read-quantity.js';
import { dimensionless, sameDimension, type QuantityName } from '../units/dimension.js';
import type { Measured } from '../fields/spec.js';
import { documentFields } from '../document.js';
import { describe, valueAt, type JsonObject } from '../json/value.js';
import type { Sizing, SizingDocument } from '../kinds/sizing.js';
import type { Spread, SpreadDocument, Variation } from '../kinds/spread.js';

/** The kind of quantity a JSON pointer leads to, where it leads to one that is given in the document. */
function kindAt(pointer: string, tree: JsonObject, place: Place, reading: Reading): QuantityName | undefined {
  const value = valueAt(tree, pointer);
  const spec = value === undefined ? undefined : fieldAt(documentFields, tree, pointer, reading);
  if (spec?.type === 'quantity') return spec.kind;
  const found = value === undefined ? `"${pointer}", where there is nothing` : `"${pointer}": ${describe(value)}`;
  reading.report('no-quantity', place, { found, accepted: 'a JSON pointer to a quantity given in the document' });
  return undefined;
}

export function resolveSpread(
  spread: SpreadDocument,
  tree: JsonObject,
  place: Place,
  reading: Reading,
): Spread | undefined {
  const vary = spread.vary.map((each, i) => resolveVariation(each, tree, inside(inside(place, 'vary'), i), reading));
  if (!vary.every((each) => each !== undefined)) return undefined;
  const { trials, seed, corners } = spread;
  return { vary, trials, seed, corners };
}

function resolveVariation(
  given: SpreadDocument['vary'][number],
  tree: JsonObject,
  place: Place,
  reading: Reading,
): Variation | undefined {
  const { at } = given;
  const kind = kindAt(at, tree, inside(place, 'at'), reading);
  if (!kind) return undefined;
  const size = (key: string, measured: Measured): number | undefined =>
    inKind(measured, kind, inside(place, key), reading);
  if (given.plusMinus) {
    const half = widthOf(given.plusMinus, kind, inside(place, 'plusMinus'), reading);
    return half && { at, kind: 'plusMinus', half: half.size, relative: half.relative };
  }
  if (given.normal) {
    const sigma = widthOf(given.normal.sigma, kind, inside(inside(place, 'normal'), 'sigma'), reading);
    return sigma && { at, kind: 'normal', sigma: sigma.size, relative: sigma.relative };
  }
  if (given.values) {
    const values = given.values.map((value, i) => size(`values/${i}`, value));
    return values.every((value) => value !== undefined) ? { at, kind: 'values', values } : undefined;
  }
  const from = given.from && size('from', given.from);
  const to = given.to && size('to', given.to);
  return from === undefined || to === undefined ? undefined : { at, kind: 'uniform', from, to };
}

/** A width in the unit of what varies, or in per cent of it. A per cent sign on a plain number is per cent of it too. */
function widthOf(
  given: Measured,
  kind: QuantityName,
  place: Place,
  reading: Reading,
): { size: number; relative: boolean } | undefined {
  const relative =
    given.dimension !== null && sameDimension(given.dimension, dimensionless) && given.text.includes('%');
  const size = relative ? given.value : inKind(given, kind, place, reading);
  if (size === undefined) return undefined;
  if (size > 0) return { size, relative };
  reading.report('out-of-range', place, { found: given.text, accepted: 'a width above 0' });
  return undefined;
}

export function resolveSizing(
  sizing: SizingDocument,
  tree: JsonObject,
  place: Place,
  reading: Reading,
): Sizing | undefined {
  const kind = kindAt(sizing.solve, tree, inside(place, 'solve'), reading);
  if (!kind) return undefined;
  const from = inKind(sizing.from, kind, inside(place, 'from'), reading);
  const to = inKind(sizing.to, kind, inside(place, 'to'), reading);
  if (from === undefined || to === undefined) return undefined;
  if (from === to) {
    reading.report('empty-span', inside(place, 'to'), { found: 'an empty range', accepted: 'two different ends' });
  }
  return { solve: sizing.solve, from, to, for: sizing.for, with: sizing.with };
}
