import { MANIFOLD_CIRCLES, MANIFOLD_FACE_A, type Pose } from '../planck-internals.js';
import { nearestOnChain, type Chain, type Link } from './chain.js';
import type { SurfaceShape } from './shapes.js';
import { setCandidate, type Touch } from './touch.js';

/** Looks up the contact pair of a body and a track; −1 where the document lists none. */
export type PairOf = (bodyA: number, bodyB: number, track: number) => number;

/**
 * Contact of a body's point or round (disc, particle, corner, bar end) with a chain: exact foot, normal and gap on lines,
 * arcs and splines; no chords. Bodies with faces meet a straight line with two corners at once.
 */
export function coreAgainstSurface(touch: Touch, pose: Pose, pairOf: PairOf): void {
  const { chain } = touch.shapeA as SurfaceShape;
  touch.count = 0;
  if (touch.shapeB.vertices.length > 1) facesOnLine(touch, chain, pose, pairOf);
  else roundOnChain(touch, chain, pose, pairOf);
}

function roundOnChain(touch: Touch, chain: Chain, pose: Pose, pairOf: PairOf): void {
  const core = touch.shapeB;
  const centre = core.vertices[0];
  const x = pose.p.x + pose.q.c * centre.x - pose.q.s * centre.y;
  const y = pose.p.y + pose.q.s * centre.x + pose.q.c * centre.y;
  const at = nearestOnChain(chain, x, y, touch.foot);
  const link = chain.links[at.link];
  touch.pair = pairOf(touch.bodyB, -1, link.track);
  touch.segment = at.foot.segment;
  if (at.held) {
    touch.side = 0;
    heldAtEnd(touch, core.m_radius, x, y);
    return;
  }
  const side = sideOf(touch, link, at.foot.distance);
  touch.type = MANIFOLD_FACE_A;
  touch.normal.x = -at.foot.ty * side;
  touch.normal.y = at.foot.tx * side;
  touch.point.x = at.foot.x;
  touch.point.y = at.foot.y;
  setCandidate(touch, 0, 0, side * at.foot.distance - core.m_radius, centre.x, centre.y);
  touch.count = 1;
}

/**
 * Sign of the side the body is on, relative to the link's own path. A track free on both sides keeps the side on which
 * the body was last seen clear of its ends.
 */
function sideOf(touch: Touch, link: Link, distance: number): 1 | -1 {
  if (link.free !== 0) return link.free;
  if (touch.side === 0) touch.side = distance * link.along >= 0 ? 1 : -1;
  return touch.side === link.along ? 1 : -1;
}

/** Beyond an end only rounds meet the track: a bare point passes by. */
function heldAtEnd(touch: Touch, radius: number, x: number, y: number): void {
  touch.armed = true;
  // A bar's round end is looked after with the chain's corners.
  if (radius === 0 || touch.shapeB.isCorner) return;
  const { foot } = touch.foot;
  touch.type = MANIFOLD_CIRCLES;
  touch.point.x = foot.x;
  touch.point.y = foot.y;
  const centre = touch.shapeB.vertices[0];
  const gap = Math.hypot(x - foot.x, y - foot.y) - radius;
  // The same point as on the way: nothing parts or touches where a round goes on about the end.
  setCandidate(touch, 0, 0, gap, centre.x, centre.y);
  touch.count = 1;
}

function facesOnLine(touch: Touch, chain: Chain, pose: Pose, pairOf: PairOf): void {
  const link = chain.links[0];
  const [sx, sy] = link.run.start;
  const { length } = link.run;
  const [ex, ey] = link.run.end;
  const tx = (ex - sx) / length;
  const ty = (ey - sy) / length;
  touch.pair = pairOf(touch.bodyB, -1, link.track);
  touch.segment = link.run.pieces[0].segment;
  const core = touch.shapeB;
  const middle = tx * (pose.p.y - sy) - ty * (pose.p.x - sx);
  const side = sideOf(touch, link, middle);
  touch.type = MANIFOLD_FACE_A;
  touch.normal.x = -ty * side;
  touch.normal.y = tx * side;
  touch.point.x = sx;
  touch.point.y = sy;
  for (let i = 0; i < core.vertices.length; i += 1) {
    const v = core.vertices[i];
    const dx = pose.p.x + pose.q.c * v.x - pose.q.s * v.y - sx;
    const dy = pose.p.y + pose.q.s * v.x + pose.q.c * v.y - sy;
    const along = tx * dx + ty * dy;
    if (along < 0 || along > length) continue;
    keepLowest(touch, i, side * (tx * dy - ty * dx) - core.m_radius, v.x, v.y);
  }
}

/** Keeps the two candidates of least gap, the lower first. */
function keepLowest(touch: Touch, key: number, gap: number, x: number, y: number): void {
  const [first, second] = touch.candidates;
  if (touch.count > 0 && gap >= first.gap) {
    if (touch.count === 1 || gap < second.gap) setCandidate(touch, 1, key, gap, x, y);
    touch.count = 2;
    return;
  }
  if (touch.count > 0) {
    setCandidate(touch, 1, first.key, first.gap, first.local.x, first.local.y);
    touch.count = 2;
  } else touch.count = 1;
  setCandidate(touch, 0, key, gap, x, y);
}
