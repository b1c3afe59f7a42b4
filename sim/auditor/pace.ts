import type { Shape } from '../mechanism/kinds/body.js';
import { edgesOf } from './contact/face.js';
import { SAMPLES } from './event-finder.js';
import type { System } from './system.js';
import type { ContactPoint } from './unilateral.js';

/** Steps are held so short that nothing crosses more than this part of the mechanism, or turns more than this [rad]. */
const TRAVEL = 0.2;
const TURN = 0.5;
/** A point nearer than this is always watched; a turning body may reach so far out. */
const ALWAYS_NEAR = 0.05;
const LEVER = 0.5;
/** Part of the thicker body that may go by between two looks. */
const UNSEEN = 0.4;

/** How fast things go: what errors are measured by, and how long a step may be. */
export class Pace {
  private speed = 1e-2;
  private spin = 1;
  private energy = 1e-3;
  /** Least width of each body. */
  private readonly thickness: number[];

  constructor(
    private readonly system: System,
    private readonly tolerance: number,
    private readonly duration: number,
    /** Nothing can be met: a step is too long by its error alone. */
    private readonly meetsNothing: boolean,
  ) {
    this.thickness = system.mechanism.bodies.map(({ shape }) => thicknessOf(shape));
  }

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
    if (this.meetsNothing) return this.duration / 20;
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

  /**
   * The longest step in which two bodies near each other cannot pass through one another between two looks at them.
   * Infinite where one of the two is the ground: its surfaces are solid all the way back.
   */
  unmissable({ bodyA, bodyB }: ContactPoint, v: Float64Array): number {
    if (bodyA < 0 || bodyB < 0) return Infinity;
    const thin = Math.max(this.thickness[bodyA], this.thickness[bodyB]);
    return (SAMPLES * UNSEEN * thin) / (this.bound(bodyA, v) + this.bound(bodyB, v) + 1e-300);
  }

  private bound(body: number, v: Float64Array): number {
    if (body < 0) return 0;
    return Math.hypot(v[3 * body], v[3 * body + 1]) + Math.abs(v[3 * body + 2]) * LEVER;
  }

  /** Whether an open point is near enough for a step of `h` to close it. */
  canMeet(point: ContactPoint, q: Float64Array, v: Float64Array, h: number): boolean {
    point.locate(q);
    const travel = 2 * h * (this.bound(point.bodyA, v) + this.bound(point.bodyB, v)) + 4 * h * h + 1e-3;
    return Math.abs(point.gap) <= Math.max(travel, ALWAYS_NEAR);
  }
}

/** Least width of a shape: what another must cross to come out behind it. */
function thicknessOf(shape: Shape): number {
  switch (shape.kind) {
    case 'disc':
      return 2 * shape.radius;
    case 'box':
      return Math.min(shape.width, shape.height);
    case 'bar':
      return shape.width;
    case 'polygon':
      return Math.min(
        ...edgesOf({ points: shape.points.map(([x, y]) => ({ x, y })) }).map((edge) => depth(edge, shape)),
      );
    default:
      return 0;
  }
}

function depth(
  edge: { x: number; y: number; nx: number; ny: number },
  { points }: Shape & { kind: 'polygon' },
): number {
  return Math.max(...points.map(([x, y]) => Math.abs(edge.nx * (x - edge.x) + edge.ny * (y - edge.y))));
}
