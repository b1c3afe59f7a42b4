import { convexParts } from '../../geometry/index.js';
import type { Body } from '../../mechanism/kinds/body.js';
import type { XY } from '../planck-internals.js';

/** A convex core in the frame of the mass centre [engine length]. */
export interface Core {
  vertices: XY[];
  radius: number;
}

/** The convex cores that make up a body's outline. */
export function coresOf(body: Body, length: number): Core[] {
  const [cx, cy] = body.centerOfMass;
  return convexParts(body.shape).map(({ points, radius }) => ({
    vertices: points.map(([x, y]) => ({ x: (x - cx) / length, y: (y - cy) / length })),
    radius: radius / length,
  }));
}

/** The corners (or round ends) of a body's outline, for surfaces that curve under it. */
export function cornersOf(body: Body, length: number): Core[] {
  if (body.shape.kind === 'particle' || body.shape.kind === 'disc') return [];
  const corners = new Map<string, Core>();
  for (const { vertices, radius } of coresOf(body, length)) {
    for (const vertex of vertices) corners.set(`${vertex.x},${vertex.y}`, { vertices: [vertex], radius });
  }
  return [...corners.values()];
}
