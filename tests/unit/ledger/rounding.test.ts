import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { apportion, roundHalfUp } from '../../../sim/ledger/rounding.js';

const sum = (values: readonly number[]): number => values.reduce((total, value) => total + value, 0);

describe('apportion', () => {
  it('raises the largest remainders until the parts add up', () => {
    expect(apportion([1.4, 2.3, 0.3], 4)).toEqual({ parts: [2, 2, 0], left: 0 });
    expect(apportion([1.5, 1.5], 3)).toEqual({ parts: [2, 1], left: 0 });
  });

  it('never raises what is whole, or within rounding of it', () => {
    expect(apportion([1, 2, 1e-13, 2.9999999999], 7)).toEqual({ parts: [1, 2, 0, 3], left: 1 });
  });

  it('gives back what floors and ceilings cannot reach', () => {
    expect(apportion([0.5], 3)).toEqual({ parts: [1], left: 2 });
    expect(apportion([2.5], 1)).toEqual({ parts: [2], left: -1 });
    expect(apportion([], 0)).toEqual({ parts: [], left: 0 });
  });

  it('adds up to the total, each part at its floor or ceiling, with nothing left where that can be', () => {
    const values = fc.array(fc.double({ min: 0, max: 1e6, noNaN: true }), { maxLength: 30 });
    fc.assert(
      fc.property(values, fc.double({ min: 0, max: 1, noNaN: true }), (list, at) => {
        const [least, most] = [Math.floor, Math.ceil].map((round) => sum(list.map((value) => round(settled(value)))));
        const total = Math.round(least + at * (most - least));
        const { parts, left } = apportion(list, total);
        expect(sum(parts)).toBe(total);
        expect(left).toBe(0);
        parts.forEach((part, i) => expect(Math.abs(part - list[i])).toBeLessThan(1));
      }),
    );
  });
});

function settled(value: number): number {
  return Math.abs(value - Math.round(value)) < 1e-6 ? Math.round(value) : value;
}

describe('roundHalfUp', () => {
  it('rounds halves up, also those that the last bit of a double puts below', () => {
    expect([0.5, 1.5, 0.1 + 0.2 + 0.2 - 1e-16, 1.4999, -0.5].map(roundHalfUp)).toEqual([1, 2, 1, 1, 0]);
  });
});
