import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { rotate, type Vec } from '../../../sim/core/vec.js';
import { camOutline, massProperties, sectionOf, type Section } from '../../../sim/geometry/index.js';
import type { CamShape, Shape } from '../../../sim/mechanism/kinds/body.js';
import { star } from './support.js';

const size = fc.double({ min: 0.01, max: 3, noNaN: true });

/** Second formula for a polygon: a fan of triangles from the first corner, each with its own centroid and the parallel axis theorem. */
function byTriangles(points: readonly Vec[]): Section {
  const [a, ...rest] = points;
  const triangles = rest.slice(1).map((c, i) => {
    const b = rest[i];
    const area = ((b[0] - a[0]) * (c[1] - a[1]) - (b[1] - a[1]) * (c[0] - a[0])) / 2;
    const centroid: Vec = [(a[0] + b[0] + c[0]) / 3, (a[1] + b[1] + c[1]) / 3];
    const squares = [
      [a, b],
      [b, c],
      [c, a],
    ].reduce((sum, [p, q]) => sum + (p[0] - q[0]) ** 2 + (p[1] - q[1]) ** 2, 0);
    return { area, centroid, polarMoment: (area * squares) / 36 };
  });
  const area = triangles.reduce((sum, t) => sum + t.area, 0);
  const centroid: Vec = [
    triangles.reduce((sum, t) => sum + t.area * t.centroid[0], 0) / area,
    triangles.reduce((sum, t) => sum + t.area * t.centroid[1], 0) / area,
  ];
  const polarMoment = triangles.reduce(
    (sum, t) =>
      sum + t.polarMoment + t.area * ((t.centroid[0] - centroid[0]) ** 2 + (t.centroid[1] - centroid[1]) ** 2),
    0,
  );
  return { area, centroid, polarMoment };
}

/** Second formula for a convex outline about the origin: rings r dr dφ out to the outline's reach, by the trapezoidal rule. */
function byPolar(reach: (angle: number) => number, steps: number): { area: number; polarMoment: number } {
  let area = 0;
  let polarMoment = 0;
  for (let k = 0; k < steps; k += 1) {
    const r = reach((2 * Math.PI * (k + 0.5)) / steps);
    area += (r ** 2 / 2) * ((2 * Math.PI) / steps);
    polarMoment += (r ** 4 / 4) * ((2 * Math.PI) / steps);
  }
  return { area, polarMoment };
}

const near = (value: number, expected: number, relative: number): void =>
  expect(Math.abs(value - expected)).toBeLessThanOrEqual(relative * Math.abs(expected));

describe('the section of a polygon', () => {
  it('is that of a fan of triangles, convex or not, in either sense', () => {
    fc.assert(
      fc.property(star, fc.boolean(), (points, reverse) => {
        const section = sectionOf({ kind: 'polygon', points: reverse ? [...points].reverse() : points });
        const other = byTriangles(points);
        near(section.area, other.area, 1e-12);
        near(section.polarMoment, other.polarMoment, 1e-11);
        expect(
          Math.hypot(section.centroid[0] - other.centroid[0], section.centroid[1] - other.centroid[1]),
        ).toBeLessThan(1e-12);
      }),
    );
  });

  it('moves with the polygon and does not change as it turns, also a kilometre away', () => {
    fc.assert(
      fc.property(star, fc.double({ min: -4, max: 4, noNaN: true }), (points, angle) => {
        const here = sectionOf({ kind: 'polygon', points });
        const moved = points.map((p): Vec => {
          const [x, y] = rotate(p, angle);
          return [x + 1000, y - 500];
        });
        const there = sectionOf({ kind: 'polygon', points: moved });
        near(there.area, here.area, 1e-11);
        near(there.polarMoment, here.polarMoment, 1e-10);
        const [cx, cy] = rotate(here.centroid, angle);
        expect(Math.hypot(there.centroid[0] - cx - 1000, there.centroid[1] - cy + 500)).toBeLessThan(1e-10);
      }),
    );
  });
});

describe('the section of a round or square shape', () => {
  it('of a disc is π r² and π r⁴/2, as integrated in rings', () => {
    fc.assert(
      fc.property(size, (radius) => {
        const section = sectionOf({ kind: 'disc', radius });
        const rings = byPolar(() => radius, 8);
        near(section.area, rings.area, 1e-13);
        near(section.polarMoment, rings.polarMoment, 1e-13);
      }),
    );
  });

  it('of a box is that of the polygon with its corners', () => {
    fc.assert(
      fc.property(size, size, (width, height) => {
        const section = sectionOf({ kind: 'box', width, height });
        const corners: Vec[] = [
          [0, 0],
          [width, 0],
          [width, height],
          [0, height],
        ];
        const other = byTriangles(corners);
        near(section.area, other.area, 1e-13);
        near(section.polarMoment, other.polarMoment, 1e-12);
      }),
    );
  });

  it('of a bar is what its outline encloses, integrated in polar coordinates', () => {
    fc.assert(
      fc.property(size, size, (length, width) => {
        const section = sectionOf({ kind: 'bar', length, width });
        const r = width / 2;
        const reach = (angle: number): number => {
          const [c, s] = [Math.abs(Math.cos(angle)), Math.abs(Math.sin(angle))];
          // Straight side first; where it is past the round end's centre, the circle about (length/2, 0).
          const flat = r / s;
          if (flat * c <= length / 2) return flat;
          return (length / 2) * c + Math.sqrt(r ** 2 - ((length / 2) * s) ** 2);
        };
        const other = byPolar(reach, 40_000);
        near(section.area, other.area, 1e-5);
        near(section.polarMoment, other.polarMoment, 1e-4);
      }),
      { numRuns: 30 },
    );
  });

  it('of a bar without length is a disc, and of a very thin one a slender rod', () => {
    const disc = sectionOf({ kind: 'disc', radius: 0.4 });
    const bar = sectionOf({ kind: 'bar', length: 0, width: 0.8 });
    near(bar.area, disc.area, 1e-15);
    near(bar.polarMoment, disc.polarMoment, 1e-15);
    const rod = massProperties({ kind: 'bar', length: 2, width: 1e-5 }, { mass: 3 });
    near(rod.inertia, (3 * 2 ** 2) / 12, 1e-4);
  });
});

const cam = (more: Partial<CamShape>): CamShape => ({
  kind: 'cam',
  baseRadius: 0.03,
  turns: 'counterclockwise',
  follower: { kind: 'roller', radius: 0.008, offset: 0.004, along: [0, 1] },
  segments: [
    { lift: 0.01, over: Math.PI / 2, law: 'cycloidal' },
    { lift: 0, over: Math.PI / 6, law: 'dwell' },
    { lift: -0.01, over: Math.PI / 2, law: 'modified-trapezoid' },
    { lift: 0, over: (5 * Math.PI) / 6, law: 'dwell' },
  ],
  ...more,
});

describe('the section of a cam', () => {
  const followers: CamShape['follower'][] = [
    { kind: 'roller', radius: 0.008, offset: 0.004, along: [0, 1] },
    { kind: 'flat', radius: 0, offset: 0, along: [1, 0] },
    { kind: 'knife', radius: 0, offset: 0, along: [0, 1] },
  ];

  it('is that of a polygon of ten thousand points on its profile', () => {
    for (const follower of followers) {
      const shape = cam({ follower, baseRadius: 0.05 });
      const section = sectionOf(shape);
      const other = byTriangles(camOutline(shape, 10_000));
      near(section.area, Math.abs(other.area), 1e-6);
      near(section.polarMoment, Math.abs(other.polarMoment), 1e-6);
      expect(Math.hypot(section.centroid[0] - other.centroid[0], section.centroid[1] - other.centroid[1])).toBeLessThan(
        1e-7,
      );
    }
  });

  it('of a cam that only dwells is a disc of the base radius', () => {
    const round = cam({ segments: [{ lift: 0, over: 2 * Math.PI, law: 'dwell' }] });
    const section = sectionOf(round);
    const disc = sectionOf({ kind: 'disc', radius: 0.03 });
    near(section.area, disc.area, 1e-13);
    near(section.polarMoment, disc.polarMoment, 1e-12);
    expect(Math.hypot(...section.centroid)).toBeLessThan(1e-15);
  });
});

describe('mass properties', () => {
  it('from density give the mass that from mass give back the same inertia', () => {
    const shape: Shape = { kind: 'box', width: 0.24, height: 0.16 };
    const steel = massProperties(shape, { arealDensity: 7850 * 0.01 });
    near(steel.mass, 7850 * 0.01 * 0.24 * 0.16, 1e-15);
    near(massProperties(shape, { mass: steel.mass }).inertia, steel.inertia, 1e-15);
    near(steel.inertia, (steel.mass * (0.24 ** 2 + 0.16 ** 2)) / 12, 1e-14);
  });

  it('of a particle and of a body without shape are a mass without inertia at the origin', () => {
    for (const kind of ['particle', 'none'] as const) {
      expect(massProperties({ kind }, { mass: 2 })).toEqual({ mass: 2, centroid: [0, 0], inertia: 0 });
    }
  });
});
