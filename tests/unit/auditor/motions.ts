import fc from 'fast-check';
import { expect } from 'vitest';
import { assemble, type Assembly } from '../../../sim/auditor/assembly.js';
import { mechanismOf, type Parts } from '../../support/run.js';

/** A document as the auditor runs it, everything that has times on. */
export const assembled = (parts: Parts): Assembly => assemble(mechanismOf({ run: { until: 1 }, ...parts }), () => true);

/** A smooth motion of every body through a configuration: q + v t + ½ a t². */
export interface Course {
  q: Float64Array;
  v: Float64Array;
  a: Float64Array;
}

/** Motions through configurations near the drawn one. */
export function coursesNear({ system }: Assembly, off = 0.02): fc.Arbitrary<Course> {
  const n = 3 * system.count;
  const vector = (size: number): fc.Arbitrary<number[]> =>
    fc.array(fc.double({ min: -size, max: size, noNaN: true }), { minLength: n, maxLength: n });
  return fc.tuple(vector(off), vector(1), vector(1)).map(([dq, v, a]) => ({
    q: system.startPositions.map((x, i) => x + dq[i]),
    v: Float64Array.from(v),
    a: Float64Array.from(a),
  }));
}

export const positionAt = ({ q, v, a }: Course, t: number): Float64Array =>
  q.map((x, i) => x + v[i] * t + 0.5 * a[i] * t * t);
export const velocityAt = ({ v, a }: Course, t: number): Float64Array => v.map((x, i) => x + a[i] * t);

const H = 4e-4;

const first = (f: (t: number) => number, h: number): number => (8 * (f(h) - f(-h)) - (f(2 * h) - f(-2 * h))) / (12 * h);
const second = (f: (t: number) => number, h: number): number =>
  (16 * (f(h) + f(-h)) - (f(2 * h) + f(-2 * h)) - 30 * f(0)) / (12 * h * h);

/**
 * First derivative at t = 0 by central differences of the fourth order. Motions on which two step lengths do not agree are
 * left out: a kink (the edge of a face, the end of a track) is passed there.
 */
export function slope(f: (t: number) => number): number {
  return agreed(first(f, H), first(f, H / 2));
}

/** Second derivative at t = 0, likewise. */
export function bend(f: (t: number) => number): number {
  return agreed(second(f, 2 * H), second(f, H));
}

function agreed(one: number, other: number): number {
  fc.pre(Math.abs(one - other) <= 1e-5 * (1 + Math.abs(one)));
  return one;
}

/** Expects a value within a share of its size, or of one. */
export function expectNear(value: number, exact: number, share: number): void {
  expect(Math.abs(value - exact)).toBeLessThanOrEqual(share * (1 + Math.abs(exact)));
}
