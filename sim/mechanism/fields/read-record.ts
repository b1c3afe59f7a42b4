import type { Place } from '../../core/problem.js';
import { suggest } from '../../core/suggest.js';
import { isObject, own, type JsonObject, type JsonValue } from '../json/value.js';
import { accepts } from './accepts.js';
import { read, wrongType } from './read.js';
import { inside, type Reading } from './reading.js';
import type { Alternative, Entry, RecordField, RecordSpec } from './spec.js';

/** A record as far as it could be read. `isComplete` where nothing of it was wrong or missing. */
export interface Draft<T> {
  draft: Partial<T>;
  isComplete: boolean;
}

/** Reads every key of a record, so that all its problems are told at once; fills in and lists its defaults. */
export function readRecord<T>(
  spec: RecordField<T>,
  value: JsonValue,
  place: Place,
  reading: Reading,
  tag?: string,
): Draft<T> {
  if (!isObject(value)) {
    wrongType(value, spec.says, place, reading);
    return { draft: {}, isComplete: false };
  }
  const at = identified(spec, value, place);
  const draft: Record<string, unknown> = {};
  let isComplete = true;
  for (const [key, entry] of Object.entries(spec.fields)) {
    const result = readEntry(key, entry, { spec, value, at, reading });
    if (result === wrong) isComplete = false;
    else if (result !== undefined) draft[key] = result;
  }
  if (!checkAlternatives(spec, value, at, reading)) isComplete = false;
  noteUnknownKeys(spec, value, at, reading, tag);
  if (isComplete && spec.check) {
    const before = reading.errorCount;
    spec.check(draft as never, at, reading);
    isComplete = reading.errorCount === before;
  }
  return { draft: draft as Partial<T>, isComplete };
}

/** An element's problems name it. */
function identified(spec: RecordSpec, value: JsonObject, place: Place): Place {
  const id = own(value, 'id');
  return 'id' in spec.fields && typeof id === 'string' ? { ...place, of: [id] } : place;
}

const wrong = Symbol('wrong');

interface Context {
  spec: RecordSpec;
  value: JsonObject;
  at: Place;
  reading: Reading;
}

function readEntry(key: string, entry: Entry, { spec, value, at, reading }: Context): unknown {
  const place = inside(at, key);
  const given = own(value, key);
  if (given !== undefined) return read(entry.spec, given, place, reading) ?? wrong;
  if (entry.presence === 'required') {
    reading.report('missing-key', place, { key, of: spec.says, accepted: accepts(entry.spec) });
    return wrong;
  }
  if (entry.value === undefined) return undefined;
  reading.applied(place.pointer, entry.value, entry.why ?? '');
  return read(entry.spec, entry.value, place, reading);
}

function checkAlternatives(spec: RecordSpec, value: JsonObject, at: Place, reading: Reading): boolean {
  return spec.alternatives.map((each) => checkAlternative(spec, each, value, at, reading)).every(Boolean);
}

function checkAlternative(
  spec: RecordSpec,
  each: Alternative,
  value: JsonObject,
  at: Place,
  reading: Reading,
): boolean {
  const isGiven = (key: string): boolean => Object.hasOwn(value, key);
  const begun = each.groups.filter((group) => group.some(isGiven));
  const accepted = each.groups.map((group) => group.join(' and ')).join(', or ');
  if (begun.length === 0) {
    if (each.optional) return true;
    const place = each.groups.length === 1 || each.groups[0].length === 1 ? inside(at, each.groups[0][0]) : at;
    reading.report('missing-key', place, { key: each.groups[0].join(' and '), of: spec.says, accepted });
    return false;
  }
  if (begun.length > 1) {
    const given = begun.flat().filter(isGiven);
    reading.report('conflicting-keys', inside(at, given[1]), { found: given.join(' and '), of: spec.says, accepted });
    return false;
  }
  const missing = begun[0].filter((key) => !isGiven(key));
  for (const key of missing) {
    reading.report('missing-key', inside(at, key), { key, of: spec.says, accepted: accepts(spec.fields[key].spec) });
  }
  return missing.length === 0;
}

function noteUnknownKeys(spec: RecordSpec, value: JsonObject, at: Place, reading: Reading, tag?: string): void {
  for (const key of Object.keys(value)) {
    if (key === tag || Object.hasOwn(spec.fields, key)) continue;
    const near = suggest(key, Object.keys(spec.fields));
    const accepted = near ? `${near}, if that was meant` : Object.keys(spec.fields).join(', ');
    reading.report('unknown-key', inside(at, key), { found: `"${key}"`, of: spec.says, accepted });
  }
}
