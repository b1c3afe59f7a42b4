import type { Place } from '../../core/problem.js';
import { suggest } from '../../core/suggest.js';
import { describe, type JsonValue } from '../json/value.js';
import { refWords } from './accepts.js';
import { idPattern, idsOf, isTarget, reservedIds } from './ids.js';
import type { Reading } from './reading.js';
import type { RefSpec, Target } from './spec.js';

export function readId(value: JsonValue, place: Place, reading: Reading): string | undefined {
  if (typeof value === 'string' && idPattern.test(value) && !reservedIds.has(value)) return value;
  const accepted = 'letters, digits, - and _, but not ground or all';
  reading.report('wrong-id', place, { found: describe(value), accepted });
  return undefined;
}

/** An id that leads to an element of the right sort. */
export function readRef(spec: RefSpec, value: JsonValue, place: Place, reading: Reading): string | undefined {
  if (typeof value !== 'string') {
    reading.report('wrong-type', place, { found: describe(value), accepted: refWords(spec.to) });
    return undefined;
  }
  if (reservedIds.has(value) && spec.to.includes(value as Target)) return value;
  const named = reading.ids.get(value);
  if (named && isTarget(named, spec.to)) return value;
  if (named) {
    const found = `"${value}", a ${named.kind || named.type}`;
    reading.report('wrong-reference', place, { found, accepted: refWords(spec.to) });
  } else {
    const near = suggest(value, idsOf(reading.ids, spec.to));
    const accepted = `${refWords(spec.to)}${near ? `; did you mean "${near}"?` : ''}`;
    reading.report('unknown-reference', place, { found: describe(value), accepted });
  }
  return undefined;
}
