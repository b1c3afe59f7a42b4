import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { readMechanism, writeDocument, type MechanismDocument } from '../../sim/mechanism/index.js';
import { isObject, step, valueAt, type JsonObject, type JsonValue } from '../../sim/mechanism/json/value.js';
import { full } from '../unit/mechanism/full.js';

/** Every place of a document that a JSON pointer can lead to. */
function places(value: JsonValue, pointer = ''): string[] {
  const keys = Array.isArray(value) ? value.map((_, i) => i) : isObject(value) ? Object.keys(value) : [];
  return [pointer, ...keys.flatMap((key) => places((value as JsonObject)[key], step(pointer, key)))];
}

/** A copy with the value at a pointer replaced. */
function replaced(value: JsonValue, pointer: string, by: JsonValue): JsonValue {
  if (pointer === '') return by;
  const copy = structuredClone(value);
  const parent = valueAt(copy, pointer.slice(0, pointer.lastIndexOf('/')));
  const key = pointer.slice(pointer.lastIndexOf('/') + 1);
  (parent as JsonObject)[key] = by;
  return copy;
}

/** The same document with the keys of all its objects in another order. */
function shuffled(value: JsonValue, random: () => number): JsonValue {
  if (Array.isArray(value)) return value.map((item) => shuffled(item, random));
  if (!isObject(value)) return value;
  const entries = Object.entries(value).map(([key, item]) => ({ key, item, rank: random() }));
  entries.sort((a, b) => a.rank - b.rank);
  return Object.fromEntries(entries.map(({ key, item }) => [key, shuffled(item, random)]));
}

const everywhere = fc.constantFrom(...places(full()));
const strange = fc.oneof(
  fc.constantFrom<JsonValue>(
    null,
    true,
    0,
    -1,
    1e300,
    '',
    'x',
    '3 kg',
    '-3 mm',
    '0 N',
    [],
    {},
    [0, 0],
    { of: 'x' },
    'ground',
    '*',
  ),
  fc.jsonValue({ maxDepth: 2 }) as fc.Arbitrary<JsonValue>,
);

describe('Reading a document with anything wrong in it', () => {
  it('never throws, and gives a mechanism exactly where there is no error', () => {
    fc.assert(
      fc.property(everywhere, strange, (pointer, value) => {
        const result = readMechanism(JSON.stringify(replaced(full(), pointer, value)));
        const hasError = result.problems.some(({ severity }) => severity === 'error');
        expect(result.mechanism === null).toBe(hasError);
      }),
      { numRuns: 300 },
    );
  });

  it('gives only finite numbers where there is no error', () => {
    fc.assert(
      fc.property(everywhere, fc.constantFrom<JsonValue>(0, 1, -1, 1e-9, 1e9), (pointer, value) => {
        const { mechanism } = readMechanism(JSON.stringify(replaced(full(), pointer, value)));
        expect(numbersIn(mechanism).every(Number.isFinite)).toBe(true);
      }),
      { numRuns: 300 },
    );
  });
});

describe('Canonical form', () => {
  it('is the same whatever the order of the keys, and the same again when written again', () => {
    const canonical = writeDocument(full() as MechanismDocument);
    fc.assert(
      fc.property(fc.nat(), (seed) => {
        let state = seed;
        const random = (): number => (state = (state * 1103515245 + 12345) % 2147483648);
        const mixed = shuffled(full(), random) as MechanismDocument;
        const written = writeDocument(mixed);
        expect(written).toBe(canonical);
        expect(writeDocument(JSON.parse(written) as MechanismDocument)).toBe(written);
      }),
      { numRuns: 30 },
    );
  });

  it('keeps every value, known or not, as it was typed', () => {
    const extras = fc.dictionary(fc.stringMatching(/^[a-z]{1,6}$/), fc.jsonValue({ maxDepth: 2 }), {
      noNullPrototype: true,
    });
    fc.assert(
      fc.property(everywhere, extras, (pointer, extra) => {
        const target = valueAt(full(), pointer);
        fc.pre(isObject(target));
        const document = replaced(full(), pointer, { ...(extra as JsonObject), ...target }) as MechanismDocument;
        const { document: read } = readMechanism(writeDocument(document));
        expect(read).toEqual(JSON.parse(JSON.stringify(document)));
      }),
      { numRuns: 200 },
    );
  });

  it('means the same', () => {
    const { mechanism } = readMechanism(JSON.stringify(full()));
    expect(readMechanism(writeDocument(full() as MechanismDocument)).mechanism).toEqual(mechanism);
  });
});

function numbersIn(value: unknown): number[] {
  if (typeof value === 'number') return [value];
  return typeof value === 'object' && value !== null ? Object.values(value).flatMap(numbersIn) : [];
}
