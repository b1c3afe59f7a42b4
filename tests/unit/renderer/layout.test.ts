import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Vec } from '../../../sim/core/vec.js';
import { frameGeometry, rowLetter, zoneAt } from '../../../renderer/frame/geometry.js';
import { layoutOf } from '../../../renderer/frame/layout.js';
import { chartLayout, timeAt, timeAxis, xOf } from '../../../renderer/recorder/chart-layout.js';
import { flagSides } from '../../../renderer/recorder/flags.js';
import { labelLayers } from '../../../renderer/recorder/label-layers.js';
import { clearances, fitDrawing, isFree, readingsCorners } from '../../../renderer/sheet/fit.js';

describe('the frame', () => {
  it.each([
    [1280, 720, 10, 6],
    [1440, 900, 10, 6],
    [1920, 1080, 14, 8],
  ])('at %i × %i has %i by %i zones, even numbers as ISO 5457 asks', (width, height, columns, rows) => {
    expect(frameGeometry(width, height)).toMatchObject({ columns, rows });
  });

  it('letters its rows without I and O', () => {
    expect(Array.from({ length: 15 }, (_, i) => rowLetter(i)).join('')).toBe('ABCDEFGHJKLMNPQ');
  });

  it('names the zone of a point, and holds points outside to the nearest', () => {
    const frame = frameGeometry(1440, 900);
    expect(zoneAt(frame, 20, 60)).toBe('A1');
    expect(zoneAt(frame, 1430, 890)).toBe('F10');
    expect(zoneAt(frame, -50, 5000)).toBe('F1');
  });

  it('gives the recorder at most a third of the height and the title column a constant width', () => {
    fc.assert(
      fc.property(fc.integer({ min: 1024, max: 3840 }), fc.integer({ min: 640, max: 2160 }), (width, height) => {
        const frame = frameGeometry(width, height);
        const { paper, toolbar, title } = layoutOf(frame, height);
        expect(paper + toolbar).toBeLessThanOrEqual(Math.max(height / 3 + 1, 150 + toolbar));
        expect(title).toBe(frame.compact ? 372 : 420);
      }),
    );
  });
});

describe('laying down a drawing', () => {
  const field = { width: 800, height: 504 };
  const margins = { top: 64, bottom: 92, side: 24, below: 60 };
  const readings = { width: 336, height: 127 };
  const box = { left: 0, right: 1.9, low: 0, high: 0.7 };
  const ramp: Vec[] = Array.from({ length: 101 }, (_, i) => [0.019 * i, 0.7 - 0.007 * i]);

  it('takes the largest scale, with the readings over the low end of a ramp', () => {
    const fit = fitDrawing(box, ramp, field, margins, readings);
    expect(fit.scale.label).toBe('1:10');
    const [right] = readingsCorners(field, readings);
    expect(isFree(right, readings, ramp, fit, clearances[1])).toBe(true);
  });

  it('keeps within the margins, at whole pixels, for any box', () => {
    fc.assert(
      fc.property(
        fc.double({ min: 0.001, max: 50, noNaN: true }),
        fc.double({ min: 0.001, max: 50, noNaN: true }),
        (width, height) => {
          const any = { left: -width / 3, right: (2 * width) / 3, low: -height, high: 0 };
          const { scale, origin } = fitDrawing(any, [], field, margins, readings);
          expect(origin.every(Number.isInteger)).toBe(true);
          expect(origin[0] + any.left * scale.pixels).toBeGreaterThanOrEqual(margins.side - 1);
          expect(origin[0] + any.right * scale.pixels).toBeLessThanOrEqual(field.width - margins.side + 1);
          expect(origin[1] - any.high * scale.pixels).toBeGreaterThanOrEqual(margins.top - 1);
          expect(origin[1] - any.low * scale.pixels).toBeLessThanOrEqual(field.height - margins.bottom + 1);
        },
      ),
    );
  });

  it('moves a narrow, high drawing beside the readings before it makes it smaller', () => {
    const tower: Vec[] = Array.from({ length: 50 }, (_, i) => [0.3 * (i % 2), (0.85 * i) / 49]);
    const fit = fitDrawing({ left: 0, right: 0.3, low: 0, high: 0.85 }, tower, field, margins, readings);
    expect(fit.scale.label).toBe('1:10');
    const corners = readingsCorners(field, readings);
    expect(corners.some((corner) => isFree(corner, readings, tower, fit, clearances[1]))).toBe(true);
  });
});

describe('the recorder’s paper', () => {
  const layout = chartLayout(970, 237);

  it('turns times into places and back', () => {
    const axis = timeAxis(1.6, false, 2);
    for (const time of [0, 0.4, 1.6]) expect(timeAt(layout, axis, xOf(layout, axis, time))).toBeCloseTo(time, 12);
    expect(timeAt(layout, axis, -100)).toBe(0);
    expect(timeAt(layout, axis, 5000)).toBe(1.6);
  });

  it('ends where the run ended, and grows in round steps while it is recorded', () => {
    expect(timeAxis(1.588, false, 10).end).toBe(1.588);
    expect(timeAxis(0.3, true, 10).end).toBe(0.5);
    expect(timeAxis(9, true, 10).end).toBe(10);
    expect(timeAxis(0, true, 10).end).toBeGreaterThan(0);
    expect(timeAxis(1.6, false, 2)).toMatchObject({ step: 0.2, decimals: 1 });
  });

  it('flies pennants apart where stations are close', () => {
    expect(flagSides([0, 500, 530])).toEqual([1, -1, 1]);
    // The first has the margin of the paper on its left.
    expect(flagSides([0, 10, 500])).toEqual([-1, 1, 1]);
  });

  it('names layers where they are thick, others beside them with a leader, and none over another', () => {
    const xs = Float64Array.from({ length: 101 }, (_, i) => layout.left + ((layout.right - layout.left) * i) / 100);
    const { top, bottom } = layout.energy;
    const level = (y: number) => Float64Array.from(xs, () => y);
    const bands = [
      { lower: level(bottom), upper: level(bottom - 30) },
      { lower: level(bottom - 30), upper: level(bottom - 35) },
      { lower: level(bottom - 35), upper: level(top) },
    ];
    const labels = labelLayers(xs, bands, ['friction', 'impact', 'motion'], (text) => text.length * 7, layout);
    expect(labels.map(({ text, from }) => [text, from !== undefined])).toEqual([
      ['friction', false],
      ['impact', true],
      ['motion', false],
    ]);
    for (const a of labels)
      for (const b of labels)
        if (a !== b) {
          const apartX = Math.abs(a.at[0] - b.at[0]) >= ((a.text.length + b.text.length) * 7) / 2;
          expect(apartX || Math.abs(a.at[1] - b.at[1]) >= 14).toBe(true);
        }
  });
});
