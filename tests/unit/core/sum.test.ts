import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { compensatedSum } from '../../../sim/core/sum.js';

describe('compensatedSum', () => {
  it('keeps what plain addition loses', () => {
    expect(compensatedSum([1, 1e100, 1, -1e100])).toBe(2);
    expect(compensatedSum(Array.from({ length: 10_000 }, () => 0.1))).toBe(1000);
  });

  it('is exact to one rounding for doubles that are whole, in any order', () => {
    const whole = fc.array(fc.maxSafeInteger(), { maxLength: 50 });
    fc.assert(
      fc.property(whole, (values) => {
        const exact = Number(values.reduce((sum, value) => sum + BigInt(value), 0n));
        for (const order of [values, values.toReversed()]) {
          expect(Math.abs(compensatedSum(order) - exact)).toBeLessThanOrEqual(Number.EPSILON * Math.abs(exact));
        }
      }),
    );
  });
});
