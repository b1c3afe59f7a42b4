import type { ContactPoint } from '../unilateral.js';

/**
 * A compliant contact point: while it is pressed, a spring and damper along the normal whose force never pulls, and Coulomb
 * friction on that force. It lets go when the force reaches nil; what is left in its spring then is lost to its damper.
 */
export class SoftPoint {
  isPressed = false;
  sliding: 1 | -1 | 0 = 0;
  /** Normal force, and friction on B along the tangent. */
  normal = 0;
  friction = 0;
  /** It let go with overlap left, and may press again only when that is gone or grows. */
  hasLetGo = false;

  constructor(
    readonly point: ContactPoint,
    private readonly share: number,
  ) {}

  get stiffness(): number {
    return (this.point.pair.compliant?.stiffness ?? 0) * this.share;
  }

  get damping(): number {
    return (this.point.pair.compliant?.damping ?? 0) * this.share;
  }

  get rubs(): boolean {
    return this.point.pair.friction !== null;
  }

  /** Force of spring and damper at a gap and its rate: negative where it would pull. */
  forceAt(gap: number, rate: number): number {
    return -this.stiffness * gap - this.damping * rate;
  }

  energy(): number {
    return this.isPressed && this.point.gap < 0 ? 0.5 * this.stiffness * this.point.gap ** 2 : 0;
  }

  update(q: Float64Array, v: Float64Array, t: number): void {
    const { point } = this;
    point.locate(q);
    point.aim(q, v, t);
    this.normal = this.forceAt(point.gap, point.rate(v));
    const { kineticFriction } = point.pair;
    this.friction = this.sliding === 0 ? 0 : -this.sliding * kineticFriction * this.normal;
  }

  /** Adds the normal force, and friction where it slides. */
  addForce(force: Float64Array): void {
    this.point.normal.addForce(force, this.normal);
    if (this.sliding !== 0) this.point.tangent.addForce(force, this.friction);
  }

  powers(into: Float64Array, v: Float64Array): void {
    const { point, stiffness, damping } = this;
    const { pair } = point;
    const rate = point.rate(v);
    pair.spring?.addRow(into, point.normal, -stiffness * point.gap, v);
    pair.damper?.addRow(into, point.normal, -damping * rate, v);
    pair.damper?.heat(into, damping * rate * rate);
    if (!pair.friction) return;
    pair.friction.addRow(into, point.tangent, this.friction, v);
    if (this.sliding !== 0) pair.friction.heat(into, -this.friction * point.slip(v));
  }
}
