import { describe, expect, it } from 'vitest';
import { problem } from '../../../sim/core/problem.js';

describe('A problem', () => {
  it('has the severity of its code and its sentence filled in', () => {
    const place = { pointer: '/bodies/0/mass', of: ['block'] };
    expect(problem('out-of-range', place, { found: '0', accepted: 'a mass above 0' })).toEqual({
      severity: 'error',
      code: 'out-of-range',
      text: 'Found 0; accepted is a mass above 0.',
      pointer: '/bodies/0/mass',
      of: ['block'],
      found: '0',
      accepted: 'a mass above 0',
    });
  });

  it('says what was found and accepted as fields of their own, and other values in its sentence only', () => {
    const values = { found: '"b"', first: '/bodies/0', accepted: 'an id of its own' };
    const made = problem('duplicate-id', { pointer: '/bodies/1/id', of: ['b'] }, values);
    expect(made.text).toBe('The id "b" is already that of /bodies/0; accepted is an id of its own.');
    expect(Object.keys(made)).toEqual(['severity', 'code', 'text', 'pointer', 'of', 'found', 'accepted']);
  });

  it('ends with a question mark where a suggestion does', () => {
    const values = { found: '"blok"', accepted: 'the id of a body; did you mean "block"?' };
    expect(problem('unknown-reference', { pointer: '', of: [] }, values).text).toMatch(/"block"\?$/);
  });

  it('fills in what was found as it is, braces and all', () => {
    const values = { found: '"{accepted}"', accepted: 'a text' };
    expect(problem('wrong-type', { pointer: '', of: [] }, values).text).toBe('Found "{accepted}"; accepted is a text.');
  });
});
