import { TimeStep } from 'planck';
import { impulseOf, impulsesOf, type Impulse } from './acceleration.js';
import { AxisRow, type HeldRow } from './axis-row.js';
import type { ContactManager } from './contact/manager.js';
import type { Pair } from './contact/pair.js';
import { isPressedKey, NO_KEY, wasClosedKey, type Touch } from './contact/touch.js';
import type { Friction, Stop } from './element.js';
import type { BodyInternals } from './planck-internals.js';
import { getVelocities, kineticNow, kineticOf, partInner, setVelocities, type Scene } from './scene.js';
import { ShockBooks } from './shock-books.js';
import type { VelocitySolver } from './solver.js';
import { newState, type State } from './state.js';
import type { Strike, Struck } from './strike.js';
import { Unquiet } from './unquiet.js';

/** Approach below this is rounding, not an impact [engine speed]. */
const IMPACT = 1e-6;
/** A closed point or joint whose rate is off by more than this is brought back [engine speed]. */
const OFF = 1e-8;
/** Sweeps at the most: small mechanisms are solved out, large piles are not (what is left is booked). */
const sweepsFor = (constraints: number): number =>
  Math.max(30, Math.min(2000, Math.round(200000 / (constraints + 1) ** 1.5)));
const CONVERGED = 1e-14;

const step = new TimeStep();
step.warmStarting = false;
step.dtRatio = 0;

/**
 * Impulse-only solves at one configuration: impacts (Newton's restitution with kinetic friction, all struck points at
 * once, through joints), and the small corrections that bring velocities back onto closed contacts and joints after a
 * step. Each impulse J is booked with its exact work J·(v⁻ + v⁺)/2.
 */
export class Shock {
  private readonly before: State;
  private readonly unquiet: Unquiet;
  private readonly books: ShockBooks;
  /** Friction that sticks, to be held in a correction. */
  private holding: Friction[] = [];
  /** What part of the restitution the last impact was left with, so that it added no energy. */
  restitutionCut = 1;
  /** The last call of `resolve` changed the velocities. */
  hasChanged = false;

  constructor(
    private readonly scene: Scene,
    private readonly manager: ContactManager,
    private readonly solver: VelocitySolver,
  ) {
    this.before = newState(scene.ids.length);
    this.unquiet = new Unquiet(scene.ids.length);
    this.books = new ShockBooks(scene, manager, solver);
  }

  /** Remembers which points are closed, before the manager settles the new configuration. */
  remember(): void {
    for (const { closed, closedBefore } of this.manager.touches) {
      closedBefore[0] = closed[0];
      closedBefore[1] = closed[1];
    }
  }

  /** Readies contacts, joints and closed stops without any warm start; velocities are those of `state`. */
  private ready(state: State): void {
    setVelocities(this.scene, state.vx, state.vy, state.w);
    this.solver.rigid.prepareShock(this.scene.time);
    for (const joint of this.solver.joints) {
      if (joint.isReleased) continue;
      joint.reader.save();
      joint.reader.joint.initVelocityConstraints(step);
      for (const stop of joint.stops) {
        stop.row.impulse = 0;
        if (stop.isClosed) stop.aim();
      }
    }
  }

  private finish(): void {
    for (const joint of this.solver.joints) if (!joint.isReleased) joint.reader.restore();
  }

  /** Points and stops that are closed now and approach; new ones first matter as impacts. */
  private approaches(): {
    struck: Struck[];
    stops: { stop: Stop; approach: number }[];
    isImpact: boolean;
    isOff: boolean;
  } {
    const struck: Struck[] = [];
    let isImpact = false;
    let isOff = false;
    for (const touch of this.solver.rigid.live) {
      const { contact } = touch;
      for (let j = 0; j < contact.v_pointCount; j += 1) {
        const { nA, nB, tA, tB } = this.solver.rigid.rate(touch, contact.v_points[j as 0 | 1]);
        const approach = nA - nB;
        const isNew = !wasClosedKey(touch, contact.m_manifold.points[j].id.key);
        if (isNew && approach > IMPACT) {
          isImpact = true;
          struck.push({ touch, point: j as 0 | 1, approach });
        } else if (approach > OFF || (approach < -OFF && isPressedKey(touch, contact.m_manifold.points[j].id.key))) {
          isOff = true;
        }
        const slip = tB - tA - contact.m_tangentSpeed;
        if (touch.sliding === 0 && this.isRubbing(touch) && Math.abs(slip) > OFF) isOff = true;
      }
    }
    const stops: { stop: Stop; approach: number }[] = [];
    for (const joint of this.solver.joints) {
      if (joint.isReleased) continue;
      if (joint.reader.violation() > OFF) isOff = true;
      for (const stop of joint.stops) {
        if (!stop.isClosed) continue;
        const approach = -stop.row.rate();
        if (approach > IMPACT) {
          isImpact = true;
          stops.push({ stop, approach });
        } else if (approach > OFF) isOff = true;
      }
    }
    this.holding = this.solver.frictions().filter((friction) => friction.isHolding());
    isOff ||= this.holding.some((friction) => Math.abs(friction.slip(this.scene.time)) > OFF);
    return { struck, stops, isImpact, isOff };
  }

  private isRubbing(touch: Touch): boolean {
    return this.manager.pairs[touch.solvedPair].staticFriction > 0;
  }

  /**
   * Looks at the velocities in `state` at the configuration now in planck, and corrects them where closed points
   * approach. Returns what was struck, or nothing where it was only a correction or nothing was needed.
   *
   * @param beforeImpact called once, before an impact changes anything
   */
  resolve(state: State, beforeImpact: (strikes: Strike[]) => void): Strike[] {
    this.ready(state);
    const { struck, stops, isImpact, isOff } = this.approaches();
    this.hasChanged = isImpact || isOff;
    if (!isImpact && !isOff) {
      this.finish();
      return [];
    }
    this.before.vx.set(state.vx);
    this.before.vy.set(state.vy);
    this.before.w.set(state.w);
    if (!isImpact) {
      this.correct(state);
      this.finish();
      return [];
    }
    const strikes = this.strikes(struck, stops, state);
    this.ready(state);
    beforeImpact(strikes);
    this.impact(struck, stops, state);
    this.finish();
    // What pressed before the impact may well lift off after it.
    for (const touch of this.manager.touches) touch.pressed[0] = touch.pressed[1] = NO_KEY;
    return strikes;
  }

  /**
   * Brings velocities back onto what holds already; booked as velocity-projection. Points that carried force over the
   * step were closed all through it, so that their normal rate is nil either way; others are only kept from approaching.
   */
  private correct(state: State): void {
    const rows: HeldRow[] = [];
    for (const touch of this.solver.rigid.live) this.holdTouch(touch, rows);
    for (const friction of this.holding) friction.aim();
    const sweep = (): void => {
      this.sweepJoints();
      for (const friction of this.holding) friction.hold();
      for (const { row, target, least } of rows) row.solve(target, least, Infinity);
    };
    this.repeat(sweep, this.scene.bodies, this.solver.rigid.live.length, () => [
      ...this.holding.map(({ row }) => impulseOf(row, false)),
      ...rows.map(({ row, least }) => impulseOf(row, least === 0)),
    ]);
    getVelocities(this.scene, state.vx, state.vy, state.w);
    this.books.correction(this.before, [...this.holding, ...rows]);
  }

  /** Adds the rows of a touch's closed points: along the normal, and along the tangent where it sticks. */
  private holdTouch(touch: Touch, rows: HeldRow[]): void {
    const { contact } = touch;
    const { v_normal: n } = contact;
    const sticks = touch.sliding === 0 && this.isRubbing(touch);
    for (let j = 0; j < contact.v_pointCount; j += 1) {
      const { rB } = contact.v_points[j];
      const isPressed = isPressedKey(touch, contact.m_manifold.points[j].id.key);
      rows.push(this.aimed(touch, 2 * j, n.x, n.y, rB, 0, isPressed ? -Infinity : 0));
      if (sticks) rows.push(this.aimed(touch, 2 * j + 1, n.y, -n.x, rB, contact.m_tangentSpeed, -Infinity));
    }
  }

  private aimed(
    touch: Touch,
    slot: number,
    nx: number,
    ny: number,
    rB: { x: number; y: number },
    target: number,
    least: number,
  ): HeldRow {
    const held = (touch.held[slot] ??= this.newRow(touch));
    const { c } = this.scene.bodies[touch.bodyB].c_position;
    held.row.aim(nx, ny, c.x + rB.x, c.y + rB.y);
    held.row.impulse = 0;
    held.target = target;
    held.least = least;
    return held;
  }

  private newRow({ bodyA: a, bodyB: b }: Touch): HeldRow {
    return { a, b, row: new AxisRow(partInner(this.scene, a), partInner(this.scene, b)), target: 0, least: 0 };
  }

  private impact(struck: Struck[], stops: { stop: Stop; approach: number }[], state: State): void {
    const kinetic = kineticOf(this.scene, state);
    let cut = 1;
    this.solveImpact(struck, stops, cut);
    // A belt may well add energy through its surface.
    const isDriven = this.solver.rigid.live.some(({ contact }) => contact.m_tangentSpeed !== 0);
    if (!isDriven && kineticNow(this.scene) > kinetic * (1 + 1e-12)) {
      let low = 0;
      let high = 1;
      for (let i = 0; i < 40; i += 1) {
        cut = (low + high) / 2;
        this.ready(state);
        this.solveImpact(struck, stops, cut);
        if (kineticNow(this.scene) > kinetic) high = cut;
        else low = cut;
      }
      this.ready(state);
      this.solveImpact(struck, stops, low);
      cut = low;
    }
    this.restitutionCut = cut;
    getVelocities(this.scene, state.vx, state.vy, state.w);
    this.books.impact(this.before);
  }

  private solveImpact(struck: Struck[], stops: { stop: Stop; approach: number }[], cut: number): void {
    for (const touch of this.solver.rigid.live) {
      touch.contact.v_friction = this.manager.pairs[touch.solvedPair].kineticFriction;
    }
    for (const { touch, point, approach } of struck) {
      const { restitution, restSpeed } = this.manager.pairs[touch.solvedPair];
      touch.contact.v_points[point].velocityBias = approach < restSpeed ? 0 : cut * restitution * approach;
    }
    const targets = new Map(stops.map(({ stop, approach }) => [stop, cut * stop.restitution * approach]));
    this.iterate(targets);
  }

  private iterate(targets?: ReadonlyMap<Stop, number>): void {
    const { rigid } = this.solver;
    const sweep = (): void => {
      this.sweepJoints(targets);
      rigid.solve();
    };
    this.repeat(sweep, this.scene.bodies, rigid.live.length, () =>
      impulsesOf(rigid.live.map(({ contact }) => contact)),
    );
  }

  private sweepJoints(targets?: ReadonlyMap<Stop, number>): void {
    for (const joint of this.solver.joints) {
      if (joint.isReleased) continue;
      joint.reader.joint.solveVelocityConstraints(step);
      for (const stop of joint.stops) if (stop.isClosed) stop.row.solve(targets?.get(stop) ?? 0, 0, Infinity);
    }
  }

  /** Repeats a sweep until the velocities stand still. */
  private repeat(
    sweep: () => void,
    bodies: readonly BodyInternals[] = this.scene.bodies,
    touches = this.solver.rigid.live.length,
    impulses: () => Impulse[] = () => [],
  ): void {
    const { solver } = this;
    this.unquiet.change(bodies);
    const most = sweepsFor(2 * (touches + solver.joints.length));
    for (let i = 0; i < most; i += 1) {
      sweep();
      solver.sweeps += 1;
      if (this.unquiet.change(bodies) <= CONVERGED) return;
    }
    if (solver.joints.length > 0 || !solver.acceleration.run(sweep, impulses())) solver.unconverged += 1;
  }

  /** What was struck, each pair or stop once, with its greatest approach speed and its effective mass. */
  private strikes(struck: Struck[], stops: { stop: Stop; approach: number }[], state: State): Strike[] {
    const byPair = new Map<Pair, Struck[]>();
    for (const item of struck) {
      const pair = this.manager.pairs[item.touch.solvedPair];
      byPair.set(pair, [...(byPair.get(pair) ?? []), item]);
    }
    const strikes: Strike[] = [];
    for (const [pair, items] of byPair) {
      const worst = items.reduce((a, b) => (b.approach > a.approach ? b : a));
      const { c } = this.scene.bodies[worst.touch.bodyB].c_position;
      const { rB } = worst.touch.contact.v_points[worst.point];
      const place = { x: c.x + rB.x, y: c.y + rB.y };
      strikes.push({ pair, ...place, approachSpeed: worst.approach, effectiveMass: this.effectiveMass(items, state) });
    }
    for (const { stop, approach } of stops) {
      strikes.push({ stop, x: 0, y: 0, approachSpeed: approach, effectiveMass: this.massThroughJoints([stop.row]) });
    }
    return strikes;
  }

  /** Compliant pairs that touch now: no impulse, only the events' figures. */
  softStrikes(state: State): Strike[] {
    if (this.solver.soft.isEmpty) return [];
    setVelocities(this.scene, state.vx, state.vy, state.w);
    const strikes = this.solver.soft.strikes();
    for (const strike of strikes) strike.effectiveMass = this.massThroughJoints(strike.rows ?? []);
    return strikes;
  }

  private isJoined(body: number): boolean {
    return body >= 0 && this.solver.joints.some(({ isReleased, a, b }) => !isReleased && (a === body || b === body));
  }

  /** Effective mass of rows that share an impulse equally, joints holding. */
  private massThroughJoints(rows: readonly AxisRow[]): number {
    const { scene, solver } = this;
    for (const { c_velocity } of scene.bodies) {
      c_velocity.v.x = 0;
      c_velocity.v.y = 0;
      c_velocity.w = 0;
    }
    const joints = solver.joints.filter((joint) => !joint.isReleased);
    for (const { reader } of joints) {
      reader.save();
      reader.joint.initVelocityConstraints(step);
    }
    for (const row of rows) row.apply(1 / rows.length);
    this.repeat(() => {
      for (const { reader } of joints) reader.joint.solveVelocityConstraints(step);
    });
    const rate = rows.reduce((sum, row) => sum + row.rate(), 0) / rows.length;
    for (const { reader } of joints) reader.restore();
    return rate > 0 ? 1 / rate : Infinity;
  }

  /**
   * The mass which, moving at the approach speed, carries the energy that a frictionless plastic impact of these points
   * alone would take, joints holding: Σ λ u / u_max². For one point it is 1 / (n M⁻¹ nᵀ) through the joints.
   */
  private effectiveMass(items: Struck[], state: State): number {
    const touches = [...new Set(items.map(({ touch }) => touch))];
    const { rigid } = this.solver;
    const { bodyA, bodyB } = touches[0];
    const isJoined = this.isJoined(bodyA) || this.isJoined(bodyB);
    if (isJoined) this.ready(state);
    else setVelocities(this.scene, state.vx, state.vy, state.w);
    for (const touch of touches) {
      rigid.clear(touch);
      touch.contact.v_friction = 0;
    }
    this.repeat(
      () => {
        if (isJoined) this.sweepJoints();
        rigid.solveThese(touches);
      },
      isJoined ? this.scene.bodies : [partInner(this.scene, bodyA), partInner(this.scene, bodyB)],
      touches.length,
    );
    let energy = 0;
    let most = 0;
    for (const { touch, point, approach } of items) {
      energy += touch.contact.v_points[point].normalImpulse * approach;
      most = Math.max(most, approach);
    }
    return energy / (most * most);
  }
}
