import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Vec } from '../../../sim/core/vec.js';
import { dashed, dashes } from '../../../sim/drawing/dash.js';
import { hatchPolygon, hatchSide } from '../../../sim/drawing/hatch.js';
import { boxAround, drawingScales, fittingScales, niceAtLeast, scaleEnd } from '../../../sim/drawing/paper.js';

const lengths = (ends: readonly number[]) =>
  Array.from({ length: ends.length / 4 }, (_, i) => Math.hypot(ends[4 * i + 2] - ends[4 * i], ends[4 * i + 3] - ends[4 * i + 1])); // prettier-ignore

describe('dashes', () => {
  it('cover the share of a line that the pattern says', () => {
    const drawn = lengths(dashed([[0, 0], [9000, 0]], dashes.chain)).reduce((sum, length) => sum + length, 0); // prettier-ignore
    const [dash, gap, dot, after] = dashes.chain;
    expect(drawn / 9000).toBeCloseTo((dash + dot) / (dash + gap + dot + after), 3);
  });

  it('go around corners without starting anew', () => {
    const straight = dashed([[0, 0], [100, 0]], dashes.phantom); // prettier-ignore
    const bent = dashed([[0, 0], [50, 0], [50, 50]], dashes.phantom); // prettier-ignore
    const total = (ends: readonly number[]) => lengths(ends).reduce((sum, length) => sum + length, 0);
    expect(total(bent)).toBeCloseTo(total(straight), 9);
  });
});

describe('hatching', () => {
  it('of a polygon has the length of its area over the spacing, at any angle', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 0, max: Math.PI, noNaN: true }),
        fc.integer({ min: 20, max: 200 }),
        (angle, side) => {
          const square: Vec[] = [[0, 0], [side, 0], [side, side], [0, side]]; // prettier-ignore
          const total = lengths(hatchPolygon(square, { angle, spacing: 1 })).reduce((sum, length) => sum + length, 0);
          // The trapezoid rule on the square's width across the lines: its error is a few lines' lengths.
          expect(Math.abs(total - side * side)).toBeLessThan(4 * side);
        },
      ),
    );
  });

  it('stays out of the hollow of a polygon that is not convex', () => {
    const channel: Vec[] = [[0, 0], [30, 0], [30, 30], [20, 30], [20, 10], [10, 10], [10, 30], [0, 30]]; // prettier-ignore
    const ends = hatchPolygon(channel, { angle: 0, spacing: 2, shift: 1 });
    for (let i = 0; i < ends.length; i += 4) {
      const [x1, y, x2] = [ends[i], ends[i + 1], ends[i + 2]];
      const middle = (x1 + x2) / 2;
      expect(y > 10 && middle > 10 && middle < 20).toBe(false);
    }
  });

  it('along a track lies on the side that is asked for', () => {
    const path: Vec[] = [[0, 0], [40, 0]]; // prettier-ignore
    const below = hatchSide(path, { side: 1, spacing: 5, depth: 4 });
    const above = hatchSide(path, { side: -1, spacing: 5, depth: 4 });
    expect(below.length / 4).toBe(8);
    expect(below.filter((_, i) => i % 4 === 3).every((y) => y === 4)).toBe(true);
    expect(above.filter((_, i) => i % 4 === 3).every((y) => y === -4)).toBe(true);
  });
});

describe('drawing scales', () => {
  it('are those of ISO 5455, each about half of the one before', () => {
    const labels = drawingScales.map(({ label }) => label);
    for (const label of ['1:1', '1:2', '1:5', '1:10', '1:20', '1:50', '2:1', '5:1', '10:1'])
      expect(labels).toContain(label);
    const ratios = drawingScales.slice(1).map(({ pixels }, i) => drawingScales[i].pixels / pixels);
    expect(ratios.every((ratio) => ratio >= 1.99 && ratio <= 2.51)).toBe(true);
  });

  it('draw 1:10 at 0.378 pixels for a millimetre (96 dpi)', () => {
    const scale = drawingScales.find(({ label }) => label === '1:10')!;
    expect(scale.pixels / 1000).toBeCloseTo(96 / 25.4 / 10, 12);
  });

  it('fit: the first is the largest at which the box goes into the field', () => {
    const box = { left: -0.15, right: 1.84, low: -0.62, high: 0.22 };
    expect(fittingScales(box, 760, 360)[0].label).toBe('1:10');
    expect(fittingScales(box, 740, 360)[0].label).toBe('1:20');
    expect(fittingScales(box, 760, 300)[0].label).toBe('1:20');
  });

  it('round up to figures a person would choose', () => {
    expect([0.003, 1, 1.1, 2.2, 7, 42].map(niceAtLeast)).toEqual([0.005, 1, 2, 5, 10, 50]);
    expect(scaleEnd(2.28)).toBeCloseTo(2.4, 12);
    expect(boxAround([])).toBeNull();
  });
});
