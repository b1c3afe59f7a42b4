import { MANIFOLD_CIRCLES, MANIFOLD_FACE_B, type Pose } from '../planck-internals.js';
import type { ArcPiece } from '../../geometry/index.js';
import type { Chain } from './chain.js';
import type { CoreShape, CornersShape } from './shapes.js';
import type { PairOf } from './surface.js';
import { setCandidate, type Touch } from './touch.js';

/**
 * Contact of a body's flat faces (and a bar's round ends) with the corners, ends and bulging arcs of a chain, where the
 * track is the sharper of the two: a box that tips over an edge or rides on a hump.
 */
export function coreAgainstCorners(touch: Touch, pose: Pose, pairOf: PairOf): void {
  const { chain } = touch.shapeA as CornersShape;
  touch.count = 0;
  best.gap = Infinity;
  chain.ends.forEach((end, index) => {
    againstPoint(touch.shapeB, pose, end.x, end.y, index, chain.links[end.link].track);
  });
  for (const link of chain.links) {
    for (const piece of link.run.pieces) {
      if (piece.kind === 'arc') againstArc(touch.shapeB, pose, piece, link);
    }
  }
  if (best.gap === Infinity) return;
  touch.pair = pairOf(touch.bodyB, -1, best.track);
  touch.segment = best.segment;
  place(touch);
}

/** The nearest feature found so far. */
const best = { gap: Infinity, edge: -1, vertex: -1, x: 0, y: 0, key: 0, track: 0, segment: 0 };

function againstPoint(core: CoreShape, pose: Pose, x: number, y: number, index: number, track: number): void {
  const dx = x - pose.p.x;
  const dy = y - pose.p.y;
  const lx = pose.q.c * dx + pose.q.s * dy;
  const ly = -pose.q.s * dx + pose.q.c * dy;
  let out = -Infinity;
  let edge = 0;
  core.normals.forEach((normal, i) => {
    const v = core.vertices[i];
    const distance = normal.x * (lx - v.x) + normal.y * (ly - v.y);
    if (distance <= out) return;
    out = distance;
    edge = i;
  });
  const vertex = out > 0 || core.vertices.length === 2 ? beyond(core, edge, lx, ly) : -1;
  if (vertex >= 0 && core.m_radius === 0) return;
  const corner = core.vertices[Math.max(vertex, 0)];
  const gap = (vertex >= 0 ? Math.hypot(lx - corner.x, ly - corner.y) : out) - core.m_radius;
  keep(gap, edge, vertex, x, y, 64 + index * 16 + (vertex >= 0 ? 8 : 0), track, 0);
}

function beyond(core: CoreShape, edge: number, x: number, y: number): number {
  const from = core.vertices[edge];
  const next = (edge + 1) % core.vertices.length;
  const to = core.vertices[next];
  const along = (to.x - from.x) * (x - from.x) + (to.y - from.y) * (y - from.y);
  if (along < 0) return edge;
  return along > (to.x - from.x) ** 2 + (to.y - from.y) ** 2 ? next : -1;
}

/** The point of a bulging arc whose surface looks straight at a face, where it lies on the arc and on the face. */
function againstArc(core: CoreShape, pose: Pose, arc: ArcPiece, link: Chain['links'][number]): void {
  const free = link.free === 0 ? Math.sign(arc.curvature) * -1 : link.free;
  if (arc.curvature * free >= 0) return;
  const radius = 1 / Math.abs(arc.curvature);
  const bend = Math.sign(arc.curvature);
  const cx = arc.start[0] - arc.tangent[1] * bend * radius;
  const cy = arc.start[1] + arc.tangent[0] * bend * radius;
  core.normals.forEach((normal, edge) => {
    const nx = pose.q.c * normal.x - pose.q.s * normal.y;
    const ny = pose.q.s * normal.x + pose.q.c * normal.y;
    const x = cx - nx * radius;
    const y = cy - ny * radius;
    if (!isOnArc(arc, x - cx, y - cy, radius)) return;
    const dx = x - pose.p.x;
    const dy = y - pose.p.y;
    const lx = pose.q.c * dx + pose.q.s * dy;
    const ly = -pose.q.s * dx + pose.q.c * dy;
    if (beyond(core, edge, lx, ly) >= 0) return;
    const v = core.vertices[edge];
    const gap = normal.x * (lx - v.x) + normal.y * (ly - v.y) - core.m_radius;
    // A face far behind the arc is another side of the body.
    if (gap > -radius) keep(gap, edge, -1, x, y, 256 + arc.segment * 16 + edge, link.track, arc.segment);
  });
}

function isOnArc(arc: ArcPiece, rx: number, ry: number, radius: number): boolean {
  const sx = arc.tangent[1] * Math.sign(arc.curvature) * radius;
  const sy = -arc.tangent[0] * Math.sign(arc.curvature) * radius;
  const turned = Math.atan2(sx * ry - sy * rx, sx * rx + sy * ry) * Math.sign(arc.curvature);
  const swept = arc.length / radius;
  return (turned < 0 ? turned + 2 * Math.PI : turned) <= swept;
}

function keep(
  gap: number,
  edge: number,
  vertex: number,
  x: number,
  y: number,
  key: number,
  track: number,
  segment: number,
): void {
  if (Math.abs(gap) >= Math.abs(best.gap)) return;
  Object.assign(best, { gap, edge, vertex, x, y, key, track, segment });
}

function place(touch: Touch): void {
  const core = touch.shapeB;
  if (best.vertex >= 0) {
    touch.type = MANIFOLD_CIRCLES;
    touch.point.x = best.x;
    touch.point.y = best.y;
    const v = core.vertices[best.vertex];
    setCandidate(touch, 0, best.key, best.gap, v.x, v.y);
  } else {
    touch.type = MANIFOLD_FACE_B;
    touch.normal.x = core.normals[best.edge].x;
    touch.normal.y = core.normals[best.edge].y;
    touch.point.x = core.vertices[best.edge].x;
    touch.point.y = core.vertices[best.edge].y;
    setCandidate(touch, 0, best.key, best.gap, best.x, best.y);
  }
  touch.count = 1;
}
