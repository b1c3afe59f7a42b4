import { describe, expect, it } from 'vitest';
import { leastOf, peakOf, type Sample } from '../../../sim/criteria/peak.js';

const sampled = (f: (t: number) => number, from: number, step: number, count: number): Sample[] =>
  Array.from({ length: count }, (_, i) => ({ time: from + i * step, value: f(from + i * step) }));

describe('the greatest of sampled values', () => {
  it('is the vertex of a parabola wherever the samples fall on it', () => {
    for (const shift of [0, 0.013, 0.05, 0.099]) {
      const { value, time } = peakOf([sampled((t) => 7 - 3 * (t - 1) ** 2, shift, 0.1, 21)]);
      expect(value).toBeCloseTo(7, 12);
      expect(time).toBeCloseTo(1, 12);
    }
  });

  it('comes nearer to the crest of a sine with the fourth power of the step, and says how far off it is', () => {
    const errors = [20, 40, 80].map((count) => {
      const step = 1 / count;
      // Off centre by a quarter of a step, where the third-order term does not vanish.
      const { value, resolution } = peakOf([sampled((t) => Math.sin(Math.PI * t), step / 4, step, count)]);
      const error = Math.abs(value - 1);
      expect(error).toBeLessThanOrEqual(resolution);
      return error;
    });
    expect(Math.log2(errors[0] / errors[1])).toBeGreaterThan(2.7);
    expect(Math.log2(errors[1] / errors[2])).toBeGreaterThan(2.7);
    expect(errors[2]).toBeLessThan(2e-7);
  });

  it('finds the same with an event row right beside the highest one, and between uneven rows', () => {
    const f = (t: number): number => 7 - 3 * (t - 1) ** 2;
    const even = sampled(f, 0.03, 0.1, 20);
    const beside = [...even, { time: 1.03 + 1e-13, value: f(1.03) }].sort((a, b) => a.time - b.time);
    expect(peakOf([beside]).value).toBeCloseTo(7, 12);
    const uneven = [0, 0.2, 0.5, 0.7, 0.9, 1.15, 1.3, 1.6, 2].map((time) => ({ time, value: f(time) }));
    expect(peakOf([uneven]).value).toBeCloseTo(7, 12);
  });

  it('does not overshoot a jump: the highest sample is taken, and its neighbour says how open that is', () => {
    const jump = [0, 0, 0, 10, 9, 8, 7].map((value, time) => ({ time, value }));
    expect(peakOf([jump])).toEqual({ time: 3, value: 10, resolution: 1 });
    const plateau = [0, 0, 5, 5, 5, 0, 0].map((value, time) => ({ time, value }));
    expect(peakOf([plateau])).toEqual({ time: 2, value: 5, resolution: 0 });
  });

  it('is a row at an end of the span, where nothing is open', () => {
    expect(peakOf([[1, 2, 4].map((value, time) => ({ time, value }))])).toEqual({ time: 2, value: 4, resolution: 0 });
    expect(peakOf([[4, 2, 1].map((value, time) => ({ time, value }))])).toEqual({ time: 0, value: 4, resolution: 0 });
  });

  it('takes the highest of several pieces, and never looks across what parts them', () => {
    const pieces = [[1, 2, 3], [8, 5, 4], []].map((values) => values.map((value, time) => ({ time, value })));
    expect(peakOf(pieces)).toEqual({ time: 0, value: 8, resolution: 0 });
  });

  it('finds the least likewise', () => {
    expect(leastOf([sampled((t) => 3 * (t - 1) ** 2 - 7, 0.03, 0.1, 20)]).value).toBeCloseTo(-7, 12);
  });
});
