import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { factor, solve } from '../../../../sim/auditor/method/pivoted-solve.js';

const entry = fc.double({ min: -10, max: 10, noNaN: true });

const times = (a: readonly number[], x: ArrayLike<number>, n: number): number[] =>
  Array.from({ length: n }, (_, i) => {
    let sum = 0;
    for (let j = 0; j < n; j += 1) sum += a[i * n + j] * x[j];
    return sum;
  });

describe('factor and solve', () => {
  it('solve any system: what is left over is rounding', () => {
    const system = fc
      .integer({ min: 1, max: 8 })
      .chain((n) =>
        fc.tuple(
          fc.constant(n),
          fc.array(entry, { minLength: n * n, maxLength: n * n }),
          fc.array(entry, { minLength: n, maxLength: n }),
        ),
      );
    fc.assert(
      fc.property(system, ([n, a, x]) => {
        const b = times(a, x, n);
        const factored = factor(Float64Array.from(a), n);
        const found = solve(factored, Float64Array.from(b), new Float64Array(n));
        const left = times(a, found, n).map((value, i) => Math.abs(value - b[i]));
        // A row of a matrix short of rank may be worth up to its nil pivot, 1e-11 of the greatest.
        const size = Math.max(...found.map(Math.abs), 1);
        expect(Math.max(...left)).toBeLessThanOrEqual(1e-9 * size);
      }),
      { numRuns: 300 },
    );
  });

  it('tell the rank of a matrix short of it, and give a solution all the same', () => {
    const [r, n] = [2, 4];
    const columns = fc.array(fc.integer({ min: -9, max: 9 }), { minLength: r * n, maxLength: r * n });
    fc.assert(
      fc.property(columns, columns, fc.array(entry, { minLength: n, maxLength: n }), (u, w, x) => {
        const a = Array.from({ length: n * n }, (_, k) => {
          const [i, j] = [Math.floor(k / n), k % n];
          return u[i] * w[j] + u[n + i] * w[n + j];
        });
        const factored = factor(Float64Array.from(a), n);
        expect(factored.rank).toBeLessThanOrEqual(r);
        const b = times(a, x, n);
        const found = solve(factored, Float64Array.from(b), new Float64Array(n));
        const left = times(a, found, n).map((value, i) => Math.abs(value - b[i]));
        expect(Math.max(...left)).toBeLessThanOrEqual(1e-8 * Math.max(...found.map(Math.abs), 1));
      }),
      { numRuns: 300 },
    );
  });

  it('take two equal constraints as one, whatever the masses: one of them carries the force', () => {
    const factored = factor(Float64Array.from([3, 3, 3, 3]), 2);
    expect(factored.rank).toBe(1);
    expect([...solve(factored, Float64Array.from([6, 6]), new Float64Array(2))].sort()).toEqual([0, 2]);
  });

  it('keep apart rows of very different size: 1e12 in scale is no lack of rank', () => {
    // Constraints on a mass of 1 kg and on one of a picogram.
    const a = Float64Array.from([1, 0, 0, 1e12]);
    const factored = factor(a, 2);
    expect(factored.rank).toBe(2);
    const x = solve(factored, Float64Array.from([1, 1e12]), new Float64Array(2));
    expect([...x]).toEqual([1, 1]);
  });

  it('solve nothing at once', () => {
    const factored = factor(new Float64Array(0), 0);
    expect(factored).toMatchObject({ rank: 0, pivotRatio: 1 });
    expect(solve(factored, new Float64Array(0), new Float64Array(0))).toHaveLength(0);
  });
});
