import type { System } from './system.js';
import type { ContactPoint } from './unilateral.js';

/** Steps are held so short that nothing crosses more than this part of the mechanism, or turns more than this [rad]. */
const TRAVEL = 0.2;
const TURN = 0.5;
/** A point nearer than this is always watched; a turning body may reach so far out. */
const ALWAYS_NEAR = 0.05;
const LEVER = 0.5;

/** How fast things go: what errors are measured by, and how long a step may be. */
export class Pace {
  private speed = 1e-2;
  private spin = 1;
  private energy = 1e-3;

  constructor(
    private readonly system: System,
    private readonly tolerance: number,
    private readonly duration: number,
  ) {}

  /** Error scales by the greatest speed, spin and energy so far, so that they suit every size. */
  measure(v: Float64Array, scale: Float64Array): void {
    const { mass, count } = this.system;
    let kinetic = 0;
    for (let i = 0; i < count; i += 1) {
      this.speed = Math.max(this.speed, Math.hypot(v[3 * i], v[3 * i + 1]));
      this.spin = Math.max(this.spin, Math.abs(v[3 * i + 2]));
      for (let k = 3 * i; k < 3 * i + 3; k += 1) kinetic += 0.5 * mass[k] * v[k] ** 2;
    }
    this.energy = Math.max(this.energy, kinetic);
    const n = v.length;
    for (let i = 0; i < n; i += 1) {
      scale[i] = this.tolerance;
      scale[n + i] = this.tolerance * (i % 3 === 2 ? this.spin : this.speed);
    }
    scale.fill(this.tolerance * this.energy, 2 * n);
  }

  /** The longest step that cannot leap over things, by speeds and accelerations now. */
  longest(v: Float64Array, acceleration: Float64Array): number {
    let speed = 0;
    let spin = 0;
    let push = 0;
    for (let i = 0; i < this.system.count; i += 1) {
      speed = Math.max(speed, Math.hypot(v[3 * i], v[3 * i + 1]));
      spin = Math.max(spin, Math.abs(v[3 * i + 2]));
      push = Math.max(push, Math.hypot(acceleration[3 * i], acceleration[3 * i + 1]));
    }
    // Travel s = v h + a h²/2, solved for h.
    const travel = (2 * TRAVEL) / (speed + Math.sqrt(speed * speed + 2 * push * TRAVEL) + 1e-300);
    return Math.min(travel, TURN / (spin + 1e-300), this.duration / 20);
  }

  /** Whether an open point is near enough for a step of `h` to close it. */
  canMeet(point: ContactPoint, q: Float64Array, v: Float64Array, h: number): boolean {
    point.locate(q);
    const bound = (body: number): number =>
      body < 0 ? 0 : Math.hypot(v[3 * body], v[3 * body + 1]) + Math.abs(v[3 * body + 2]) * LEVER;
    const travel = 2 * h * (bound(point.bodyA) + bound(point.bodyB)) + 4 * h * h + 1e-3;
    return Math.abs(point.gap) <= Math.max(travel, ALWAYS_NEAR);
  }
}
