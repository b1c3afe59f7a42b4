import { pieceExtremeAlong, type Foot } from '../../geometry/index.js';
import { ContactPoint } from '../unilateral.js';
import type { Course } from './course.js';
import { edgesOf, type Faces } from './face.js';
import type { Pair } from './pair.js';
import type { Surfaces } from './round-on-track.js';

/**
 * A flat face of a body on an arc or spline that bulges towards it. The contact point is where the curve's tangent is
 * square to the face's normal N; turning the body runs it along the curve at ṡ = −ω (t·(ẑ × N)) / (κ n·N).
 * With V the body's velocity there: g = N·(p − face), ġ = −N·V, g̈ = −Ṅ·V − N·dV/dt.
 */
export class FaceOnBulge extends ContactPoint {
  pair: Pair;
  readonly bodyA = -1;
  readonly bodyB: number;
  private readonly edge: ReturnType<typeof edgesOf>[number];
  private foot: Foot | null = null;
  private along = 0;
  private stretch = 0;
  private faceX = 0;
  private faceY = 0;

  constructor(
    private readonly course: Course,
    private readonly faces: Faces,
    face: number,
    private readonly surfaces: Surfaces,
    anyPair: Pair,
  ) {
    super();
    this.bodyB = faces.body;
    this.pair = anyPair;
    this.edge = edgesOf(faces)[face];
  }

  locate(q: Float64Array): void {
    const b = 3 * this.bodyB;
    const [c, s] = [Math.cos(q[b + 2]), Math.sin(q[b + 2])];
    this.faceX = c * this.edge.nx - s * this.edge.ny;
    this.faceY = s * this.edge.nx + c * this.edge.ny;
    this.foot = null;
    this.gap = Infinity;
    this.course.forEach((stretch, index) => {
      for (const foot of pieceExtremeAlong(stretch.run, this.faceX, this.faceY)) {
        const free = stretch.free === 0 ? -Math.sign(foot.curvature) : stretch.free;
        const isBulge = foot.curvature * free < 0;
        const looks = free * (foot.tx * this.faceY - foot.ty * this.faceX) < 0;
        if (!isBulge || !looks) continue;
        const dx = foot.x - q[b];
        const dy = foot.y - q[b + 1];
        const lx = c * dx + s * dy;
        const ly = -s * dx + c * dy;
        const along = this.edge.nx * (ly - this.edge.y) - this.edge.ny * (lx - this.edge.x);
        const gap = this.edge.nx * (lx - this.edge.x) + this.edge.ny * (ly - this.edge.y) - this.faces.radius;
        const inside = Math.min(along, this.edge.length - along);
        if (
          inside < (this.isClosed ? -0.1 : -1e-9) ||
          Math.abs(gap) >= Math.abs(this.gap) ||
          gap < -1 / Math.abs(foot.curvature)
        )
          continue;
        this.gap = gap;
        this.foot = foot;
        this.along = inside;
        this.stretch = index;
      }
    });
    const pair = this.foot ? this.surfaces.pairOf(this.bodyB, this.course[this.stretch].track) : null;
    if (pair) this.pair = pair;
    this.isValid = pair !== null;
    this.segment = (this.foot as Foot | null)?.segment ?? -1;
  }

  aim(q: Float64Array, v: Float64Array, t: number): void {
    const { foot, bodyB, faceX: fx, faceY: fy } = this;
    if (!foot) return;
    const b = 3 * bodyB;
    const w = v[b + 2];
    const rx = foot.x - q[b];
    const ry = foot.y - q[b + 1];
    const [vx, vy] = [v[b] - w * ry, v[b + 1] + w * rx];
    const facing = -foot.ty * fx + foot.tx * fy;
    const run = (-w * (foot.tx * -fy + foot.ty * fx)) / (foot.curvature * facing);
    const [px, py] = [run * foot.tx, run * foot.ty];
    // Of dV/dt, what is not an acceleration: ω × (ṗ − v).
    const [gx, gy] = [-w * (py - v[b + 1]), w * (px - v[b])];
    // The normal that counts points from the ground into the body: −N.
    this.nx = -fx;
    this.ny = -fy;
    this.normal.clear().addPoint(bodyB, this.nx, this.ny, rx, ry, 1);
    this.normal.gamma = this.nx * gx + this.ny * gy + w * (-this.ny * vx + this.nx * vy);
    const [tx, ty] = [this.ny, -this.nx];
    this.tangent.clear().addPoint(bodyB, tx, ty, rx, ry, 1);
    this.tangent.gamma = tx * gx + ty * gy + w * (-ty * vx + tx * vy);
    this.x = foot.x;
    this.y = foot.y;
    const { speed, change } = this.surfaces.speedOf(this.course[this.stretch].track, t);
    const sense = Math.sign(tx * foot.tx + ty * foot.ty) || 1;
    this.surfaceSpeed = sense * speed;
    this.surfaceChange = sense * change;
  }

  mark(_q: Float64Array, _v: Float64Array): void {
    // The bulge is followed as it is: only the ends of the face are seams.
  }

  seam(): number {
    return this.foot ? this.along : -1e-9;
  }
}
