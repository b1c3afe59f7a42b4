import { describe, expect, it } from 'vitest';
import { editDistance, suggest } from '../../../sim/core/suggest.js';

describe('Suggesting what was meant', () => {
  it('finds the nearest candidate', () => {
    expect(suggest('restitutoin', ['friction', 'restitution', 'restSpeed'])).toBe('restitution');
    expect(suggest('blok', ['block', 'ramp'])).toBe('block');
  });

  it('is silent where nothing is near', () => {
    expect(suggest('spring', ['block', 'ramp'])).toBeUndefined();
    expect(suggest('a', ['xyz'])).toBeUndefined();
  });

  it('does not mind capitals', () => {
    expect(suggest('Block', ['block'])).toBe('block');
  });

  it('counts insertions, deletions, substitutions and swaps of neighbours as one edit each', () => {
    expect(editDistance('abc', 'abc')).toBe(0);
    expect(editDistance('abc', 'abxc')).toBe(1);
    expect(editDistance('abc', 'ac')).toBe(1);
    expect(editDistance('abc', 'axc')).toBe(1);
    expect(editDistance('abc', 'acb')).toBe(1);
    expect(editDistance('', 'abc')).toBe(3);
  });
});
