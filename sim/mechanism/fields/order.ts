import { isObject, type JsonObject, type JsonValue } from '../json/value.js';
import { narrowed } from './lookup.js';
import type { Spec } from './spec.js';

/**
 * The same value with every object's keys in the order of its field table: known ones first, then unknown ones in the
 * order they came. Where a value does not fit its description it stays as it came.
 */
export function inOrder(spec: Spec, value: JsonValue): JsonValue {
  const exact = narrowed(spec, value, null);
  if (Array.isArray(value)) return value.map((item, i) => ordered(itemSpec(exact, i), item));
  if (!isObject(value)) return value;
  if (exact?.type === 'map') return mapValues(value, (item) => inOrder(exact.value, item));
  if (exact?.type !== 'record') return value;
  const tag = spec.type === 'tagged' ? [spec.tag] : [];
  const known = Object.keys(exact.fields);
  const first = 'id' in exact.fields ? ['id', ...tag] : tag;
  const keys = new Set([...first, ...known, ...Object.keys(value)].filter((key) => Object.hasOwn(value, key)));
  return Object.fromEntries(
    [...keys].map((key) => [
      key,
      ordered(Object.hasOwn(exact.fields, key) ? exact.fields[key].spec : undefined, value[key]),
    ]),
  );
}

const ordered = (spec: Spec | undefined, value: JsonValue): JsonValue => (spec ? inOrder(spec, value) : value);

function itemSpec(spec: Spec | undefined, index: number): Spec | undefined {
  if (spec?.type === 'list') return spec.item;
  return spec?.type === 'tuple' ? spec.items[index] : undefined;
}

const mapValues = (object: JsonObject, change: (value: JsonValue) => JsonValue): JsonObject =>
  Object.fromEntries(Object.entries(object).map(([key, value]) => [key, change(value)]));
