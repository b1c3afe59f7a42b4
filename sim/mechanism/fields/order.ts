import { isObject, type JsonObject, type JsonValue } from '../json/value.js';
import { narrowed } from './lookup.js';
import type { RecordSpec, Spec } from './spec.js';

/**
 * The same value with every object's keys in one order: first those of its field table, in the table's order, then names
 * of the author's and keys nobody knows, by their code units. Two documents that say the same come out the same.
 */
export function inOrder(spec: Spec | undefined, value: JsonValue): JsonValue {
  const exact = spec && narrowed(spec, value, null);
  if (Array.isArray(value)) return value.map((item, i) => inOrder(childSpec(exact, i), item));
  if (!isObject(value)) return value;
  const entries = keysInOrder(spec, exact, value).map((key): [string, JsonValue] => [
    key,
    inOrder(exact?.type === 'map' ? exact.value : fieldSpec(exact, key), value[key]),
  ]);
  return Object.fromEntries(entries);
}

function keysInOrder(spec: Spec | undefined, exact: Spec | undefined, value: JsonObject): string[] {
  const known = exact?.type === 'record' ? knownKeys(exact, spec?.type === 'tagged' ? spec.tag : undefined) : [];
  const rest = Object.keys(value).sort();
  return [...new Set([...known, ...rest])].filter((key) => Object.hasOwn(value, key));
}

/** The id first, then what tells the variant, then the fields as the table has them. */
function knownKeys({ fields }: RecordSpec, tag: string | undefined): string[] {
  const first = [...('id' in fields ? ['id'] : []), ...(tag === undefined ? [] : [tag])];
  return [...first, ...Object.keys(fields)];
}

const fieldSpec = (spec: Spec | undefined, key: string): Spec | undefined =>
  spec?.type === 'record' && Object.hasOwn(spec.fields, key) ? spec.fields[key].spec : undefined;

function childSpec(spec: Spec | undefined, index: number): Spec | undefined {
  if (spec?.type === 'list') return spec.item;
  return spec?.type === 'tuple' ? spec.items[index] : undefined;
}
