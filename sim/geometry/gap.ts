import { cross, distance, dot, subtract, toSheet, type Vec } from '../core/vec.js';
import type { Body } from '../mechanism/kinds/body.js';
import { convexParts, type ConvexPart } from './convex-parts.js';
import { pieceExtremeAlong } from './extremes.js';
import { nearestOnRun } from './nearest.js';
import { newFoot } from './piece.js';
import type { TrackPath } from './track-path.js';

type Placed = Pick<Body, 'shape' | 'at' | 'angle'>;

/** The convex parts of a body where it is, on the sheet. */
export function placedParts(body: Placed): ConvexPart[] {
  return convexParts(body.shape).map(({ points, radius }) => ({
    radius,
    points: points.map((point) => toSheet(body.at, body.angle, point)),
  }));
}

/** Least distance between the outlines of two bodies, negative by the depth of the overlap [m]; ∞ where one has none. */
export function bodyGap(a: Placed, b: Placed): number {
  const others = placedParts(b);
  return Math.min(Infinity, ...placedParts(a).flatMap((part) => others.map((other) => partGap(part, other))));
}

/**
 * Least distance of two convex parts; where their cores overlap, the least push apart, with its sign turned. Separating
 * axes: the edges of both (Ericson, Real-Time Collision Detection, 2005, ch. 5).
 */
export function partGap(a: ConvexPart, b: ConvexPart): number {
  const radii = a.radius + b.radius;
  if (a.points.length === 1 && b.points.length === 1) return distance(a.points[0], b.points[0]) - radii;
  const apart = Math.max(faceSeparation(a.points, b.points), faceSeparation(b.points, a.points));
  if (apart < 0) return apart - radii;
  return Math.min(leastDistance(a.points, b.points), leastDistance(b.points, a.points)) - radii;
}

/** Greatest, over the faces of a part, of the least signed distance of the other points; a bar's core has two faces. */
function faceSeparation(points: readonly Vec[], others: readonly Vec[]): number {
  if (points.length < 2) return -Infinity;
  return Math.max(
    ...points.map((p, i) => {
      const edge = subtract(points[(i + 1) % points.length], p);
      const length = Math.hypot(edge[0], edge[1]);
      return Math.min(...others.map((q) => -cross(edge, subtract(q, p)) / length));
    }),
  );
}

/** Least distance of any of `points` to any edge (or lone point) of `others`. */
function leastDistance(points: readonly Vec[], others: readonly Vec[]): number {
  return Math.min(
    ...points.map((p) => Math.min(...others.map((a, i) => toSegment(p, a, others[(i + 1) % others.length])))),
  );
}

function toSegment(p: Vec, a: Vec, b: Vec): number {
  const edge = subtract(b, a);
  const w = subtract(p, a);
  const square = dot(edge, edge);
  const t = square === 0 ? 0 : Math.min(Math.max(dot(w, edge) / square, 0), 1);
  return Math.hypot(w[0] - t * edge[0], w[1] - t * edge[1]);
}

/** Signed distance of a point to a convex part's outline, negative inside [m]. */
export function pointToPart(point: Vec, part: ConvexPart): number {
  return partGap({ points: [point], radius: 0 }, part);
}

/** How a body lies to a track: `gap` [m] is the distance, negative by how deep it is in the solid, or behind it. */
export interface TrackGap {
  gap: number;
  /** `clear`: on the free side or past an end; `inside`: its outline crosses the track; `behind`: wholly on the solid side. */
  state: 'clear' | 'inside' | 'behind';
  /** The point of the track where that is. */
  at: Vec;
}

const foot = newFoot();

/** How a body lies to a track as both are drawn; for a track free on both sides, `behind` does not arise. */
export function trackGap(body: Placed, path: TrackPath): TrackGap {
  const depths = placedParts(body).flatMap((part) => [...pointDepths(part, path), ...featureDepths(part, path)]);
  const clearest = Math.max(...depths.map((depth) => depth.high));
  const deepest = depths.reduce((a, b) => (b.low < a.low ? b : a), NOWHERE);
  const isBoth = path.side === 'both';
  if (isBoth && clearest > 0 && deepest.low < 0) {
    return { gap: -Math.min(clearest, -deepest.low), state: 'inside', at: deepest.at };
  }
  if (isBoth) return { gap: Math.min(Math.abs(clearest), Math.abs(deepest.low)), state: 'clear', at: deepest.at };
  if (deepest.low >= 0) return { gap: deepest.low, state: 'clear', at: deepest.at };
  if (clearest > 0) return { gap: deepest.low, state: 'inside', at: deepest.at };
  return { gap: clearest, state: 'behind', at: deepest.at };
}

/** Least and greatest signed distance to the track, + on its free side, of one round point of the body. */
interface Depth {
  low: number;
  high: number;
  at: Vec;
}

const NOWHERE: Depth = { low: Infinity, high: -Infinity, at: [0, 0] };

function pointDepths(part: ConvexPart, path: TrackPath): Depth[] {
  return part.points.map(([x, y]) => {
    const { away, at, isPastEnd } = freeDistance(path, x, y);
    if (!isPastEnd) return { low: away - part.radius, high: away + part.radius, at };
    // Past an open end there is no side: only the end itself can be inside.
    const low = Math.abs(away) - part.radius;
    return { low, high: low < 0 ? Infinity : -Infinity, at };
  });
}

/** Signed distance of a point to a whole track, + on its free side (left, for a track free on both). */
export function freeDistance(path: TrackPath, x: number, y: number): { away: number; at: Vec; isPastEnd: boolean } {
  let best = { away: Infinity, at: path.runs[0].start, isPastEnd: false };
  path.runs.forEach((run, index) => {
    nearestOnRun(run, x, y, foot);
    if (Math.abs(foot.distance) >= Math.abs(best.away)) return;
    const held = foot.atStart ? 'before' : foot.atEnd ? 'after' : null;
    const corner = held && path.corners.find((each) => (held === 'before' ? each.after : each.before) === index);
    // At a corner the nearest point is held only on the side the path turns away from.
    const away = corner ? Math.abs(foot.distance) * (corner.turn > 0 ? -1 : 1) : foot.distance;
    best = { away, at: [foot.x, foot.y], isPastEnd: held !== null && !corner };
  });
  return { ...best, away: path.side === 'right' ? -best.away : best.away };
}

/** Corners, ends and bulges of the track that lie inside a part: its faces are pierced where none of its points is. */
function featureDepths(part: ConvexPart, path: TrackPath): Depth[] {
  if (part.points.length < 2) return [];
  const ends = path.runs.flatMap((run) => (run.closed ? [] : [run.start, run.end]));
  const bulges = path.runs.flatMap((run) =>
    part.points.flatMap((p, i) => {
      const [ex, ey] = subtract(part.points[(i + 1) % part.points.length], p);
      return pieceExtremeAlong(run, -ey, ex).map(({ x, y }): Vec => [x, y]);
    }),
  );
  return [...ends, ...bulges].flatMap((at) => {
    const depth = pointToPart(at, part);
    return depth < 0 ? [{ low: depth, high: Infinity, at }] : [];
  });
}
