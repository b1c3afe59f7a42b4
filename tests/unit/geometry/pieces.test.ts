import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { distance, norm, subtract, type Vec } from '../../../sim/core/vec.js';
import { buildTrack, nearestOnRun, newFoot, pointAt, type SmoothRun } from '../../../sim/geometry/index.js';
import { arc, bulgeOf, segmentTrack, spline, track } from './support.js';

const only = (drawn: Parameters<typeof buildTrack>[0]): SmoothRun => buildTrack(drawn).runs[0];
const at = (run: SmoothRun, s: number): Vec => {
  const foot = pointAt(run, s);
  return [foot.x, foot.y];
};

describe('a point along a run', () => {
  it('has a unit tangent and a curvature that agree with finite differences of the points', () => {
    fc.assert(
      fc.property(segmentTrack, fc.double({ min: 0.05, max: 0.95, noNaN: true }), (drawn, fraction) => {
        const run = only(drawn);
        const s = fraction * run.length;
        const h = 2e-5;
        const here = pointAt(run, s);
        const [before, after] = [pointAt(run, s - h), pointAt(run, s + h)];
        // Where a random spline all but turns on the spot, differences say nothing.
        fc.pre([before, here, after].every((foot) => Math.abs(foot.curvature) < 50));
        const slope = [(after.x - before.x) / (2 * h), (after.y - before.y) / (2 * h)];
        expect(Math.abs(Math.hypot(here.tx, here.ty) - 1)).toBeLessThan(1e-14);
        expect(Math.hypot(slope[0] - here.tx, slope[1] - here.ty)).toBeLessThan(1e-5);
        const turned = Math.atan2(
          before.tx * after.ty - before.ty * after.tx,
          before.tx * after.tx + before.ty * after.ty,
        );
        expect(Math.abs(turned / (2 * h) - here.curvature)).toBeLessThan(0.05);
      }),
    );
  });

  it('starts and ends where the segment was drawn', () => {
    fc.assert(
      fc.property(segmentTrack, (drawn) => {
        const run = only(drawn);
        const last = drawn.segments[0];
        const end = last.kind === 'spline' ? last.through[last.through.length - 1] : last.to;
        expect(distance(at(run, 0), drawn.from)).toBeLessThan(1e-14);
        expect(distance(at(run, run.length), end)).toBeLessThan(1e-13);
      }),
    );
  });

  it('stays inside the bounding box, and the box is tight', () => {
    fc.assert(
      fc.property(segmentTrack, (drawn) => {
        const run = only(drawn);
        const points = Array.from({ length: 401 }, (_, k) => at(run, (run.length * k) / 400));
        const [xs, ys] = [points.map((p) => p[0]), points.map((p) => p[1])];
        const { minX, minY, maxX, maxY } = run.box;
        const gaps = [Math.min(...xs) - minX, Math.min(...ys) - minY, maxX - Math.max(...xs), maxY - Math.max(...ys)];
        for (const gap of gaps) {
          expect(gap).toBeGreaterThan(-1e-13);
          expect(gap).toBeLessThan(run.length / 400);
        }
      }),
    );
  });
});

describe('an arc drawn by its bulge', () => {
  it('lies on the circle through its ends with the centre worked out from chord and sagitta', () => {
    fc.assert(
      fc.property(fc.double({ min: -4, max: 4, noNaN: true }), (bulge) => {
        fc.pre(Math.abs(bulge) > 1e-3);
        const [a, b]: [Vec, Vec] = [
          [0.3, -0.2],
          [1.1, 0.7],
        ];
        const chord = distance(a, b);
        // Sagitta h = b c / 2, radius (c²/4 + h²) / 2h, the centre (r − h) to the left of the chord's middle.
        const sagitta = (bulge * chord) / 2;
        const radius = (chord ** 2 / 4 + sagitta ** 2) / (2 * sagitta);
        const toLeft: Vec = [-(b[1] - a[1]) / chord, (b[0] - a[0]) / chord];
        const rise = radius - sagitta;
        const center: Vec = [(a[0] + b[0]) / 2 + rise * toLeft[0], (a[1] + b[1]) / 2 + rise * toLeft[1]];
        const run = only(track(a, [arc(b, bulge)]));
        for (let k = 0; k <= 10; k += 1) {
          expect(Math.abs(distance(at(run, (run.length * k) / 10), center) / Math.abs(radius) - 1)).toBeLessThan(1e-12);
        }
        expect(Math.abs(run.length - Math.abs(4 * Math.atan(bulge) * radius))).toBeLessThan(1e-12 * run.length);
        expect(pointAt(run, 0).curvature * radius).toBeCloseTo(1, 12);
      }),
    );
  });

  it('turns left for a positive bulge: a quarter from (1, 0) to (0, 1) goes round the origin', () => {
    const run = only(track([1, 0], [arc([0, 1], bulgeOf(90))]));
    expect(run.length).toBeCloseTo(Math.PI / 2, 14);
    const middle = pointAt(run, run.length / 2);
    expect(middle.x).toBeCloseTo(Math.SQRT1_2, 14);
    expect(middle.y).toBeCloseTo(Math.SQRT1_2, 14);
    expect(middle.curvature).toBeCloseTo(1, 14);
  });

  it('stays exact as it flattens: a bulge of 1e-12 rises by half a chord times the bulge', () => {
    const run = only(track([0, 0], [arc([1, 0], -1e-12)]));
    const middle = pointAt(run, 0.5);
    expect(middle.y / 5e-13).toBeCloseTo(1, 9);
    expect(middle.x).toBeCloseTo(0.5, 15);
  });
});

/** Solves A x = b by elimination with row exchanges. */
function solve(a: number[][], b: number[]): number[] {
  const n = b.length;
  for (let k = 0; k < n; k += 1) {
    let pivot = k;
    for (let i = k + 1; i < n; i += 1) if (Math.abs(a[i][k]) > Math.abs(a[pivot][k])) pivot = i;
    [a[k], a[pivot]] = [a[pivot], a[k]];
    [b[k], b[pivot]] = [b[pivot], b[k]];
    for (let i = k + 1; i < n; i += 1) {
      const f = a[i][k] / a[k][k];
      for (let j = k; j < n; j += 1) a[i][j] -= f * a[k][j];
      b[i] -= f * b[k];
    }
  }
  const x = new Array<number>(n).fill(0);
  for (let i = n - 1; i >= 0; i -= 1) {
    x[i] = (b[i] - a[i].reduce((sum, c, j) => (j > i ? sum + c * x[j] : sum), 0)) / a[i][i];
  }
  return x;
}

/** The natural spline by its definition: 4 unknowns a span, interpolation, C¹ and C² at knots, no bend at the ends. */
function splineByDefinition(knots: number[], values: number[]): (u: number) => number {
  const spans = knots.length - 1;
  const rows: number[][] = [];
  const right: number[] = [];
  const put = (entries: [number, number][], value: number): void => {
    const row = new Array<number>(4 * spans).fill(0);
    for (const [column, coefficient] of entries) row[column] += coefficient;
    rows.push(row);
    right.push(value);
  };
  const powers = (span: number, d: number, order: number, sign = 1): [number, number][] =>
    [0, 1, 2, 3].map((k) => {
      const factor = order === 0 ? 1 : order === 1 ? k : k * (k - 1);
      return [4 * span + k, k < order ? 0 : sign * factor * d ** (k - order)];
    });
  for (let i = 0; i < spans; i += 1) {
    const h = knots[i + 1] - knots[i];
    put(powers(i, 0, 0), values[i]);
    put(powers(i, h, 0), values[i + 1]);
    if (i + 1 === spans) continue;
    put([...powers(i, h, 1), ...powers(i + 1, 0, 1, -1)], 0);
    put([...powers(i, h, 2), ...powers(i + 1, 0, 2, -1)], 0);
  }
  put(powers(0, 0, 2), 0);
  put(powers(spans - 1, knots[spans] - knots[spans - 1], 2), 0);
  const c = solve(rows, right);
  return (u) => {
    let i = 0;
    while (i < spans - 1 && u > knots[i + 1]) i += 1;
    const d = u - knots[i];
    return c[4 * i] + d * (c[4 * i + 1] + d * (c[4 * i + 2] + d * c[4 * i + 3]));
  };
}

describe('a spline', () => {
  const points: Vec[] = [
    [0, 0],
    [0.5, 0.4],
    [1.3, 0.35],
    [1.6, -0.3],
    [2.4, -0.1],
  ];
  const run = only(track(points[0], [spline(...points.slice(1))]));
  const knots = points.reduce<number[]>(
    (u, p, i) => (i === 0 ? [0] : [...u, u[i - 1] + distance(points[i - 1], p)]),
    [],
  );
  const x = splineByDefinition(
    knots,
    points.map((p) => p[0]),
  );
  const y = splineByDefinition(
    knots,
    points.map((p) => p[1]),
  );

  it('is the natural cubic spline by chord length: it passes where the system of its definition says', () => {
    run.pieces.forEach((piece, i) => {
      if (piece.kind !== 'cubic') throw new Error('a spline piece was expected');
      for (const v of [0, 0.25, 0.5, 0.9]) {
        const u = knots[i] + v * (knots[i + 1] - knots[i]);
        const px = piece.start[0] + v * (piece.bx[0] + v * (piece.bx[1] + v * piece.bx[2]));
        const py = piece.start[1] + v * (piece.by[0] + v * (piece.by[1] + v * piece.by[2]));
        expect(Math.abs(px - x(u))).toBeLessThan(1e-14);
        expect(Math.abs(py - y(u))).toBeLessThan(1e-14);
      }
    });
  });

  it('has the arc length of forty thousand chords, extrapolated, to 2e-12', () => {
    const chords = (n: number): number => {
      let sum = 0;
      let last: Vec = [x(0), y(0)];
      for (let k = 1; k <= n; k += 1) {
        const u = (knots[knots.length - 1] * k) / n;
        const next: Vec = [x(u), y(u)];
        sum += norm(subtract(next, last));
        last = next;
      }
      return sum;
    };
    const [coarse, fine] = [chords(20_000), chords(40_000)];
    const extrapolated = fine + (fine - coarse) / 3;
    expect(Math.abs(run.length / extrapolated - 1)).toBeLessThan(2e-12);
  });

  it('is not bent at its ends, and bends without a jump at its inner points', () => {
    expect(Math.abs(pointAt(run, 0).curvature)).toBeLessThan(1e-12);
    expect(Math.abs(pointAt(run, run.length).curvature)).toBeLessThan(1e-12);
    for (const piece of run.pieces.slice(1)) {
      const [before, after] = [pointAt(run, piece.from - 1e-9), pointAt(run, piece.from + 1e-9)];
      expect(Math.abs(before.curvature - after.curvature)).toBeLessThan(1e-6);
      expect(Math.abs(before.tx * after.ty - before.ty * after.tx)).toBeLessThan(1e-7);
    }
  });

  it('is a straight line through points in line', () => {
    const straight = only(track([0, 0], [spline([1, 0.5], [4, 2])]));
    expect(straight.length).toBeCloseTo(Math.hypot(4, 2), 14);
    expect(Math.abs(pointAt(straight, 1.7).curvature)).toBeLessThan(1e-14);
  });

  it('that turns back on the spot has a tangent and a finite curvature everywhere', () => {
    const back = only(track([0, 0], [spline([1, 0], [0.5, 0])]));
    for (let k = 0; k <= 2000; k += 1) {
      const foot = pointAt(back, (back.length * k) / 2000);
      expect(Math.abs(foot.tx)).toBeCloseTo(1, 12);
      expect(Number.isFinite(foot.curvature)).toBe(true);
    }
    const cusp = only(track([0, 0], [spline([1, 0], [0, 0])]));
    expect(cusp.length).toBeGreaterThan(1.999);
    expect(Number.isFinite(nearestOnRun(cusp, 2, 0.1, newFoot()).tx)).toBe(true);
  });

  it('measures length along itself: equal steps of arc length are equally long', () => {
    const parts = 1000;
    const foot = newFoot();
    let longest = 0;
    let shortest = Infinity;
    let last = at(run, 0);
    for (let k = 1; k <= parts; k += 1) {
      pointAt(run, (run.length * k) / parts, foot);
      const step = distance(last, [foot.x, foot.y]);
      longest = Math.max(longest, step);
      shortest = Math.min(shortest, step);
      last = [foot.x, foot.y];
    }
    expect(longest / shortest - 1).toBeLessThan(1e-4);
    expect(longest).toBeLessThanOrEqual((run.length / parts) * (1 + 1e-12));
  });
});
