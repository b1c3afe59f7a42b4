import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { lemke } from '../../../../sim/auditor/method/lemke.js';

const of = (m: number[][], q: number[]): Float64Array | null =>
  lemke(Float64Array.from(m.flat()), Float64Array.from(q), q.length);

/** Every solution of w = M z + q, w ≥ 0, z ≥ 0, w·z = 0 whose basis is regular: each choice of z_i or w_i nil is solved. */
function enumerate(m: readonly number[][], q: readonly number[]): number[][] {
  const n = q.length;
  const found: number[][] = [];
  for (let mask = 0; mask < 1 << n; mask += 1) {
    const basis = Array.from({ length: n }, (_, i) => i).filter((i) => mask & (1 << i));
    const z = restricted(m, q, basis);
    if (!z) continue;
    const w = q.map((value, i) => value + m[i].reduce((sum, a, j) => sum + a * z[j], 0));
    if (z.every((value) => value >= -1e-9) && w.every((value) => value >= -1e-9)) found.push(z);
  }
  return found;
}

/** z with M z + q nil in the rows of the basis and z nil elsewhere; null where that is singular. */
function restricted(m: readonly number[][], q: readonly number[], basis: readonly number[]): number[] | null {
  const rows = basis.map((i) => [...basis.map((j) => m[i][j]), -q[i]]);
  for (let k = 0; k < rows.length; k += 1) {
    const p = rows.reduce((best, row, i) => (i > k && Math.abs(row[k]) > Math.abs(rows[best][k]) ? i : best), k);
    if (Math.abs(rows[p][k]) < 1e-9) return null;
    [rows[k], rows[p]] = [rows[p], rows[k]];
    rows.forEach((row, i) => {
      if (i === k) return;
      const multiplier = row[k] / rows[k][k];
      row.forEach((_, j) => (row[j] -= multiplier * rows[k][j]));
    });
  }
  const z = q.map(() => 0);
  basis.forEach((i, k) => (z[i] = rows[k][rows.length] / rows[k][k]));
  return z;
}

const entry = fc.integer({ min: -30, max: 30 }).map((value) => value / 10);
const square = (n: number): fc.Arbitrary<number[][]> =>
  fc.array(fc.array(entry, { minLength: n, maxLength: n }), { minLength: n, maxLength: n });
const problem = fc
  .integer({ min: 1, max: 4 })
  .chain((n) => fc.tuple(square(n), fc.array(entry, { minLength: n, maxLength: n })));

describe('lemke', () => {
  it('solves the textbook’s problem (Cottle, Pang & Stone 1992): M = (2 1; 1 2), q = (−5, −6) by z = (4/3, 7/3)', () => {
    const z = of(
      [
        [2, 1],
        [1, 2],
      ],
      [-5, -6],
    );
    expect(z?.[0]).toBeCloseTo(4 / 3, 12);
    expect(z?.[1]).toBeCloseTo(7 / 3, 12);
  });

  it('needs no force where nothing approaches', () => {
    expect(of([[-1]], [2])).toEqual(Float64Array.from([0]));
    expect(of([], [])).toEqual(new Float64Array(0));
  });

  it('says so where there is no solution: w = −z − 1', () => {
    expect(of([[-1]], [-1])).toBeNull();
    expect(
      of(
        [
          [0, 0],
          [0, 1],
        ],
        [-1, -1],
      ),
    ).toBeNull();
  });

  it('finds one where two equal rows share a load', () => {
    const z = of(
      [
        [1, 1],
        [1, 1],
      ],
      [-2, -2],
    );
    expect((z?.[0] ?? 0) + (z?.[1] ?? 0)).toBeCloseTo(2, 9);
  });

  it('gives nothing but solutions, and one wherever M is positive definite (as an enumeration of bases finds)', () => {
    fc.assert(
      fc.property(problem, ([a, q]) => {
        const n = q.length;
        // AᵀA + I/2.
        const m = a.map((_, i) => a.map((__, j) => a.reduce((sum, row) => sum + row[i] * row[j], i === j ? 0.5 : 0)));
        const z = of(m, q);
        const [only] = enumerate(m, q);
        expect(z).not.toBeNull();
        for (let i = 0; i < n; i += 1) expect(z?.[i]).toBeCloseTo(only[i], 7);
      }),
      { numRuns: 500 },
    );
  });

  it('of any matrix gives a solution that the enumeration knows, or none', () => {
    let solved = 0;
    fc.assert(
      fc.property(problem, ([m, q]) => {
        const z = of(m, q);
        const all = enumerate(m, q);
        if (!z) return;
        solved += 1;
        const w = q.map((value, i) => value + m[i].reduce((sum, a, j) => sum + a * z[j], 0));
        z.forEach((value, i) => {
          expect(value).toBeGreaterThanOrEqual(0);
          expect(w[i]).toBeGreaterThanOrEqual(-1e-6);
          expect(Math.abs(value * w[i])).toBeLessThan(1e-5 * (1 + value));
        });
        expect(all.length).toBeGreaterThan(0);
      }),
      { numRuns: 500 },
    );
    expect(solved).toBeGreaterThan(100);
  });

  it('finds one for every copositive-plus matrix of contact: M = D G Dᵀ short of rank, q in its range', () => {
    fc.assert(
      fc.property(square(4), fc.array(entry, { minLength: 4, maxLength: 4 }), (a, x) => {
        // Two directions seen by four points: a box's corners on a floor. q = D v can be met by forces that push.
        const d = a.map(([p, r]) => [p, r]);
        const m = d.map(([p, r]) => d.map(([s, t]) => p * s + r * t));
        const q = d.map(([p, r]) => p * x[0] + r * x[1]);
        const z = of(m, q);
        expect(z).not.toBeNull();
        const w = q.map((value, i) => value + m[i].reduce((sum, value2, j) => sum + value2 * (z?.[j] ?? NaN), 0));
        expect(Math.min(...w)).toBeGreaterThan(-1e-6);
      }),
      { numRuns: 300 },
    );
  });
});
