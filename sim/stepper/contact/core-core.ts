import { MANIFOLD_CIRCLES, MANIFOLD_FACE_A, MANIFOLD_FACE_B, type Pose, type XY } from '../planck-internals.js';
import type { CoreShape } from './shapes.js';
import { setCandidate, type Touch } from './touch.js';

/**
 * Contact points of two convex cores, each swelled by its radius: a point each, a point and a face, or two faces clipped
 * against each other (separating axes; Ericson, *Real-Time Collision Detection*, 2005, ch. 5). Bodies touch at nil gap:
 * no skin.
 */
export function coreAgainstCore(touch: Touch, poseA: Pose, poseB: Pose): void {
  const a = touch.shapeA as CoreShape;
  const b = touch.shapeB;
  toWorld(a, poseA, worldA);
  toWorld(b, poseB, worldB);
  touch.count = 0;
  if (a.vertices.length === 1 && b.vertices.length === 1) pointPair(touch, a, b, 0, 0);
  else if (b.vertices.length === 1) pointAgainstFace(touch, a, b, worldA, worldB, false);
  else if (a.vertices.length === 1) pointAgainstFace(touch, b, a, worldB, worldA, true);
  else faceAgainstFace(touch, a, b);
}

interface WorldCore {
  x: Float64Array;
  y: Float64Array;
  nx: Float64Array;
  ny: Float64Array;
  count: number;
}
const MOST_VERTICES = 256;
const worldCore = (): WorldCore => ({
  x: new Float64Array(MOST_VERTICES),
  y: new Float64Array(MOST_VERTICES),
  nx: new Float64Array(MOST_VERTICES),
  ny: new Float64Array(MOST_VERTICES),
  count: 0,
});
const worldA = worldCore();
const worldB = worldCore();

function toWorld(core: CoreShape, pose: Pose, out: WorldCore): void {
  const { s, c } = pose.q;
  out.count = core.vertices.length;
  for (let i = 0; i < out.count; i += 1) {
    const v = core.vertices[i];
    out.x[i] = pose.p.x + c * v.x - s * v.y;
    out.y[i] = pose.p.y + s * v.x + c * v.y;
    const n = core.normals[i];
    if (!n) continue;
    out.nx[i] = c * n.x - s * n.y;
    out.ny[i] = s * n.x + c * n.y;
  }
}

function pointPair(touch: Touch, a: CoreShape, b: CoreShape, i: number, j: number): void {
  const radii = a.m_radius + b.m_radius;
  const away = Math.hypot(worldB.x[j] - worldA.x[i], worldB.y[j] - worldA.y[i]);
  // Two bare points (particles, sharp corners) have no normal and never meet.
  if (radii === 0) return;
  circles(touch, a.vertices[i], b.vertices[j], away - radii, 1024 + i * 64 + j);
}

function circles(touch: Touch, pointA: XY, pointB: XY, gap: number, key: number): void {
  touch.type = MANIFOLD_CIRCLES;
  touch.point.x = pointA.x;
  touch.point.y = pointA.y;
  setCandidate(touch, 0, key, gap, pointB.x, pointB.y);
  touch.count = 1;
}

/** Index of the edge of `core` whose outward side the point lies farthest on, and that distance. */
const edgeOut = { edge: 0, distance: 0 };
function farthestEdge(core: WorldCore, x: number, y: number): typeof edgeOut {
  edgeOut.distance = -Infinity;
  for (let i = 0; i < core.count; i += 1) {
    const distance = core.nx[i] * (x - core.x[i]) + core.ny[i] * (y - core.y[i]);
    if (distance <= edgeOut.distance) continue;
    edgeOut.distance = distance;
    edgeOut.edge = i;
  }
  return edgeOut;
}

/** A point (disc, particle) against a core with faces. `swapped`: the point is planck's body A. */
function pointAgainstFace(
  touch: Touch,
  core: CoreShape,
  point: CoreShape,
  coreWorld: WorldCore,
  pointWorld: WorldCore,
  swapped: boolean,
): void {
  const x = pointWorld.x[0];
  const y = pointWorld.y[0];
  const { edge, distance } = farthestEdge(coreWorld, x, y);
  const next = (edge + 1) % coreWorld.count;
  const radii = core.m_radius + point.m_radius;
  const vertex = distance > 0 || core.vertices.length === 2 ? beyondEdge(coreWorld, edge, next, x, y) : -1;
  if (vertex >= 0) {
    if (radii === 0) return;
    const away = Math.hypot(x - coreWorld.x[vertex], y - coreWorld.y[vertex]);
    const corner = core.vertices[vertex];
    const centre = point.vertices[0];
    if (swapped) circles(touch, centre, corner, away - radii, 512 + vertex);
    else circles(touch, corner, centre, away - radii, 512 + vertex);
    return;
  }
  face(touch, core, edge, swapped);
  setCandidate(touch, 0, edge, distance - radii, point.vertices[0].x, point.vertices[0].y);
  touch.count = 1;
}

function face(touch: Touch, core: CoreShape, edge: number, isB: boolean): void {
  touch.type = isB ? MANIFOLD_FACE_B : MANIFOLD_FACE_A;
  const normal = core.normals[edge];
  const corner = core.vertices[edge];
  touch.normal.x = normal.x;
  touch.normal.y = normal.y;
  touch.point.x = corner.x;
  touch.point.y = corner.y;
}

/** The end vertex of an edge that a point lies beyond, or −1 where its foot is on the edge. */
function beyondEdge(core: WorldCore, edge: number, next: number, x: number, y: number): number {
  const ex = core.x[next] - core.x[edge];
  const ey = core.y[next] - core.y[edge];
  const along = ex * (x - core.x[edge]) + ey * (y - core.y[edge]);
  if (along < 0) return edge;
  return along > ex * ex + ey * ey ? next : -1;
}

const axis = { edge: 0, separation: 0 };

/** Greatest separation of `other` from the faces of `core`. */
function faceSeparation(core: WorldCore, other: WorldCore): typeof axis {
  axis.separation = -Infinity;
  for (let i = 0; i < core.count; i += 1) {
    let least = Infinity;
    for (let j = 0; j < other.count; j += 1) {
      const distance = core.nx[i] * (other.x[j] - core.x[i]) + core.ny[i] * (other.y[j] - core.y[i]);
      if (distance < least) least = distance;
    }
    if (least <= axis.separation) continue;
    axis.separation = least;
    axis.edge = i;
  }
  return axis;
}

/** A face must win by this much over the other body's, so that the reference face does not flicker [engine length]. */
const PREFER_FIRST = 1e-9;

function faceAgainstFace(touch: Touch, a: CoreShape, b: CoreShape): void {
  // Both calls answer in one object, so that each answer is taken apart at once.
  const { edge: edgeA, separation: separationA } = faceSeparation(worldA, worldB);
  const { edge: edgeB, separation: separationB } = faceSeparation(worldB, worldA);
  const radii = a.m_radius + b.m_radius;
  const separation = Math.max(separationA, separationB);
  if (separation > 0 && radii > 0 && cornersNearer(touch, a, b, separation, radii)) return;
  const useB = separationB > separationA + PREFER_FIRST;
  if (useB) clip(touch, b, a, worldB, worldA, edgeB, true);
  else clip(touch, a, b, worldA, worldB, edgeA, false);
}

/** Rounded corners facing each other: nearer along the line of their centres than along any face normal. */
function cornersNearer(touch: Touch, a: CoreShape, b: CoreShape, separation: number, radii: number): boolean {
  let best = Infinity;
  let bestI = 0;
  let bestJ = 0;
  for (let i = 0; i < worldA.count; i += 1) {
    for (let j = 0; j < worldB.count; j += 1) {
      const away = Math.hypot(worldB.x[j] - worldA.x[i], worldB.y[j] - worldA.y[i]);
      if (away >= best) continue;
      best = away;
      bestI = i;
      bestJ = j;
    }
  }
  const squareA = isSquareToEdge(worldA, worldB.x[bestJ], worldB.y[bestJ]);
  const squareB = isSquareToEdge(worldB, worldA.x[bestI], worldA.y[bestI]);
  if (squareA || squareB || best <= separation) return false;
  circles(touch, a.vertices[bestI], b.vertices[bestJ], best - radii, 1024 + bestI * 64 + bestJ);
  return true;
}

function isSquareToEdge(core: WorldCore, x: number, y: number): boolean {
  const { edge } = farthestEdge(core, x, y);
  return beyondEdge(core, edge, (edge + 1) % core.count, x, y) < 0;
}

/** Clips the face of `other` that looks at `core`'s face `edge` to that face's width. */
function clip(
  touch: Touch,
  core: CoreShape,
  other: CoreShape,
  coreWorld: WorldCore,
  otherWorld: WorldCore,
  edge: number,
  isB: boolean,
): void {
  face(touch, core, edge, isB);
  const nx = coreWorld.nx[edge];
  const ny = coreWorld.ny[edge];
  const incident = mostOpposed(otherWorld, nx, ny);
  const next = (edge + 1) % coreWorld.count;
  const end = (incident + 1) % otherWorld.count;
  const tx = -ny;
  const ty = nx;
  const low = tx * coreWorld.x[edge] + ty * coreWorld.y[edge];
  const high = tx * coreWorld.x[next] + ty * coreWorld.y[next];
  const s0 = tx * otherWorld.x[incident] + ty * otherWorld.y[incident];
  const s1 = tx * otherWorld.x[end] + ty * otherWorld.y[end];
  const radii = core.m_radius + other.m_radius;
  const width = s1 - s0;
  for (const isStart of BOTH_ENDS) {
    const s = isStart ? s0 : s1;
    const held = Math.min(Math.max(s, Math.min(low, high)), Math.max(low, high));
    const u = width === 0 ? (isStart ? 0 : 1) : (held - s0) / width;
    if (u < 0 || u > 1) continue;
    const from = other.vertices[incident];
    const to = other.vertices[end];
    const wx = otherWorld.x[incident] + u * (otherWorld.x[end] - otherWorld.x[incident]);
    const wy = otherWorld.y[incident] + u * (otherWorld.y[end] - otherWorld.y[incident]);
    const gap = nx * (wx - coreWorld.x[edge]) + ny * (wy - coreWorld.y[edge]) - radii;
    const vertex = isStart ? incident : end;
    const key = 4096 + (isB ? 65536 : 0) + edge * 128 + vertex * 2 + (held === s ? 0 : 1);
    setCandidate(touch, touch.count as 0 | 1, key, gap, from.x + u * (to.x - from.x), from.y + u * (to.y - from.y));
    touch.count += 1;
  }
}

const BOTH_ENDS: readonly boolean[] = [true, false];

function mostOpposed(core: WorldCore, nx: number, ny: number): number {
  let least = Infinity;
  let found = 0;
  for (let i = 0; i < core.count; i += 1) {
    const along = core.nx[i] * nx + core.ny[i] * ny;
    if (along >= least) continue;
    least = along;
    found = i;
  }
  return found;
}
