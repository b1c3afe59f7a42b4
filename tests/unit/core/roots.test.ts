import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { findRoot } from '../../../sim/core/roots.js';

describe('findRoot', () => {
  it('finds π/2 as the root of the cosine to the last bit, in few evaluations', () => {
    const found = findRoot(Math.cos, 0, 3);
    expect(found.reason).toBe('converged');
    expect(Math.abs(found.root - Math.PI / 2)).toBeLessThanOrEqual(2.3e-16);
    expect(found.evaluations).toBeLessThan(12);
  });

  it('keeps the sign change of any monotonic cubic inside its last bracket', () => {
    fc.assert(
      fc.property(
        fc.double({ min: -2, max: 2, noNaN: true }),
        fc.double({ min: 0, max: 3, noNaN: true }),
        fc.double({ min: 1e-3, max: 5, noNaN: true }),
        (root, slope, cube) => {
          const f = (x: number): number => (x - root) * (slope + cube * (x - root) ** 2);
          const found = findRoot(f, -3, 3.5);
          expect(found.reason).toBe('converged');
          expect(f(found.low) * f(found.high)).toBeLessThanOrEqual(0);
          expect(Math.abs(found.root - root)).toBeLessThan(1e-4);
          if (slope > 0.1) expect(Math.abs(found.root - root)).toBeLessThan(1e-14);
        },
      ),
    );
  });

  it('brackets a jump to the tolerance given', () => {
    const found = findRoot((t) => (t < 0.3 ? -1 : 1), 0, 1, 1e-9);
    expect(found.low).toBeLessThan(0.3);
    expect(found.high).toBeGreaterThanOrEqual(0.3);
    expect(found.high - found.low).toBeLessThanOrEqual(1e-9);
  });

  it('takes a root at either end of the interval', () => {
    expect(findRoot((x) => x - 1, 1, 4).root).toBe(1);
    expect(findRoot((x) => x - 4, 1, 4).root).toBe(4);
  });

  it('is no slower than a few times bisection on a ninefold root', () => {
    const found = findRoot((x) => (x - 0.3) ** 9, 0, 1, 1e-9);
    expect(found.reason).toBe('converged');
    expect(found.evaluations).toBeLessThan(120);
  });

  it('says so when there is no change of sign, or a value is not finite', () => {
    expect(findRoot((x) => x * x + 1, -1, 1).reason).toBe('noSignChange');
    expect(findRoot((x) => 1 / x, -1, 0).reason).toBe('nonFinite');
    expect(findRoot((x) => (x === -1 ? -1 : x === 1 ? 1 : NaN), -1, 1).reason).toBe('nonFinite');
  });
});
