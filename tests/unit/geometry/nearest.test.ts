import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  allNearFeet,
  buildTrack,
  nearestOnRun,
  newFoot,
  pieceExtremeAlong,
  pointAt,
} from '../../../sim/geometry/index.js';
import { arc, bulgeOf, line, point, sampledDistance, segmentTrack, spline, track } from './support.js';

const winding = buildTrack(
  track(
    [-2, 1],
    [
      line(-1, 0.5),
      arc([0.2, 0.5], bulgeOf(100)),
      spline([0.8, 1.2], [1.3, 0.4], [0.6, -0.4], [0, -0.2]),
      line(-2, -1),
    ],
  ),
);

describe('the nearest point of a run', () => {
  it('is as near as brute force finds, for any segment and any query', () => {
    fc.assert(
      fc.property(segmentTrack, point, (drawn, query) => {
        const [run] = buildTrack(drawn).runs;
        const foot = nearestOnRun(run, query[0], query[1], newFoot());
        const sampled = sampledDistance(run, query);
        expect(Math.abs(foot.distance)).toBeLessThanOrEqual(sampled + 1e-12);
        expect(Math.abs(foot.distance)).toBeGreaterThanOrEqual(sampled - 1e-9);
      }),
      { numRuns: 300 },
    );
  });

  it('lies at its own arc length, and square to the query unless an end holds it', () => {
    fc.assert(
      fc.property(segmentTrack, point, (drawn, [x, y]) => {
        const [run] = buildTrack(drawn).runs;
        const foot = nearestOnRun(run, x, y, newFoot());
        const again = pointAt(run, foot.s);
        expect(Math.hypot(again.x - foot.x, again.y - foot.y)).toBeLessThan(1e-12);
        const ahead = foot.tx * (x - foot.x) + foot.ty * (y - foot.y);
        if (foot.atStart) expect(ahead).toBeLessThan(0);
        else if (foot.atEnd) expect(ahead).toBeGreaterThan(0);
        else expect(Math.abs(ahead)).toBeLessThan(1e-9);
      }),
    );
  });

  it('has a positive distance on the left of the path and a negative one on the right', () => {
    fc.assert(
      fc.property(segmentTrack, fc.double({ min: 0.02, max: 0.98, noNaN: true }), (drawn, fraction) => {
        const [run] = buildTrack(drawn).runs;
        const at = pointAt(run, fraction * run.length);
        fc.pre(Math.abs(at.curvature) < 1e4);
        const d = 1e-6;
        for (const side of [1, -1]) {
          const foot = nearestOnRun(run, at.x - side * d * at.ty, at.y + side * d * at.tx, newFoot());
          // Another stretch of a spline that crosses here may be nearer.
          if (Math.abs(foot.s - at.s) < 1e-3) expect(Math.abs(foot.distance - side * d)).toBeLessThan(1e-10);
        }
      }),
    );
  });

  it('does not depend on the hint', () => {
    fc.assert(
      fc.property(point, fc.nat(20), ([x, y], hint) => {
        for (const run of winding.runs) {
          const plain = nearestOnRun(run, x, y, newFoot());
          const hinted = nearestOnRun(run, x, y, newFoot(), hint);
          expect(Math.abs(hinted.distance)).toBe(Math.abs(plain.distance));
        }
      }),
    );
  });

  it('keeps micrometres at a radius of a thousand kilometres', () => {
    // Chord 2 m, sagitta c²/8R = 5e-7 m: 1 µm above the arc's middle.
    const radius = 1e6;
    const [run] = buildTrack(track([-1, 0], [arc([1, 0], -1 / (2 * radius))])).runs;
    const foot = nearestOnRun(run, 0, 1e-6 + 1 / (2 * radius), newFoot());
    expect(foot.distance / 1e-6).toBeCloseTo(1, 8);
    expect(foot.curvature).toBeCloseTo(-1 / radius, 15);
  });

  it('on a full turn less a little finds the foot beyond the half circle', () => {
    const [run] = buildTrack(track([1, -0.1], [arc([1, 0.1], -bulgeOf(340))])).runs;
    const foot = nearestOnRun(run, 0, 3, newFoot());
    expect(foot.atStart || foot.atEnd).toBe(false);
    expect(foot.s).toBeGreaterThan(0);
    expect(Math.abs(foot.distance)).toBeCloseTo(sampledDistance(run, [0, 3]), 9);
  });

  it('marks an end only for queries beyond it', () => {
    const [run] = buildTrack(track([0, 0], [line(1, 0)])).runs;
    const beyond = nearestOnRun(run, 1.3, 0.4, newFoot());
    expect([beyond.atStart, beyond.atEnd, beyond.s]).toEqual([false, true, 1]);
    expect(beyond.distance).toBeCloseTo(0.5, 15);
    expect(nearestOnRun(run, 1.3, -0.4, newFoot()).distance).toBeCloseTo(-0.5, 15);
    const before = nearestOnRun(run, -3, -4, newFoot());
    expect([before.atStart, before.atEnd, before.distance]).toEqual([true, false, -5]);
    const square = nearestOnRun(run, 0, 0.2, newFoot());
    expect([square.atStart, square.atEnd]).toEqual([false, false]);
  });

  it('goes round the seam of a closed run without an end', () => {
    const [run] = buildTrack(
      track([0, 0], [line(2, 0), arc([2, 1], 1), line(0, 1), arc([0, 0], 1)], { closed: true }),
    ).runs;
    for (const x of [-1e-3, 0, 1e-3]) {
      const foot = nearestOnRun(run, x, 0.01, newFoot());
      expect([foot.atStart, foot.atEnd]).toEqual([false, false]);
      expect(foot.distance).toBeCloseTo(0.01, 5);
    }
  });
});

describe('all near feet of a run', () => {
  it('are the local minima that dense sampling finds', () => {
    fc.assert(
      fc.property(point, ([x, y]) => {
        for (const run of winding.runs) {
          const n = 4000;
          const d = Array.from({ length: n + 1 }, (_, k) => {
            const at = pointAt(run, (run.length * k) / n);
            return Math.hypot(x - at.x, y - at.y);
          });
          const minima = d.filter((v, k) => v <= (d[k - 1] ?? Infinity) && v < (d[k + 1] ?? Infinity));
          const found = allNearFeet(run, x, y, 10);
          // Two minima within a step of sampling look like one.
          const steps = found.slice(1).map((foot, i) => foot.s - found[i].s);
          fc.pre(steps.every((step) => step > (4 * run.length) / n));
          expect(found).toHaveLength(minima.length);
          found.forEach((foot, i) =>
            expect(Math.abs(Math.abs(foot.distance) - minima[i])).toBeLessThan(1e-6 + run.length / n),
          );
        }
      }),
      { numRuns: 60 },
    );
  });

  it('of a disc in a vee are two, each on its own flank', () => {
    const path = buildTrack(track([-1, 1], [line(-0.1, 0.1), arc([0.1, 0.1], bulgeOf(90)), line(1, 1)]));
    const feet = allNearFeet(path.runs[0], 0, 0.8, 0.6);
    expect(feet.map((foot) => foot.segment)).toEqual([0, 2]);
    feet.forEach((foot) => expect(foot.distance).toBeCloseTo(0.8 * Math.SQRT1_2, 12));
  });

  it('leave out what is farther than asked', () => {
    expect(allNearFeet(winding.runs[0], 50, 50, 10)).toEqual([]);
  });

  it('find a joint that just turns outwards, once', () => {
    const bend = 5e-7;
    const path = buildTrack(track([0, 0], [line(1, 0), line(1 + Math.cos(bend), -Math.sin(bend))]));
    const feet = allNearFeet(path.runs[0], 1 + 1e-7, 0.5, 1);
    expect(feet).toHaveLength(1);
    expect(feet[0].distance).toBeCloseTo(0.5, 12);
  });

  it('include held ends, marked', () => {
    const [run] = buildTrack(track([0, 0], [line(1, 0)])).runs;
    const [foot, ...others] = allNearFeet(run, 1.03, 0.04, 0.2);
    expect(others).toEqual([]);
    expect([foot.atStart, foot.atEnd]).toEqual([false, true]);
    expect(foot.distance).toBeCloseTo(0.05, 14);
  });
});

describe('the points of a run with a given tangent', () => {
  it('are square to the normal asked for, on the run, and none is missed', () => {
    fc.assert(
      fc.property(segmentTrack, fc.double({ min: 0, max: 2 * Math.PI, noNaN: true }), (drawn, angle) => {
        const [run] = buildTrack(drawn).runs;
        const [nx, ny] = [Math.cos(angle), Math.sin(angle)];
        const found = pieceExtremeAlong(run, nx, ny);
        for (const foot of found) {
          expect(Math.abs(foot.tx * nx + foot.ty * ny)).toBeLessThan(1e-7);
          const again = pointAt(run, foot.s);
          expect(Math.hypot(again.x - foot.x, again.y - foot.y)).toBeLessThan(1e-11);
        }
        const n = 2000;
        let changes = 0;
        let last = 0;
        for (let k = 0; k <= n; k += 1) {
          const at = pointAt(run, (run.length * k) / n);
          const sign = Math.sign(at.tx * nx + at.ty * ny);
          if (last !== 0 && sign !== 0 && sign !== last) changes += 1;
          if (sign !== 0) last = sign;
        }
        if (run.pieces[0].kind !== 'line') expect(found.length).toBeGreaterThanOrEqual(changes);
      }),
    );
  });

  it('of a line are none', () => {
    expect(pieceExtremeAlong(buildTrack(track([0, 0], [line(1, 0)])).runs[0], 0, 1)).toEqual([]);
  });

  it('include an end of an arc that is just square', () => {
    const [run] = buildTrack(track([0, 0], [arc([1, 1], bulgeOf(90))])).runs;
    const [foot] = pieceExtremeAlong(run, 0, 1);
    expect(foot.s).toBeCloseTo(0, 12);
  });
});
