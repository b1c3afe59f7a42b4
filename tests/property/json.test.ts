import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { layOut } from '../../sim/mechanism/json/layout.js';
import { DEEPEST, parseJson } from '../../sim/mechanism/json/parse.js';
import { pointerKeys, step, valueAt, type JsonValue } from '../../sim/mechanism/json/value.js';

const forbidden = new Set(['__proto__', 'constructor', 'prototype']);
const keys = fc.string().filter((key) => !forbidden.has(key));
const values = fc.letrec<{ value: JsonValue }>((tie) => ({
  value: fc.oneof(
    { depthSize: 'small', withCrossShrink: true },
    fc.constant(null),
    fc.boolean(),
    fc.double({ noNaN: true, noDefaultInfinity: true }).map((value) => value + 0),
    fc.string({ unit: 'binary' }),
    fc.array(tie('value'), { maxLength: 5 }),
    fc.dictionary(keys, tie('value'), { maxKeys: 5, noNullPrototype: true }),
  ),
})).value;

describe('Reading JSON, for any value', () => {
  it('gives what was written', () => {
    fc.assert(
      fc.property(values, fc.nat(4), (value, indent) => {
        expect(parseJson(JSON.stringify(value, null, indent))).toEqual({ value, problems: [] });
      }),
      { numRuns: 500 },
    );
  });

  it('agrees with the language about what is JSON', () => {
    const pieces = fc.constantFrom(
      '{',
      '}',
      '[',
      ']',
      ',',
      ':',
      '"a"',
      '"b"',
      '1',
      '-2e3',
      'true',
      'null',
      ' ',
      '01',
      '"',
      '\\',
    );
    fc.assert(
      fc.property(
        fc.array(pieces, { maxLength: 9 }).map((parts) => parts.join('')),
        (text) => {
          expect(parseJson(text).value !== undefined).toBe(isJson(text));
        },
      ),
      { numRuns: 5000 },
    );
  });

  it('never throws, whatever the text', () => {
    fc.assert(
      fc.property(fc.string({ maxLength: 40 }), (text) => {
        const { value, problems } = parseJson(text);
        expect(value !== undefined || problems.length > 0).toBe(true);
      }),
    );
  });

  it(`goes ${DEEPEST} levels deep and no deeper`, () => {
    const nested = (depth: number): string => '['.repeat(depth) + ']'.repeat(depth);
    expect(parseJson(nested(DEEPEST)).problems).toEqual([]);
    expect(parseJson(nested(DEEPEST + 1)).problems.map(({ code }) => code)).toEqual(['json-depth']);
  });
});

describe('Laying out JSON, for any value', () => {
  it('keeps the value', () => {
    fc.assert(
      fc.property(values, (value) => {
        expect(JSON.parse(layOut(value))).toEqual(JSON.parse(JSON.stringify(value)));
      }),
      { numRuns: 500 },
    );
  });

  it('breaks a line only where it would be longer than 120', () => {
    const rows = fc.array(fc.integer(), { maxLength: 60 });
    fc.assert(
      fc.property(rows, (row) => {
        const text = layOut(row);
        const flat = JSON.stringify(row).replaceAll(',', ', ');
        expect(text.includes('\n')).toBe(flat.length > 120);
      }),
    );
  });
});

describe('A JSON pointer, for any keys', () => {
  it('leads to what was put there', () => {
    fc.assert(
      fc.property(fc.array(keys, { minLength: 1, maxLength: 5 }), fc.integer(), (path, value) => {
        const root = path.reduceRight<JsonValue>((inner, key) => ({ [key]: inner }), value);
        const pointer = path.reduce(step, '');
        expect(pointerKeys(pointer)).toEqual(path);
        expect(valueAt(root, pointer)).toBe(value);
      }),
    );
  });
});

function isJson(text: string): boolean {
  try {
    JSON.parse(text);
    return true;
  } catch {
    return false;
  }
}
