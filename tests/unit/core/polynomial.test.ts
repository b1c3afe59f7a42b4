import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { evaluate, rootsInUnit } from '../../../sim/core/polynomial.js';

const out = new Float64Array(6);

function rootsOf(coefficients: number[]): number[] {
  const count = rootsInUnit(new Float64Array(coefficients), coefficients.length - 1, out);
  return [...out.subarray(0, count)];
}

/** Coefficients, lowest first, of lead · Π (x − r). */
function fromRoots(roots: number[], lead: number): number[] {
  return roots.reduce(
    (c, r) => Array.from({ length: c.length + 1 }, (_, k) => (c[k - 1] ?? 0) - r * (c[k] ?? 0)),
    [lead],
  );
}

const separated = fc
  .array(fc.integer({ min: -40, max: 140 }), { minLength: 5, maxLength: 5 })
  .filter((roots) => new Set(roots).size === 5)
  .map((roots) => roots.map((r) => r / 100).sort((a, b) => a - b));

describe('rootsInUnit', () => {
  it('finds every root of a quintic between 0 and 1 and no other', () => {
    fc.assert(
      fc.property(separated, fc.constantFrom(1, -3, 0.01), (roots, lead) => {
        const inside = roots.filter((r) => r > 0.001 && r < 0.999);
        const found = rootsOf(fromRoots(roots, lead)).filter((r) => r > 0.001 && r < 0.999);
        expect(found).toHaveLength(inside.length);
        found.forEach((root, i) => expect(Math.abs(root - inside[i])).toBeLessThan(1e-7));
      }),
    );
  });

  it('returns points where the polynomial is zero to rounding', () => {
    fc.assert(
      fc.property(separated, (roots) => {
        const c = fromRoots(roots, 1);
        const size = c.reduce((sum, x) => sum + Math.abs(x), 0);
        for (const root of rootsOf(c))
          expect(Math.abs(evaluate(new Float64Array(c), 5, root))).toBeLessThan(1e-15 * size);
      }),
    );
  });

  it('counts a root at an end once', () => {
    expect(rootsOf([0, 1])).toEqual([0]);
    expect(rootsOf([-1, 1])).toEqual([1]);
    expect(rootsOf([0, -1, 1])).toEqual([0, 1]);
  });

  it('ignores zero leading coefficients', () => {
    expect(rootsOf([-0.5, 1, 0, 0, 0, 0])).toEqual([0.5]);
    expect(rootsOf([1, 0, 0, 0, 0, 0])).toEqual([]);
  });

  it('has no roots for a polynomial that is zero throughout', () => {
    expect(rootsOf([0, 0, 0, 0, 0, 0])).toEqual([]);
  });

  it('finds a double root that touches zero exactly', () => {
    expect(rootsOf([0.25, -1, 1])).toEqual([0.5]);
  });
});
