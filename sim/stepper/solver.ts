import { Acceleration, impulsesOf } from './acceleration.js';
import type { ContactManager } from './contact/manager.js';
import { RigidContacts } from './contact/rigid.js';
import { RollingResistance } from './contact/rolling.js';
import { SoftContacts } from './contact/soft.js';
import type { Element, Friction } from './element.js';
import type { JointElement } from './kinds/joint.js';
import { getVelocities, setVelocities, type Scene } from './scene.js';
import { newState, type State } from './state.js';

/** Velocities have converged when a sweep moves none by more than this share of the greatest [engine speed]. */
const CONVERGED = 1e-13;
/** Sweeps at the most, by how many constraints there are: small mechanisms are solved out, large piles are not. */
const sweepsFor = (constraints: number): number =>
  Math.max(12, Math.min(400, Math.round(20000 / (constraints + 1) ** 1.5)));

/**
 * The velocity solve of one step: forces push, then joints, rows and contacts are swept in turn on planck's velocities
 * (projected Gauss–Seidel with warm start) until nothing moves any more.
 */
export class VelocitySolver {
  readonly rigid: RigidContacts;
  readonly soft: SoftContacts;
  readonly rolling: RollingResistance[];
  /** Dry friction of joints and rolling. */
  private readonly dry: readonly Friction[];
  private readonly before: State;
  readonly acceleration: Acceleration;
  sweeps = 0;
  solves = 0;
  /** Solves that ran out of sweeps. */
  unconverged = 0;

  constructor(
    private readonly scene: Scene,
    private readonly manager: ContactManager,
    readonly elements: readonly Element[],
    readonly joints: readonly JointElement[],
  ) {
    this.rigid = new RigidContacts(scene, manager);
    this.soft = new SoftContacts(scene, manager);
    this.rolling = manager.pairs
      .filter((pair) => pair.rollingResistance > 0)
      .map((pair) => new RollingResistance(scene, pair));
    this.dry = [...joints.flatMap(({ frictionRow }) => frictionRow ?? []), ...this.rolling];
    this.acceleration = new Acceleration(scene);
    this.before = newState(scene.ids.length);
  }

  /**
   * Solves for the mean velocity v̄ of a step from `start`, at the configuration now in planck; v̄ is left in planck's
   * bodies. `ratio` scales the last step's impulses for the warm start.
   */
  solveStep(start: State, half: number, ratio: number): void {
    let isDone = false;
    let warm = ratio;
    // Each pass can only turn sticking into sliding, so there are never more passes than contacts.
    for (let pass = 0; !isDone && pass <= this.manager.touches.length + this.elements.length; pass += 1) {
      setVelocities(this.scene, start.vx, start.vy, start.w);
      this.push(half);
      this.prepare(half, warm);
      this.iterate(() => this.sweep());
      this.rigid.keepImpulses();
      isDone = !this.breakAway();
      // The impulses just found are already those of this half step.
      warm = ratio > 0 ? 1 : 0;
    }
  }

  private push(half: number): void {
    const { gravity, bodies } = this.scene;
    for (const { c_velocity } of bodies) {
      c_velocity.v.x += half * gravity.x;
      c_velocity.v.y += half * gravity.y;
    }
    for (const element of this.elements) element.push?.(half);
  }

  private prepare(half: number, ratio: number): void {
    this.rigid.prepare(half, ratio, this.scene.time + half);
    if (!this.soft.isEmpty) this.soft.prepare(half);
    for (const element of this.elements) element.prepare?.(half, ratio);
    for (const rolling of this.rolling) rolling.prepare(ratio);
    for (const joint of this.joints) {
      for (const stop of joint.stops) {
        if (!stop.isClosed) continue;
        stop.aim();
        stop.row.start(stop.row.impulse * ratio);
      }
    }
  }

  private sweep(): void {
    for (const element of this.elements) element.solve?.();
    for (const joint of this.joints) {
      for (const stop of joint.stops) if (stop.isClosed) stop.row.solve(0, 0, Infinity);
    }
    this.soft.solve();
    this.rigid.solve();
    for (const rolling of this.rolling) rolling.solve(this.normalImpulse(rolling));
  }

  private normalImpulse(rolling: RollingResistance): number {
    let sum = 0;
    for (const { solvedPair, contact } of this.rigid.live) {
      if (solvedPair !== rolling.pair.index) continue;
      for (let j = 0; j < contact.v_pointCount; j += 1) sum += contact.v_points[j as 0 | 1].normalImpulse;
    }
    return sum + this.soft.normalImpulse(rolling.pair);
  }

  /** Repeats a sweep until the velocities stand still. */
  iterate(sweep: () => void): void {
    const { before, scene } = this;
    const most = sweepsFor(this.rigid.live.length * 2 + this.joints.length * 2 + this.elements.length);
    this.solves += 1;
    if (this.rigid.live.length === 0 && this.joints.length === 0 && this.elements.every((element) => !element.solve)) {
      if (this.soft.isEmpty && this.rolling.length === 0) return;
    }
    getVelocities(scene, before.vx, before.vy, before.w);
    for (let i = 0; i < most; i += 1) {
      sweep();
      this.sweeps += 1;
      if (this.change() <= CONVERGED) return;
    }
    if (!this.accelerate(sweep)) this.unconverged += 1;
  }

  private accelerate(sweep: () => void): boolean {
    const isContactsOnly = this.joints.length === 0 && this.soft.live.length === 0 && this.rolling.length === 0;
    if (!isContactsOnly || !this.elements.every((element) => !element.solve)) return false;
    return this.acceleration.run(sweep, impulsesOf(this.rigid.live.map(({ contact }) => contact)));
  }

  /** Greatest change of a velocity since last asked, relative to the greatest velocity. */
  private change(): number {
    const { vx, vy, w } = this.before;
    let change = 0;
    let most = 1e-3;
    const { bodies } = this.scene;
    for (let i = 0; i < bodies.length; i += 1) {
      const { c_velocity } = bodies[i];
      const { v } = c_velocity;
      change = Math.max(change, Math.abs(v.x - vx[i]), Math.abs(v.y - vy[i]), Math.abs(c_velocity.w - w[i]));
      most = Math.max(most, Math.abs(v.x), Math.abs(v.y), Math.abs(c_velocity.w));
      vx[i] = v.x;
      vy[i] = v.y;
      w[i] = c_velocity.w;
    }
    return change / most;
  }

  /** All dry friction but that of planck's contacts. */
  frictions(): readonly Friction[] {
    return this.soft.isEmpty ? this.dry : [...this.dry, ...this.soft.live];
  }

  /** Lets go what has reached its static limit; true when the solve must be done again with a lower coefficient. */
  private breakAway(): boolean {
    let again = this.rigid.breakAway();
    for (const friction of this.frictions()) {
      if (friction.sliding !== 0) continue;
      friction.sliding = friction.breakaway();
      again ||= friction.sliding !== 0 && friction.drops;
    }
    return again;
  }
}
