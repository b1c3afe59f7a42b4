import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { rotate, type Vec } from '../../../sim/core/vec.js';
import {
  bodyGap,
  buildTrack,
  freeDistance,
  partGap,
  pointToPart,
  trackGap,
  type ConvexPart,
} from '../../../sim/geometry/index.js';
import type { Shape } from '../../../sim/mechanism/kinds/body.js';
import { arc, bulgeOf, line, track } from './support.js';

const placed = (shape: Shape, at: Vec, angle = 0): { shape: Shape; at: Vec; angle: number } => ({ shape, at, angle });
const box = (width: number, height: number): Shape => ({ kind: 'box', width, height });

/** A regular polygon or segment or point, swelled, turned and moved. */
const part: fc.Arbitrary<ConvexPart> = fc
  .record({
    corners: fc.integer({ min: 1, max: 6 }),
    reach: fc.double({ min: 0.2, max: 1, noNaN: true }),
    angle: fc.double({ min: 0, max: 6, noNaN: true }),
    x: fc.double({ min: -2, max: 2, noNaN: true }),
    y: fc.double({ min: -2, max: 2, noNaN: true }),
    radius: fc.constantFrom(0, 0.1, 0.3),
  })
  .map(({ corners, reach, angle, x, y, radius }) => ({
    radius,
    points: Array.from({ length: corners }, (_, k): Vec => {
      const [px, py] = rotate([reach, 0], angle + (2 * Math.PI * k) / corners);
      return [x + px, y + py];
    }),
  }));

/** Least distance by projections: the greatest separation over all directions is the distance of convex sets. */
function bySupport(a: ConvexPart, b: ConvexPart): number {
  const separation = (angle: number): number => {
    const [nx, ny] = [Math.cos(angle), Math.sin(angle)];
    const top = Math.max(...a.points.map(([x, y]) => x * nx + y * ny));
    const low = Math.min(...b.points.map(([x, y]) => x * nx + y * ny));
    return low - top;
  };
  let best = 0;
  for (let k = 1; k < 3600; k += 1)
    if (separation(k * (Math.PI / 1800)) > separation(best)) best = k * (Math.PI / 1800);
  let greatest = separation(best);
  for (let width = Math.PI / 1800; width > 1e-9; width *= 0.7) {
    for (const angle of [best - width, best + width]) {
      if (separation(angle) <= greatest) continue;
      best = angle;
      greatest = separation(angle);
    }
  }
  return greatest - a.radius - b.radius;
}

describe('the gap of two convex parts', () => {
  it('is their greatest separation over all directions, overlapping or not', () => {
    fc.assert(
      fc.property(part, part, (a, b) => {
        expect(Math.abs(partGap(a, b) - bySupport(a, b))).toBeLessThan(1e-6);
        expect(Math.abs(partGap(a, b) - partGap(b, a))).toBeLessThan(1e-14);
      }),
    );
  });

  it('to a point is negative inside by the depth below the nearest face', () => {
    const square: ConvexPart = {
      radius: 0,
      points: [
        [0, 0],
        [4, 0],
        [4, 2],
        [0, 2],
      ],
    };
    expect(pointToPart([1, 0.25], square)).toBeCloseTo(-0.25, 15);
    expect(pointToPart([7, 6], square)).toBeCloseTo(5, 15);
    expect(pointToPart([7, 6], { ...square, radius: 0.5 })).toBeCloseTo(4.5, 15);
  });
});

describe('the gap of two bodies', () => {
  it('is nil where a box stands on a box', () => {
    expect(bodyGap(placed(box(1, 1), [0, 0.5]), placed(box(3, 1), [0.7, -0.5]))).toBeCloseTo(0, 15);
  });

  it('takes the nearest part of a polygon with an inward corner', () => {
    const angle: Vec[] = [
      [0, 0],
      [3, 0],
      [3, 1],
      [1, 1],
      [1, 3],
      [0, 3],
    ];
    const disc: Shape = { kind: 'disc', radius: 0.5 };
    expect(bodyGap(placed({ kind: 'polygon', points: angle }, [0, 0]), placed(disc, [2, 2]))).toBeCloseTo(0.5, 14);
    expect(bodyGap(placed({ kind: 'polygon', points: angle }, [0, 0]), placed(disc, [1.5, 1.4]))).toBeCloseTo(-0.1, 14);
  });

  it('is without bound to a body that touches nothing', () => {
    expect(bodyGap(placed({ kind: 'none' }, [0, 0]), placed(box(1, 1), [0, 0]))).toBe(Infinity);
  });
});

const floor = buildTrack(track([-5, 0], [line(5, 0)]));

describe('the gap of a body and a track', () => {
  it('is the height above a floor, and negative by the depth below it', () => {
    const state = (y: number): [string, number] => {
      const { state, gap } = trackGap(placed(box(2, 1), [0, y]), floor);
      return [state, Math.round(gap * 1e12) / 1e12];
    };
    expect(state(0.75)).toEqual(['clear', 0.25]);
    expect(state(0.4)).toEqual(['inside', -0.1]);
    expect(state(-0.75)).toEqual(['behind', -0.25]);
  });

  it('turns round for a track free on the right', () => {
    const ceiling = buildTrack(track([-5, 0], [line(5, 0)], { side: 'right' }));
    expect(trackGap(placed(box(2, 1), [0, -0.75]), ceiling)).toMatchObject({ state: 'clear', gap: 0.25 });
  });

  it('of a disc is its centre’s distance less its radius, also round a corner and past an end', () => {
    const disc: Shape = { kind: 'disc', radius: 0.5 };
    expect(trackGap(placed(disc, [0, 0.7]), floor).gap).toBeCloseTo(0.2, 14);
    expect(trackGap(placed(disc, [5.3, 0.4]), floor).gap).toBeCloseTo(0, 14);
    expect(trackGap(placed(disc, [5.3, 0.3]), floor).state).toBe('inside');
    expect(trackGap(placed(disc, [8, -0.3]), floor).state).toBe('clear');
  });

  it('sees a ridge that pierces a face between its corners', () => {
    const ridge = buildTrack(track([-5, -1], [line(0, 0.2), line(5, -1)]));
    const found = trackGap(placed(box(4, 1), [0, 0.6]), ridge);
    expect(found.state).toBe('inside');
    expect(found.gap).toBeCloseTo(-0.1, 14);
    expect(found.at).toEqual([0, 0.2]);
  });

  it('sees a hump that bulges through a face between its corners', () => {
    const hump = buildTrack(track([-1, 0], [arc([1, 0], bulgeOf(-60))]));
    const top = 1 / Math.sin(Math.PI / 6) - Math.sqrt(3);
    const found = trackGap(placed(box(3, 1), [0, 0.5 + top - 0.05]), hump);
    expect(found.state).toBe('inside');
    expect(found.gap).toBeCloseTo(-0.05, 12);
    expect(trackGap(placed(box(3, 1), [0, 0.5 + top + 0.05]), hump).state).toBe('clear');
  });

  it('knows the solid side at a ridge and at a valley', () => {
    const ridge = buildTrack(track([-1, -1], [line(0, 0), line(1, -1)]));
    const valley = buildTrack(track([-1, 1], [line(0, 0), line(1, 1)]));
    expect(freeDistance(ridge, 0, 0.3).away).toBeCloseTo(0.3, 14);
    expect(freeDistance(valley, 0, -0.3).away).toBeCloseTo(-0.3, 14);
    expect(freeDistance(valley, 0, 0.3).away).toBeCloseTo(0.3 * Math.SQRT1_2, 14);
  });

  it('is clear on either side of a track free on both, and inside across it', () => {
    const plate = buildTrack(track([-5, 0], [line(5, 0)], { side: 'both' }));
    expect(trackGap(placed(box(2, 1), [0, 0.75]), plate)).toMatchObject({ state: 'clear', gap: 0.25 });
    expect(trackGap(placed(box(2, 1), [0, -0.75]), plate)).toMatchObject({ state: 'clear', gap: 0.25 });
    expect(trackGap(placed(box(2, 1), [0, 0.4]), plate).state).toBe('inside');
  });

  it('does not take a body under the far end of a shelf for one that crosses it', () => {
    const shelf = buildTrack(track([-1, 0], [line(1, 0)]));
    expect(trackGap(placed(box(2, 1), [1, -0.8]), shelf).state).toBe('behind');
  });
});
