import { describe, expect, it } from 'vitest';
import { gaussLegendre } from '../../../sim/core/quadrature.js';

/** Legendre polynomial P₁₆ and its derivative, by recurrence. */
function legendre(x: number): { value: number; slope: number } {
  let before = 1;
  let value = x;
  for (let n = 2; n <= 16; n += 1) [before, value] = [value, ((2 * n - 1) * x * value - (n - 1) * before) / n];
  return { value, slope: (16 * (x * value - before)) / (x * x - 1) };
}

/** The abscissae the rule uses on [−1, 1], and what weight it gives each. */
function rule(): { node: number; weight: number }[] {
  const nodes: number[] = [];
  gaussLegendre((x) => (nodes.push(x), 0), -1, 1);
  return nodes.map((node) => ({ node, weight: gaussLegendre((x) => (x === node ? 1 : 0), -1, 1) }));
}

describe('gaussLegendre', () => {
  it('has its nodes at the zeros of P₁₆ and weights 2 / ((1 − x²) P₁₆′²)', () => {
    const all = rule();
    expect(all).toHaveLength(16);
    for (const { node, weight } of all) {
      const { value, slope } = legendre(node);
      expect(Math.abs(value / slope)).toBeLessThan(3e-16);
      expect(Math.abs(weight - 2 / ((1 - node * node) * slope * slope))).toBeLessThan(1e-14);
    }
  });

  it('integrates powers up to 31 exactly, and not the 32nd', () => {
    for (let k = 0; k <= 30; k += 1) {
      const exact = (2 ** (k + 1) - 1) / (k + 1);
      expect(Math.abs(gaussLegendre((x) => x ** k, 1, 2) / exact - 1)).toBeLessThan(1e-14);
    }
    const missed = gaussLegendre((x) => x ** 32, -1, 1) - 2 / 33;
    expect(Math.abs(missed)).toBeGreaterThan(1e-10);
  });

  it('changes sign with the direction of integration', () => {
    expect(gaussLegendre(Math.exp, 1, 0)).toBeCloseTo(1 - Math.E, 14);
  });
});
