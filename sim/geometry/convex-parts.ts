import { cross, subtract, type Vec } from '../core/vec.js';
import type { Shape } from '../mechanism/kinds/body.js';
import { camOutline } from './cam-profile.js';
import { counterClockwise, isConvex } from './polygon.js';

/** A convex core of 1 (disc, particle), 2 (bar) or more points, counter-clockwise, swelled by `radius` [m]. */
export interface ConvexPart {
  points: Vec[];
  radius: number;
}

/** A shape as convex parts that cover it and overlap only along edges; none for a shape that touches nothing. */
export function convexParts(shape: Shape): ConvexPart[] {
  switch (shape.kind) {
    case 'none':
      return [];
    case 'particle':
      return [{ points: [[0, 0]], radius: 0 }];
    case 'disc':
      return [{ points: [[0, 0]], radius: shape.radius }];
    case 'bar':
      return [{ points: barCenters(shape.length), radius: shape.width / 2 }];
    case 'box':
      return [{ points: boxCorners(shape.width, shape.height), radius: 0 }];
    case 'polygon':
      return convexPolygons(shape.points).map((points) => ({ points, radius: 0 }));
    case 'cam':
      return convexPolygons(camOutline(shape)).map((points) => ({ points, radius: 0 }));
  }
}

/** Centres of a bar's round ends, in body coordinates. */
const barCenters = (length: number): Vec[] => [
  [-length / 2, 0],
  [length / 2, 0],
];

/** Corners of a box, counter-clockwise from the lower left, in body coordinates. */
export const boxCorners = (width: number, height: number): Vec[] => [
  [-width / 2, -height / 2],
  [width / 2, -height / 2],
  [width / 2, height / 2],
  [-width / 2, height / 2],
];

/**
 * A simple polygon cut into convex ones, counter-clockwise: ears are clipped off, then pieces are merged across every
 * cut that is not needed, which leaves at most four times the least number possible.
 * Source: S. Hertel, K. Mehlhorn, Fast triangulation of the plane with respect to simple polygons, Inf. Control 64 (1985).
 *
 * @param points simple, either sense; points in line with their neighbours are left out
 */
export function convexPolygons(points: readonly Vec[]): Vec[][] {
  const corners = withoutStraight(counterClockwise(points));
  if (isConvex(corners)) return [corners];
  return merged(corners, ears(corners)).map((piece) => piece.map((i) => corners[i]));
}

const turn = (a: Vec, b: Vec, c: Vec): number => cross(subtract(b, a), subtract(c, b));

function withoutStraight(points: Vec[]): Vec[] {
  const n = points.length;
  return points.filter((point, i) => turn(points[(i + n - 1) % n], point, points[(i + 1) % n]) !== 0);
}

type Loop = number[];

/** Triangles of a simple counter-clockwise polygon, by its corners' indexes. */
function ears(points: Vec[]): Loop[] {
  const left = points.map((_, i) => i);
  const triangles: Loop[] = [];
  while (left.length > 3) {
    const tip = left.findIndex((_, k) => isEar(points, left, k));
    const k = tip >= 0 ? tip : 0;
    const triangle = around(left, k);
    const [a, b, c] = triangle.map((i) => points[i]);
    if (turn(a, b, c) > 0) triangles.push(triangle);
    left.splice(k, 1);
  }
  return [...triangles, left];
}

const around = (loop: Loop, k: number): Loop => [
  loop[(k + loop.length - 1) % loop.length],
  loop[k],
  loop[(k + 1) % loop.length],
];

/** A corner is an ear where it turns left and no other corner lies in its triangle. One in line is clipped for nothing. */
function isEar(points: Vec[], left: Loop, k: number): boolean {
  const triangle = around(left, k);
  const [a, b, c] = triangle.map((i) => points[i]);
  const bend = turn(a, b, c);
  if (bend <= 0) return false;
  return left.every((i) => {
    if (triangle.includes(i)) return true;
    const p = points[i];
    return turn(a, b, p) < 0 || turn(b, c, p) < 0 || turn(c, a, p) < 0;
  });
}

/** Joins pieces across the edges they share for as long as the result is convex. */
function merged(points: Vec[], pieces: Loop[]): Loop[] {
  for (let i = 0; i < pieces.length; i += 1) {
    for (let j = i + 1; j < pieces.length; j += 1) {
      const joined = joinAcross(points, pieces[i], pieces[j]);
      if (!joined) continue;
      pieces.splice(j, 1);
      pieces[i] = joined;
      j = i;
    }
  }
  return pieces;
}

function joinAcross(points: Vec[], a: Loop, b: Loop): Loop | null {
  for (let i = 0; i < a.length; i += 1) {
    const from = a[i];
    const to = a[(i + 1) % a.length];
    const j = b.indexOf(to);
    if (j < 0 || b[(j + 1) % b.length] !== from) continue;
    const fromA = [...a.slice(i + 1), ...a.slice(0, i + 1)];
    const fromB = [...b.slice(j + 1), ...b.slice(0, j + 1)];
    const loop = [...fromA, ...fromB.slice(1, -1)];
    return isConvex(loop.map((k) => points[k])) ? loop : null;
  }
  return null;
}
