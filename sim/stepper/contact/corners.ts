import { MANIFOLD_CIRCLES, MANIFOLD_FACE_B, type Pose } from '../planck-internals.js';
import { pieceExtremeAlong } from '../../geometry/index.js';
import type { Chain, Link } from './chain.js';
import type { CoreShape, CornersShape } from './shapes.js';
import type { PairOf } from './surface.js';
import { setCandidate, type Touch } from './touch.js';

/** A point of a track that a face or a round end of a body can meet. `vertex` ≥ 0: met by that round end. */
interface Feature {
  gap: number;
  edge: number;
  vertex: number;
  x: number;
  y: number;
  /** Direction of the path there. */
  tx: number;
  ty: number;
  key: number;
  link: number;
  segment: number;
}

/**
 * Contact of a body's flat faces (and a bar's round ends) with the corners, ends and bulges of a chain, where the track
 * is the sharper of the two: a box that tips over an edge or rides on a hump. The two nearest points on one face count.
 */
export function coreAgainstCorners(touch: Touch, pose: Pose, pairOf: PairOf): void {
  const { chain } = touch.shapeA as CornersShape;
  touch.count = 0;
  const features = featuresOf(touch.shapeB, chain, pose);
  const nearest = leastOf(features);
  if (!nearest) return;
  touch.pair = pairOf(touch.bodyB, -1, chain.links[nearest.link].track);
  touch.segment = nearest.segment;
  touch.foot.link = nearest.link;
  touch.foot.foot.tx = nearest.tx;
  touch.foot.foot.ty = nearest.ty;
  place(touch, nearest);
  if (nearest.vertex >= 0) return;
  const second = leastOf(
    features.filter((other) => other !== nearest && other.vertex < 0 && other.edge === nearest.edge),
  );
  if (!second) return;
  setCandidate(touch, 1, second.key, second.gap, second.x, second.y);
  touch.count = 2;
}

function featuresOf(core: CoreShape, chain: Chain, pose: Pose): Feature[] {
  const features: Feature[] = [];
  chain.ends.forEach((end, index) => {
    if (end.isHidden || end.isRepeated || isFar(core, pose, end)) return;
    const feature = meetPoint(core, pose, end.x, end.y);
    if (!feature) return;
    features.push({ ...feature, ...end, key: 64 + 16 * index + (feature.vertex >= 0 ? 8 : 0), segment: end.segment });
  });
  chain.links.forEach((link, index) => {
    if (link.isStraight) return;
    core.normals.forEach((_, edge) => features.push(...bulges(core, edge, pose, link, index)));
  });
  return features;
}

/** Farther than half the body's size again: nothing that a step could reach. */
function isFar({ reach }: CoreShape, { p }: Pose, { x, y }: { x: number; y: number }): boolean {
  const far = 1.5 * reach;
  return (x - p.x) ** 2 + (y - p.y) ** 2 > far * far;
}

/** Nearest by size of the gap: a point deep in the body is behind another face. */
function leastOf(features: readonly Feature[]): Feature | undefined {
  let least: Feature | undefined;
  for (const feature of features) if (!least || Math.abs(feature.gap) < Math.abs(least.gap)) least = feature;
  return least;
}

function toBody({ p, q }: Pose, x: number, y: number): [number, number] {
  const dx = x - p.x;
  const dy = y - p.y;
  return [q.c * dx + q.s * dy, -q.s * dx + q.c * dy];
}

function meetPoint(core: CoreShape, pose: Pose, x: number, y: number): Pick<Feature, 'gap' | 'edge' | 'vertex'> | null {
  const [lx, ly] = toBody(pose, x, y);
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
  // Two sharp corners have no normal between them and never meet.
  if (vertex >= 0 && core.m_radius === 0) return null;
  if (vertex < 0) return { gap: out - core.m_radius, edge, vertex };
  const corner = core.vertices[vertex];
  return { gap: Math.hypot(lx - corner.x, ly - corner.y) - core.m_radius, edge, vertex };
}

/** The end of an edge that a point lies beyond, or −1 where its foot is on the edge. */
function beyond(core: CoreShape, edge: number, x: number, y: number): number {
  const from = core.vertices[edge];
  const next = (edge + 1) % core.vertices.length;
  const to = core.vertices[next];
  const along = (to.x - from.x) * (x - from.x) + (to.y - from.y) * (y - from.y);
  if (along < 0) return edge;
  return along > (to.x - from.x) ** 2 + (to.y - from.y) ** 2 ? next : -1;
}

/** Points of a link's arcs and splines that bulge towards a face and look straight at it. */
function bulges(core: CoreShape, edge: number, pose: Pose, link: Link, index: number): Feature[] {
  const normal = core.normals[edge];
  const nx = pose.q.c * normal.x - pose.q.s * normal.y;
  const ny = pose.q.s * normal.x + pose.q.c * normal.y;
  const v = core.vertices[edge];
  return pieceExtremeAlong(link.run, nx, ny).flatMap((foot) => {
    const free = link.free === 0 ? -Math.sign(foot.curvature) : link.free;
    const isBulge = foot.curvature * free < 0;
    const facing = free * (foot.tx * ny - foot.ty * nx);
    if (!isBulge || facing >= 0) return [];
    const [lx, ly] = toBody(pose, foot.x, foot.y);
    if (beyond(core, edge, lx, ly) >= 0) return [];
    const gap = normal.x * (lx - v.x) + normal.y * (ly - v.y) - core.m_radius;
    // A face farther behind than the bulge is thick belongs to another side of the body.
    if (gap < -1 / Math.abs(foot.curvature)) return [];
    const key = 1024 + (index * 64 + foot.piece) * 64 + edge;
    return [
      {
        gap,
        edge,
        vertex: -1,
        x: foot.x,
        y: foot.y,
        tx: foot.tx,
        ty: foot.ty,
        key,
        link: index,
        segment: foot.segment,
      },
    ];
  });
}

function place(touch: Touch, { edge, vertex, x, y, key, gap }: Feature): void {
  const core = touch.shapeB;
  touch.count = 1;
  if (vertex >= 0) {
    touch.type = MANIFOLD_CIRCLES;
    touch.point.x = x;
    touch.point.y = y;
    const v = core.vertices[vertex];
    setCandidate(touch, 0, key, gap, v.x, v.y);
    return;
  }
  touch.type = MANIFOLD_FACE_B;
  touch.normal.x = core.normals[edge].x;
  touch.normal.y = core.normals[edge].y;
  touch.point.x = core.vertices[edge].x;
  touch.point.y = core.vertices[edge].y;
  setCandidate(touch, 0, key, gap, x, y);
}
