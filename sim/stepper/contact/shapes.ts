/**
 * Shapes of the stepper in planck's world. planck's own circle and polygon shapes weld near vertices, round corners by a
 * skin and know no arcs; these carry exact outlines, and the contact geometry is worked out in this folder. planck keeps
 * what it is good at: the broad phase, the contact list and the constraint solver.
 */
import { Shape } from 'planck';
import type { Chain } from './chain.js';
import { contactStatics, type Pose, type XY } from '../planck-internals.js';

interface Bounds {
  lowerBound: XY;
  upperBound: XY;
}

export const CORE = 'core';
export const SURFACE = 'surface';
export const CORNERS = 'corners';

abstract class OutlineShape extends Shape {
  abstract readonly kind: string;
  declare m_type: never;

  constructor(
    kind: string,
    public override m_radius: number,
  ) {
    super();
    (this as { m_type: string }).m_type = kind;
    this.m_radius = m_radius;
  }
  override getRadius(): number {
    return this.m_radius;
  }
  override getType(): never {
    return this.m_type;
  }
  override getChildCount(): number {
    return 1;
  }
  override testPoint(): boolean {
    return false;
  }
  override rayCast(): boolean {
    return false;
  }
  // Masses come from the document.
  override computeMass(data: { mass: number; center: XY; I: number }): void {
    data.mass = 0;
    data.I = 0;
  }
  override computeDistanceProxy(): void {
    // Continuous collision is the stepper's own (bisection to the touch), so planck never asks.
  }
  override _reset(): void {
    // Nothing is cached.
  }
  _clone(): Shape {
    return this;
  }
}

/** Convex core of 1 (disc, particle), 2 (bar) or more vertices (counter-clockwise), swelled by `m_radius`. */
export class CoreShape extends OutlineShape {
  readonly kind = CORE;
  /** A corner of a larger outline, which only meets curved surfaces. */
  isCorner = false;
  /** Outward unit normal of the edge from vertex i to i + 1; for a bar one for each side. */
  readonly normals: XY[];
  /** Farthest point of the outline from the frame's origin. */
  readonly reach: number;
  /** Least width. */
  readonly thickness: number;

  constructor(
    readonly vertices: XY[],
    radius: number,
  ) {
    super(CORE, radius);
    this.reach = radius + Math.max(...vertices.map(({ x, y }) => Math.hypot(x, y)));
    this.normals = vertices.length < 2 ? [] : vertices.map((v, i) => outward(v, vertices[(i + 1) % vertices.length]));
    const widths = this.normals.map((normal, i) => Math.max(...vertices.map((v) => -along(normal, v, vertices[i]))));
    this.thickness = 2 * radius + (widths.length === 0 ? 0 : Math.min(...widths));
  }

  override computeAABB(bounds: Bounds, pose: Pose): void {
    const { lowerBound: low, upperBound: high } = bounds;
    low.x = low.y = Infinity;
    high.x = high.y = -Infinity;
    const { s, c } = pose.q;
    for (const v of this.vertices) {
      const x = pose.p.x + c * v.x - s * v.y;
      const y = pose.p.y + s * v.x + c * v.y;
      if (x < low.x) low.x = x;
      if (y < low.y) low.y = y;
      if (x > high.x) high.x = x;
      if (y > high.y) high.y = y;
    }
    low.x -= this.m_radius;
    low.y -= this.m_radius;
    high.x += this.m_radius;
    high.y += this.m_radius;
  }
}

abstract class ChainShape extends OutlineShape {
  constructor(
    kind: string,
    readonly chain: Chain,
  ) {
    super(kind, 0);
  }
  override computeAABB(bounds: Bounds): void {
    const { lowX, lowY, highX, highY } = this.chain.bounds;
    bounds.lowerBound.x = lowX;
    bounds.lowerBound.y = lowY;
    bounds.upperBound.x = highX;
    bounds.upperBound.y = highY;
  }
}

/** The smooth surface of a chain of track pieces, met by points and rounds of bodies. */
export class SurfaceShape extends ChainShape {
  readonly kind = SURFACE;
  constructor(chain: Chain) {
    super(SURFACE, chain);
  }
}

/** The ends and convex pieces of a chain, met by flat faces of bodies. */
export class CornersShape extends ChainShape {
  readonly kind = CORNERS;
  constructor(chain: Chain) {
    super(CORNERS, chain);
  }
}

const along = (normal: XY, to: XY, from: XY): number => normal.x * (to.x - from.x) + normal.y * (to.y - from.y);

function outward(from: XY, to: XY): XY {
  const length = Math.hypot(to.x - from.x, to.y - from.y);
  return { x: (to.y - from.y) / length, y: -(to.x - from.x) / length };
}

const byStepper = (): void => {
  // The stepper fills the manifolds itself (see touch.ts); planck only needs to know which pairs can meet.
};
contactStatics.addType(CORE, CORE, byStepper);
contactStatics.addType(SURFACE, CORE, byStepper);
contactStatics.addType(CORNERS, CORE, byStepper);
