import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Vec } from '../../../sim/core/vec.js';
import {
  convexParts,
  convexPolygons,
  counterClockwise,
  isConvex,
  isInside,
  selfCrossings,
  signedArea,
} from '../../../sim/geometry/index.js';
import { star } from './support.js';

const bowTie: Vec[] = [
  [0, 0],
  [2, 2],
  [2, 0],
  [0, 2],
];
const arrow: Vec[] = [
  [0, 0],
  [4, 0],
  [4, 4],
  [2, 1],
];

/** Winding number by summed angles: a second way to tell inside from outside. */
function winding(points: readonly Vec[], [x, y]: Vec): number {
  let sum = 0;
  points.forEach(([px, py], i) => {
    const [qx, qy] = points[(i + 1) % points.length];
    const [ax, ay, bx, by] = [px - x, py - y, qx - x, qy - y];
    sum += Math.atan2(ax * by - ay * bx, ax * bx + ay * by);
  });
  return Math.round(sum / (2 * Math.PI));
}

describe('a polygon', () => {
  it('has a positive area counter-clockwise and is turned into that sense', () => {
    fc.assert(
      fc.property(star, (points) => {
        const reversed = [...points].reverse();
        expect(signedArea(points)).toBeGreaterThan(0);
        expect(signedArea(reversed)).toBeCloseTo(-signedArea(points), 12);
        expect(signedArea(counterClockwise(reversed))).toBeCloseTo(signedArea(points), 12);
        expect(counterClockwise(reversed)[0]).toEqual(reversed[0]);
      }),
    );
  });

  it('has inside what its edges wind about', () => {
    fc.assert(
      fc.property(
        star,
        fc.double({ min: -2, max: 2, noNaN: true }),
        fc.double({ min: -2, max: 2, noNaN: true }),
        (points, x, y) => {
          expect(isInside(points, [x, y])).toBe(winding(points, [x, y]) !== 0);
        },
      ),
    );
  });

  it('knows an inward corner', () => {
    expect(isConvex(bowTie.slice(0, 3))).toBe(true);
    expect(isConvex(arrow)).toBe(false);
    expect(isConvex([...arrow].reverse())).toBe(false);
  });
});

describe('the self-crossing check', () => {
  it('finds none in a simple polygon', () => {
    fc.assert(fc.property(star, (points) => selfCrossings(points).length === 0));
  });

  it('names the edges that cross', () => {
    expect(selfCrossings(bowTie)).toEqual([{ edges: [0, 2] }]);
  });

  it('finds a crossing in a simple polygon with two corners swapped so that edges cross', () => {
    fc.assert(
      fc.property(star, (points) => {
        const swapped = [points[1], points[0], ...points.slice(2)];
        fc.pre(isConvex(points));
        expect(selfCrossings(swapped).length).toBeGreaterThan(0);
      }),
    );
  });

  it('finds an edge that runs back over its neighbour, a corner on another edge, and a corner drawn twice', () => {
    const spike: Vec[] = [
      [0, 0],
      [3, 0],
      [1, 0],
      [1, 2],
    ];
    expect(selfCrossings(spike)).toContainEqual({ edges: [0, 1] });
    const pinched: Vec[] = [
      [0, 0],
      [4, 0],
      [4, 4],
      [2, 0],
      [0, 4],
    ];
    expect(selfCrossings(pinched).length).toBeGreaterThan(0);
    const doubled: Vec[] = [
      [0, 0],
      [1, 0],
      [1, 0],
      [0, 1],
    ];
    expect(selfCrossings(doubled).length).toBeGreaterThan(0);
  });
});

describe('the convex parts of a polygon', () => {
  it('are convex, counter-clockwise, and together have its area', () => {
    fc.assert(
      fc.property(star, (points) => {
        const parts = convexPolygons(points);
        for (const part of parts) {
          expect(isConvex(part)).toBe(true);
          expect(signedArea(part)).toBeGreaterThan(0);
        }
        const whole = parts.reduce((sum, part) => sum + signedArea(part), 0);
        expect(Math.abs(whole / signedArea(points) - 1)).toBeLessThan(1e-12);
      }),
    );
  });

  it('cover each inner point once', () => {
    fc.assert(
      fc.property(
        star,
        fc.double({ min: -2, max: 2, noNaN: true }),
        fc.double({ min: -2, max: 2, noNaN: true }),
        (points, x, y) => {
          const covered = convexPolygons(points).filter((part) => isInside(part, [x, y])).length;
          expect(covered).toBe(isInside(points, [x, y]) ? 1 : 0);
        },
      ),
    );
  });

  it('of a convex polygon is itself, without corners that are straight', () => {
    const square: Vec[] = [
      [0, 0],
      [1, 0],
      [2, 0],
      [2, 2],
      [0, 2],
    ];
    expect(convexPolygons(square)).toEqual([
      [
        [0, 0],
        [2, 0],
        [2, 2],
        [0, 2],
      ],
    ]);
  });

  it('of an L are two, not four triangles', () => {
    const angle: Vec[] = [
      [0, 0],
      [3, 0],
      [3, 1],
      [1, 1],
      [1, 3],
      [0, 3],
    ];
    expect(convexPolygons(angle)).toHaveLength(2);
  });

  it('of a comb of twenty teeth are found', () => {
    const teeth = Array.from({ length: 20 }, (_, k) => 19 - k).map((i): Vec[] => [
      [i + 0.5, 1],
      [i + 0.5, 2],
      [i, 2],
      [i, 1],
    ]);
    const comb: Vec[] = [[0, 0], [19.5, 0], ...teeth.flat()];
    expect(selfCrossings(comb)).toEqual([]);
    const parts = convexPolygons(comb);
    expect(parts.reduce((sum, part) => sum + signedArea(part), 0)).toBeCloseTo(signedArea(comb), 10);
    expect(parts.length).toBeLessThanOrEqual(40);
  });
});

describe('the convex parts of a shape', () => {
  it('are a swelled point for a disc, a swelled line for a bar, four corners for a box, nothing for none', () => {
    expect(convexParts({ kind: 'disc', radius: 2 })).toEqual([{ points: [[0, 0]], radius: 2 }]);
    expect(convexParts({ kind: 'particle' })).toEqual([{ points: [[0, 0]], radius: 0 }]);
    expect(convexParts({ kind: 'bar', length: 4, width: 1 })).toEqual([{ points: [[-2, 0], [2, 0]], radius: 0.5 }]); // prettier-ignore
    expect(convexParts({ kind: 'box', width: 2, height: 1 })[0].points).toHaveLength(4);
    expect(convexParts({ kind: 'none' })).toEqual([]);
  });
});
