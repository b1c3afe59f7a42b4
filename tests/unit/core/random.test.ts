import { describe, expect, it } from 'vitest';
import { Random } from '../../../sim/core/random.js';

const draws = (seed: number, count: number): number[] => {
  const random = new Random(seed);
  return Array.from({ length: count }, () => random.next());
};

describe('Random', () => {
  it('repeats its sequence from the same seed, and not from another', () => {
    expect(draws(7, 20)).toEqual(draws(7, 20));
    expect(draws(7, 20)).not.toEqual(draws(8, 20));
  });

  it('is uniform: mean, variance, and the counts of twenty bins by the chi-squared test', () => {
    const all = draws(1, 100_000);
    const mean = all.reduce((a, b) => a + b, 0) / all.length;
    const variance = all.reduce((a, b) => a + (b - mean) ** 2, 0) / all.length;
    expect(Math.abs(mean - 0.5)).toBeLessThan(3e-3);
    expect(Math.abs(variance - 1 / 12)).toBeLessThan(1e-3);
    const bins = new Array<number>(20).fill(0);
    for (const x of all) bins[Math.floor(20 * x)] += 1;
    const chi = bins.reduce((sum, n) => sum + (n - 5000) ** 2 / 5000, 0);
    // 19 degrees of freedom: 99.9 % lies between 5.4 and 43.8.
    expect(chi).toBeGreaterThan(5.4);
    expect(chi).toBeLessThan(43.8);
  });

  it('draws between two bounds', () => {
    const random = new Random(3);
    for (let i = 0; i < 1000; i += 1) {
      const x = random.between(-2, 5);
      expect(x >= -2 && x < 5).toBe(true);
    }
  });

  it('draws normal numbers with mean 0, variance 1 and kurtosis 3', () => {
    const random = new Random(5);
    const all = Array.from({ length: 100_000 }, () => random.normal());
    const moment = (k: number): number => all.reduce((sum, x) => sum + x ** k, 0) / all.length;
    expect(Math.abs(moment(1))).toBeLessThan(0.015);
    expect(Math.abs(moment(2) - 1)).toBeLessThan(0.02);
    expect(Math.abs(moment(4) - 3)).toBeLessThan(0.15);
  });
});
