import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import {
  add,
  cross,
  distance,
  dot,
  left,
  mix,
  norm,
  rotate,
  scale,
  subtract,
  toBody,
  toSheet,
  unit,
  type Vec,
} from '../../../sim/core/vec.js';

const coordinate = fc.double({ min: -1e3, max: 1e3, noNaN: true });
const vec = fc.tuple(coordinate, coordinate);
const angle = fc.double({ min: -20, max: 20, noNaN: true });

const close = (a: Vec, b: Vec, within: number): void => expect(distance(a, b)).toBeLessThanOrEqual(within);

describe('vectors', () => {
  it('take sheet coordinates to body coordinates and back', () => {
    fc.assert(
      fc.property(vec, angle, vec, (origin, turn, point) => {
        close(toSheet(origin, turn, toBody(origin, turn, point)), point, 1e-11);
      }),
    );
  });

  it('keep length and the angle between them when both are turned', () => {
    fc.assert(
      fc.property(vec, vec, angle, (a, b, turn) => {
        const size = norm(a) * norm(b) + 1;
        expect(Math.abs(norm(rotate(a, turn)) - norm(a))).toBeLessThan(1e-12 * size);
        expect(Math.abs(dot(rotate(a, turn), rotate(b, turn)) - dot(a, b))).toBeLessThan(1e-13 * size);
        expect(Math.abs(cross(rotate(a, turn), rotate(b, turn)) - cross(a, b))).toBeLessThan(1e-13 * size);
      }),
    );
  });

  it('turn counter-clockwise: a quarter turn of x is y, and left of x is y', () => {
    close(rotate([1, 0], Math.PI / 2), [0, 1], 1e-16);
    expect(left([1, 0])).toEqual([-0, 1]);
    expect(cross([1, 0], [0, 1])).toBe(1);
  });

  it('have the cross product a·left⊥: cross(a, b) = dot(left(a), b)', () => {
    fc.assert(
      fc.property(
        vec,
        vec,
        (a, b) => cross(a, b) === dot(left(a), b) || Math.abs(cross(a, b) - dot(left(a), b)) < 1e-9,
      ),
    );
  });

  it('have a unit vector in the same direction, and none for the null vector', () => {
    close(unit([3, 4]), [0.6, 0.8], 1e-16);
    expect(unit([0, 0])).toEqual([0, 0]);
  });

  it('do not overflow in their norm', () => {
    expect(norm([3e300, 4e300])).toBeCloseTo(5e300, -290);
  });

  it('mix from one end to the other', () => {
    close(mix([1, 2], [5, -2], 0.25), [2, 1], 1e-15);
    close(add(subtract([1, 2], [5, -2]), scale([5, -2], 1)), [1, 2], 1e-15);
  });
});
