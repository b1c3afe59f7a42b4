import { isObject, own, pointerKeys, type JsonValue } from '../json/value.js';
import type { Reading } from './reading.js';
import type { Spec } from './spec.js';

/** The description of what a JSON pointer leads to in a document; undefined where the contract knows nothing there. */
export function fieldAt(root: Spec, tree: JsonValue, pointer: string, reading: Reading | null): Spec | undefined {
  let spec: Spec | undefined = root;
  let value: JsonValue | undefined = tree;
  for (const key of pointerKeys(pointer)) {
    spec = spec && value !== undefined ? childSpec(narrowed(spec, value, reading), key) : undefined;
    value = childValue(value, key);
  }
  return spec && value !== undefined ? narrowed(spec, value, reading) : spec;
}

/** The record or option that a value's own look or tag picks. */
export function narrowed(spec: Spec, value: JsonValue, reading: Reading | null): Spec | undefined {
  if (spec.type === 'either') {
    const option = spec.options[spec.choose(value, reading)];
    return option && narrowed(option, value, reading);
  }
  if (spec.type !== 'tagged') return spec;
  const tag = isObject(value) ? own(value, spec.tag) : undefined;
  return typeof tag === 'string' && Object.hasOwn(spec.variants, tag) ? spec.variants[tag] : undefined;
}

function childValue(value: JsonValue | undefined, key: string): JsonValue | undefined {
  if (Array.isArray(value)) return value[Number(key)];
  return isObject(value) ? own(value, key) : undefined;
}

function childSpec(spec: Spec | undefined, key: string): Spec | undefined {
  switch (spec?.type) {
    case 'record':
      return Object.hasOwn(spec.fields, key) ? spec.fields[key].spec : undefined;
    case 'list':
      return spec.item;
    case 'tuple':
      return spec.items[Number(key)];
    case 'map':
      return spec.value;
    case 'vector':
      return { type: 'quantity', kind: spec.kind, unit: spec.unit, range: {} };
    default:
      return undefined;
  }
}
