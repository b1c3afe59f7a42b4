import { readFileSync } from 'node:fs';
import { resolve } from 'node:path';
import { describe, expect, it } from 'vitest';
import { catalogue, type Code } from '../../../sim/core/catalogue.js';
import { LARGEST_FILE, readMechanism } from '../../../sim/mechanism/index.js';
import { badInputs } from './bad-input.js';
import { full } from './full.js';
import { altered, ramp, readDocument, told } from './samples.js';

describe('A document with a fault', () => {
  it.each(badInputs)('is told $code for $what, at its place', ({ code, pointer, input }) => {
    const result = readMechanism(typeof input === 'string' ? input : JSON.stringify(input));
    const problem = result.problems.find((each) => each.code === code && each.pointer === pointer);
    expect(told(result)).toContain(`${code} ${pointer}`);
    expect(problem?.severity).toBe(catalogue[code].severity);
    expect(problem?.text).toMatch(/^[A-Z].*[.?]$/s);
    expect(problem?.text).not.toMatch(/undefined|\{\w+\}|\[object/);
    expect(result.mechanism === null).toBe(result.problems.some((each) => each.severity === 'error'));
  });

  it('says nothing else where there is one fault only', () => {
    const alone = badInputs.filter(({ input, hasSequels }) => typeof input !== 'string' && !hasSequels);
    const talkative = alone.filter(({ input }) => readMechanism(JSON.stringify(input)).problems.length > 1);
    expect(talkative.map(({ code, what }) => `${code}: ${what}`)).toEqual([]);
  });
});

describe('The catalogue of problems', () => {
  const codes = Object.keys(catalogue) as Code[];

  it('has every code reached by a bad input', () => {
    const byOtherTests: Code[] = ['file-too-large', 'more-problems'];
    const reached = new Set<Code>([...badInputs.map(({ code }) => code), ...byOtherTests]);
    expect(codes.filter((code) => !reached.has(code))).toEqual([]);
  });

  it('has each code once, in its source too', () => {
    const source = readFileSync(resolve(import.meta.dirname, '../../../sim/core/catalogue.ts'), 'utf8');
    const written = [...source.matchAll(/^ {2}'([a-z-]+)': \{$/gm)].map(([, code]) => code);
    expect(new Set(written).size).toBe(written.length);
    expect(written.sort()).toEqual([...codes].sort());
  });

  it('explains each code, in the description of the format too', () => {
    const description = readFileSync(resolve(import.meta.dirname, '../../../assets/schema/README.md'), 'utf8');
    for (const code of codes) {
      expect(catalogue[code].means, code).toMatch(/^[A-Z].{20,}\.$/);
      const { severity, means } = catalogue[code];
      expect(description).toContain(`| \`${code}\` | ${severity} | ${means} |`);
    }
  });
});

describe('Reading a document', () => {
  it('has nothing to say about one that uses every key rightly', () => {
    expect(told(readDocument(full()))).toEqual([]);
  });

  it('tells all problems at once, not only the first', () => {
    const document = altered(ramp(), {
      gravity: ['1 kg', 0],
      bodies: [
        { id: 'block', shape: { kind: 'box', width: 0, height: '3 kg' }, mass: '-1 kg', at: [0, 'high'] },
        { id: 'block', shape: { kind: 'ball' } },
      ],
      contacts: [{ between: ['block', 'rampp'], restitution: 2 }],
      run: { until: { station: 'end' } },
    });
    expect(told(readDocument(document)).sort()).toEqual(
      [
        'wrong-dimension /gravity/0',
        'out-of-range /bodies/0/shape/width',
        'wrong-dimension /bodies/0/shape/height',
        'out-of-range /bodies/0/mass',
        'quantity-syntax /bodies/0/at/1',
        'duplicate-id /bodies/1/id',
        'wrong-choice /bodies/1/shape/kind',
        'missing-key /bodies/1/mass',
        'missing-key /bodies/1/at',
        'unknown-reference /contacts/0/between/1',
        'out-of-range /contacts/0/restitution',
        'unknown-reference /run/until/station',
      ].sort(),
    );
  });

  it('says what was found and what is accepted, and names the elements concerned', () => {
    const { problems } = readMechanism(JSON.stringify(altered(ramp(), { contacts: [{ between: ['blok', 'ramp'] }] })));
    expect(problems[0]).toEqual({
      severity: 'error',
      code: 'unknown-reference',
      text: 'Nothing has the id "blok"; accepted is the id of a body or a track or "*"; did you mean "block"?',
      pointer: '/contacts/0/between/0',
      of: [],
      found: '"blok"',
      accepted: 'the id of a body or a track or "*"; did you mean "block"?',
    });
  });

  it('refuses a file of 50 MB by its size, without reading it', () => {
    const result = readMechanism('', { fileSize: LARGEST_FILE });
    expect(told(result)).toEqual(['file-too-large ']);
    expect(result.document).toBeNull();
    expect(told(readMechanism(' '.repeat(LARGEST_FILE)))).toEqual(['file-too-large ']);
  });

  it('stops after a thousand errors, and says so', () => {
    const bodies = Array.from({ length: 2000 }, () => ({}));
    const { problems, mechanism } = readDocument(altered(ramp(), { bodies }));
    expect(problems).toHaveLength(1001);
    expect(problems.at(-1)).toMatchObject({ code: 'more-problems', severity: 'note' });
    expect(mechanism).toBeNull();
  });

  it('tells every error, however many notes there are', () => {
    const extra = Object.fromEntries(Array.from({ length: 1500 }, (_, i) => [`x${i}`, i]));
    const { problems } = readDocument({ ...extra, ...altered(ramp(), { run: {} }) });
    expect(problems.filter(({ code }) => code === 'unknown-key')).toHaveLength(1000);
    expect(problems.map(({ code }) => code)).toContain('missing-key');
    expect(problems.at(-1)?.text).toBe('Found 500 more warnings and notes; listed are 1000.');
  });

  it('is not stained by prototype keys', () => {
    const text =
      '{"format": "joulewright/1", "__proto__": {"run": {"until": 1}}, "constructor": {"prototype": {"x": 1}}}';
    const result = readMechanism(text);
    expect(told(result)).toContain('missing-key /run');
    expect(({} as Record<string, unknown>).x).toBeUndefined();
    expect(Object.keys(result.document ?? {})).toEqual(['format']);
  });

  it('takes inherited names for ids and keys as what they are, strangers', () => {
    const document = altered(ramp(), { contacts: [{ between: ['toString', 'hasOwnProperty'] }], valueOf: 1 });
    expect(told(readDocument(document)).sort()).toEqual([
      'unknown-key /valueOf',
      'unknown-reference /contacts/0/between/0',
      'unknown-reference /contacts/0/between/1',
    ]);
  });

  it('passes over a byte order mark', () => {
    expect(readMechanism(`\uFEFF${JSON.stringify(ramp())}`).mechanism).not.toBeNull();
  });

  it('tells the line and column where JSON ends', () => {
    const [problem] = readMechanism('{\n  "format": "joulewright/1",\n  "run": oops\n}').problems;
    expect(problem.text).toContain('at line 3, column 10');
    expect(problem.pointer).toBe('/run');
  });
});
