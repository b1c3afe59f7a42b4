import type { Place } from '../../core/problem.js';
import { describe, isObject, own, type JsonValue } from '../json/value.js';
import { readRecord } from './read-record.js';
import { readId, readRef } from './read-reference.js';
import { readMeasure, readQuantitySpec, readTable, readVector } from './read-quantity.js';
import { inside, type Reading } from './reading.js';
import type { ChoiceSpec, EitherSpec, Element, Field, ListSpec, MapSpec, Spec, TaggedSpec, TupleSpec } from './spec.js';
import { suggest } from '../../core/suggest.js';

/**
 * Reads a value by its description: what it gives, in SI, or undefined where it is wrong; what is wrong goes to `reading`.
 */
export function read<T>(field: Field<T>, value: JsonValue, place: Place, reading: Reading): T | undefined {
  return readSpec(field, value, place, reading) as T | undefined;
}

function readSpec(spec: Spec, value: JsonValue, place: Place, reading: Reading): unknown {
  switch (spec.type) {
    case 'text':
      return typeof value === 'string' ? value : wrongType(value, 'a text', place, reading);
    case 'flag':
      return typeof value === 'boolean' ? value : wrongType(value, 'true or false', place, reading);
    case 'id':
      return readId(value, place, reading);
    case 'ref':
      return readRef(spec, value, place, reading);
    case 'choice':
      return readChoice(spec, value, place, reading);
    case 'quantity':
      return readQuantitySpec(spec, value, place, reading);
    case 'measure':
      return readMeasure(value, place, reading);
    case 'vector':
      return readVector(spec, value, place, reading);
    case 'table':
      return readTable(spec, value, place, reading);
    case 'list':
      return readList(spec, value, place, reading);
    case 'tuple':
      return readTuple(spec, value, place, reading);
    case 'record': {
      const { draft, isComplete } = readRecord(spec, value, place, reading);
      return isComplete ? draft : undefined;
    }
    case 'tagged':
      return readTagged(spec, value, place, reading);
    case 'either':
      return readEither(spec, value, place, reading);
    case 'map':
      return readMap(spec, value, place, reading);
  }
}

export function wrongType(value: JsonValue, accepted: string, place: Place, reading: Reading): unknown {
  reading.report('wrong-type', place, { found: describe(value), accepted });
  return undefined;
}

function readChoice(spec: ChoiceSpec, value: JsonValue, place: Place, reading: Reading): string | undefined {
  if (typeof value === 'string' && spec.options.includes(value)) return value;
  const near = typeof value === 'string' ? suggest(value, spec.options) : undefined;
  const accepted = `one of ${spec.options.join(', ')}${near ? `; did you mean ${near}?` : ''}`;
  reading.report('wrong-choice', place, { found: describe(value), accepted });
  return undefined;
}

function readList(spec: ListSpec, value: JsonValue, place: Place, reading: Reading): unknown {
  if (!Array.isArray(value)) return wrongType(value, 'a list', place, reading);
  if (value.length < spec.atLeast) {
    reading.report('too-few', place, { found: describe(value), accepted: `at least ${spec.atLeast}` });
    return undefined;
  }
  if (spec.ofElements) return value.map((item, i) => readElement(spec.item, item, inside(place, i), reading));
  return all(value.map((item, i) => readSpec(spec.item, item, inside(place, i), reading)));
}

function readElement(spec: Spec, value: JsonValue, place: Place, reading: Reading): Element<unknown> {
  const id = isObject(value) ? own(value, 'id') : undefined;
  const at = { ...place, of: typeof id === 'string' ? [id] : [] };
  if (spec.type !== 'record') return { value: readSpec(spec, value, at, reading), draft: {}, place: at };
  const { draft, isComplete } = readRecord(spec, value, at, reading);
  return { value: isComplete ? draft : undefined, draft, place: at };
}

function readTuple(spec: TupleSpec, value: JsonValue, place: Place, reading: Reading): unknown {
  const { items } = spec;
  if (!Array.isArray(value) || value.length !== items.length) {
    return wrongType(value, `a list of ${items.length}`, place, reading);
  }
  return all(value.map((item, i) => readSpec(items[i], item, inside(place, i), reading)));
}

const all = (values: unknown[]): unknown[] | undefined =>
  values.some((each) => each === undefined) ? undefined : values;

function readTagged(spec: TaggedSpec, value: JsonValue, place: Place, reading: Reading): unknown {
  if (!isObject(value)) return wrongType(value, spec.says, place, reading);
  const tag = own(value, spec.tag);
  const names = Object.keys(spec.variants);
  if (tag === undefined) {
    const accepted = `one of ${names.join(', ')}`;
    reading.report('missing-key', inside(place, spec.tag), { key: spec.tag, of: spec.says, accepted });
    return undefined;
  }
  const name = readChoice({ type: 'choice', options: names }, tag, inside(place, spec.tag), reading);
  if (name === undefined) return undefined;
  const { draft, isComplete } = readRecord(spec.variants[name], value, place, reading, spec.tag);
  return isComplete ? { [spec.tag]: name, ...draft } : undefined;
}

function readEither(spec: EitherSpec, value: JsonValue, place: Place, reading: Reading): unknown {
  const option = spec.choose(value, reading);
  const chosen = option < 0 ? undefined : spec.options[option];
  return chosen ? readSpec(chosen, value, place, reading) : wrongType(value, spec.says, place, reading);
}

function readMap(spec: MapSpec, value: JsonValue, place: Place, reading: Reading): unknown {
  if (!isObject(value)) return wrongType(value, spec.says, place, reading);
  const entries = Object.entries(value).map(([key, item]) => [
    key,
    readSpec(spec.value, item, inside(place, key), reading),
  ]);
  return entries.some(([, item]) => item === undefined) ? undefined : Object.fromEntries(entries);
}
