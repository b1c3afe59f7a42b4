import { cross, subtract, type Vec } from '../core/vec.js';

/** Signed area, + where the points run counter-clockwise [m²]; taken about the first point, so that a far origin does no harm. */
export function signedArea(points: readonly Vec[]): number {
  const [origin] = points;
  let twice = 0;
  for (let i = 1; i + 1 < points.length; i += 1) {
    twice += cross(subtract(points[i], origin), subtract(points[i + 1], origin));
  }
  return twice / 2;
}

/** The points in counter-clockwise order, starting at the same one. */
export function counterClockwise(points: readonly Vec[]): Vec[] {
  return signedArea(points) >= 0 ? [...points] : [points[0], ...points.slice(1).reverse()];
}

/** True where no corner of a simple polygon turns inwards (straight ones may be there). */
export function isConvex(points: readonly Vec[]): boolean {
  const sense = Math.sign(signedArea(points));
  const n = points.length;
  return points.every((p, i) => {
    const q = points[(i + 1) % n];
    return sense * cross(subtract(q, p), subtract(points[(i + 2) % n], q)) >= 0;
  });
}

/** Two edges of a polygon that meet where they should not, by the index of each edge's first point. */
export interface Crossing {
  edges: [number, number];
}

/**
 * Pairs of edges that cross or touch where they are not neighbours, and neighbours that fold back on each other.
 * Checked exactly as drawn (signs of the orientation test), in O(n²).
 */
export function selfCrossings(points: readonly Vec[]): Crossing[] {
  const n = points.length;
  const found: Crossing[] = [];
  const edge = (i: number): [Vec, Vec] => [points[i], points[(i + 1) % n]];
  for (let i = 0; i < n; i += 1) {
    for (let j = i + 1; j < n; j += 1) {
      const isNext = j === i + 1;
      const closes = (j + 1) % n === i;
      const bad =
        isNext || closes ? foldsBack(isNext ? edge(i) : edge(j), isNext ? edge(j) : edge(i)) : meet(edge(i), edge(j));
      if (bad) found.push({ edges: [i, j] });
    }
  }
  return found;
}

/** Neighbouring edges, the first ending where the second starts, that run back over each other. */
function foldsBack([a, b]: [Vec, Vec], [, c]: [Vec, Vec]): boolean {
  const [ux, uy] = subtract(b, a);
  const [vx, vy] = subtract(c, b);
  return ux * vy - uy * vx === 0 && ux * vx + uy * vy <= 0;
}

/** True where the two segments share a point. */
export function meet([a, b]: [Vec, Vec], [c, d]: [Vec, Vec]): boolean {
  const side = (p: Vec, q: Vec, r: Vec): number => Math.sign(cross(subtract(q, p), subtract(r, p)));
  const c1 = side(a, b, c);
  const d1 = side(a, b, d);
  const a1 = side(c, d, a);
  const b1 = side(c, d, b);
  if (c1 * d1 < 0 && a1 * b1 < 0) return true;
  const isOn = (s: number, p: Vec, q: Vec, r: Vec): boolean => s === 0 && inSpan(p, q, r);
  return isOn(c1, a, b, c) || isOn(d1, a, b, d) || isOn(a1, c, d, a) || isOn(b1, c, d, b);
}

const inSpan = (p: Vec, q: Vec, r: Vec): boolean =>
  Math.min(p[0], q[0]) <= r[0] &&
  r[0] <= Math.max(p[0], q[0]) &&
  Math.min(p[1], q[1]) <= r[1] &&
  r[1] <= Math.max(p[1], q[1]);

/** True where the point lies inside a simple polygon (crossing number; a point on an edge may go either way). */
export function isInside(points: readonly Vec[], [x, y]: Vec): boolean {
  let inside = false;
  points.forEach(([px, py], i) => {
    const [qx, qy] = points[(i + 1) % points.length];
    if (py > y !== qy > y && x < px + ((qx - px) * (y - py)) / (qy - py)) inside = !inside;
  });
  return inside;
}
