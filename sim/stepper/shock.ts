import { TimeStep } from 'planck';
import type { ContactManager } from './contact/manager.js';
import { addWork, type Pair } from './contact/pair.js';
import type { Touch } from './contact/touch.js';
import type { Stop } from './element.js';
import type { JointElement } from './kinds/joint.js';
import { getVelocities, setVelocities, type Scene } from './scene.js';
import type { VelocitySolver } from './solver.js';
import { newState, type State } from './state.js';

/** Approach below this is rounding, not an impact [engine speed]. */
const IMPACT = 1e-6;
/** A closed point or joint whose rate is off by more than this is brought back [engine speed]. */
const OFF = 1e-8;
/** Friction bound while a sticking contact is brought exactly to rest. */
const UNBOUNDED = 1e9;
const MOST_SWEEPS = 2000;
const CONVERGED = 1e-14;

/** A pair or a stop that was struck, for the run's events. */
export interface Strike {
  pair?: Pair;
  stop?: Stop;
  x: number;
  y: number;
  approachSpeed: number;
  effectiveMass: number;
}

interface Struck {
  touch: Touch;
  point: 0 | 1;
  approach: number;
}

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
  private readonly last: State;
  /** Keys that were closed before the present configuration was settled, by touch. */
  private readonly known = new Map<Touch, [number, number]>();
  /** What part of the restitution the last impact was left with, so that it added no energy. */
  restitutionCut = 1;
  /** Takes every impact as plastic. */
  isPlastic = false;

  constructor(
    private readonly scene: Scene,
    private readonly manager: ContactManager,
    private readonly solver: VelocitySolver,
  ) {
    this.before = newState(scene.ids.length);
    this.last = newState(scene.ids.length);
  }

  /** Remembers which points are closed, before the manager settles the new configuration. */
  remember(): void {
    this.known.clear();
    for (const touch of this.manager.touches) this.known.set(touch, [touch.closed[0], touch.closed[1]]);
  }

  private wasClosed(touch: Touch, key: number): boolean {
    const keys = this.known.get(touch);
    return keys !== undefined && (keys[0] === key || keys[1] === key);
  }

  /** Readies contacts, joints and closed stops without any warm start; velocities are those of `state`. */
  private ready(state: State): void {
    setVelocities(this.scene, state.vx, state.vy, state.w);
    this.solver.rigid.prepare(0, 0, this.scene.time);
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
        const isNew = !this.wasClosed(touch, contact.m_manifold.points[j].id.key);
        if (isNew && approach > IMPACT) {
          isImpact = true;
          struck.push({ touch, point: j as 0 | 1, approach });
        } else if (approach > OFF) isOff = true;
        const slip = tB - tA - contact.m_tangentSpeed;
        if (touch.sliding === 0 && this.isRubbing(touch) && Math.abs(slip) > OFF) isOff = true;
      }
    }
    const stops: { stop: Stop; approach: number }[] = [];
    for (const joint of this.solver.joints) {
      if (joint.isReleased) continue;
      if (joint.reader.violation() > OFF) isOff = true;
      const { frictionRow } = joint;
      if (frictionRow?.sliding === 0) {
        frictionRow.aim();
        if (Math.abs(frictionRow.slip()) > OFF) isOff = true;
      }
      for (const stop of joint.stops) {
        if (!stop.isClosed) continue;
        const approach = -stop.row.rate();
        if (approach > IMPACT) {
          isImpact = true;
          stops.push({ stop, approach });
        } else if (approach > OFF) isOff = true;
      }
    }
    return { struck, stops, isImpact, isOff };
  }

  private isRubbing(touch: Touch): boolean {
    return this.manager.pairs[touch.pair].staticFriction > 0;
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
    return strikes;
  }

  /** Brings velocities back onto what holds already; booked as velocity-projection. */
  private correct(state: State): void {
    for (const touch of this.solver.rigid.live) {
      touch.contact.v_friction = touch.sliding === 0 && this.isRubbing(touch) ? UNBOUNDED : 0;
    }
    for (const joint of this.solver.joints) if (joint.frictionRow?.sliding === 0) joint.frictionRow.aim();
    this.iterate(() => {
      for (const joint of this.solver.joints) if (joint.frictionRow?.sliding === 0) joint.frictionRow.hold();
    });
    getVelocities(this.scene, state.vx, state.vy, state.w);
    this.book(false);
  }

  private impact(struck: Struck[], stops: { stop: Stop; approach: number }[], state: State): void {
    const kinetic = this.kinetic(state);
    let cut = this.isPlastic ? 0 : 1;
    this.solveImpact(struck, stops, cut);
    // A belt may well add energy through its surface.
    const isDriven = this.solver.rigid.live.some(({ contact }) => contact.m_tangentSpeed !== 0);
    if (!isDriven && this.kineticNow() > kinetic * (1 + 1e-12)) {
      let low = 0;
      let high = 1;
      for (let i = 0; i < 40; i += 1) {
        cut = (low + high) / 2;
        this.ready(state);
        this.solveImpact(struck, stops, cut);
        if (this.kineticNow() > kinetic) high = cut;
        else low = cut;
      }
      this.ready(state);
      this.solveImpact(struck, stops, low);
      cut = low;
    }
    this.restitutionCut = this.isPlastic ? 1 : cut;
    getVelocities(this.scene, state.vx, state.vy, state.w);
    this.book(true);
  }

  private solveImpact(struck: Struck[], stops: { stop: Stop; approach: number }[], cut: number): void {
    for (const touch of this.solver.rigid.live) {
      touch.contact.v_friction = this.manager.pairs[touch.pair].kineticFriction;
    }
    for (const { touch, point, approach } of struck) {
      const { restitution, restSpeed } = this.manager.pairs[touch.pair];
      touch.contact.v_points[point].velocityBias = approach < restSpeed ? 0 : cut * restitution * approach;
    }
    const targets = new Map(stops.map(({ stop, approach }) => [stop, cut * stop.restitution * approach]));
    this.iterate(() => undefined, targets);
  }

  private iterate(more: () => void, targets?: Map<Stop, number>): void {
    const { scene, solver, last } = this;
    getVelocities(scene, last.vx, last.vy, last.w);
    for (let i = 0; i < MOST_SWEEPS; i += 1) {
      for (const joint of solver.joints) {
        if (joint.isReleased) continue;
        joint.reader.joint.solveVelocityConstraints(step);
        for (const stop of joint.stops) if (stop.isClosed) stop.row.solve(targets?.get(stop) ?? 0, 0, Infinity);
      }
      more();
      solver.rigid.solve();
      solver.sweeps += 1;
      if (this.change() <= CONVERGED) return;
    }
    solver.unconverged += 1;
  }

  private change(): number {
    const { vx, vy, w } = this.last;
    let change = 0;
    let most = 1e-3;
    this.scene.bodies.forEach(({ c_velocity }, i) => {
      const { v } = c_velocity;
      change = Math.max(change, Math.abs(v.x - vx[i]), Math.abs(v.y - vy[i]), Math.abs(c_velocity.w - w[i]));
      most = Math.max(most, Math.abs(v.x), Math.abs(v.y), Math.abs(c_velocity.w));
      vx[i] = v.x;
      vy[i] = v.y;
      w[i] = c_velocity.w;
    });
    return change / most;
  }

  /** Books every impulse at the mean of the velocities before (kept) and after (in planck). */
  private book(isImpact: boolean): void {
    const { scene, before, last, solver } = this;
    getVelocities(scene, last.vx, last.vy, last.w);
    scene.bodies.forEach(({ c_velocity }, i) => {
      c_velocity.v.x = (c_velocity.v.x + before.vx[i]) / 2;
      c_velocity.v.y = (c_velocity.v.y + before.vy[i]) / 2;
      c_velocity.w = (c_velocity.w + before.w[i]) / 2;
    });
    for (const joint of solver.joints) if (!joint.isReleased) this.bookJoint(joint, isImpact);
    for (const touch of solver.rigid.live) this.bookTouch(touch, isImpact);
    setVelocities(scene, last.vx, last.vy, last.w);
  }

  private bookJoint(joint: JointElement, isImpact: boolean): void {
    joint.bookShock(isImpact ? 'solver-residual' : 'velocity-projection');
    for (const stop of joint.stops) {
      const { row } = stop;
      if (!stop.isClosed || row.impulse === 0) continue;
      const onA = -row.impulse * row.rateA();
      const onB = row.impulse * row.rateB();
      if (isImpact) stop.bookImpact(onA, onB);
      else joint.bookWork(onA, onB, 'velocity-projection');
    }
    const { frictionRow } = joint;
    if (isImpact || frictionRow?.sliding !== 0) return;
    const { row } = frictionRow;
    this.scene.numerical.add('velocity-projection', joint.a, -row.impulse * row.rateA());
    this.scene.numerical.add('velocity-projection', joint.b, row.impulse * row.rateB());
  }

  private bookTouch(touch: Touch, isImpact: boolean): void {
    const pair = this.manager.pairs[touch.pair];
    const { contact, bodyA, bodyB } = touch;
    for (let j = 0; j < contact.v_pointCount; j += 1) {
      const point = contact.v_points[j as 0 | 1];
      const { normalImpulse: n, tangentImpulse: t } = point;
      if (n === 0 && t === 0) continue;
      const { nA, nB, tA, tB } = this.solver.rigid.rate(touch, point);
      const onA = -(n * nA + t * tA);
      const onB = n * nB + t * tB;
      if (!isImpact) {
        this.scene.numerical.add('velocity-projection', bodyA, onA);
        this.scene.numerical.add('velocity-projection', bodyB, onB);
        continue;
      }
      addWork(pair.impact, pair, bodyA, onA, onB);
      // What a belt puts in through its surface is no loss of the impact.
      pair.impact.heat(-(onA + onB) + t * contact.m_tangentSpeed);
      const { c } = this.scene.bodies[bodyB].c_position;
      pair.reading.x = c.x + point.rB.x;
      pair.reading.y = c.y + point.rB.y;
      pair.reading.segment = touch.segment;
    }
  }

  private kinetic({ vx, vy, w }: State): number {
    const { mass, inertia } = this.scene;
    let sum = 0;
    for (let i = 0; i < mass.length; i += 1) {
      sum += 0.5 * (mass[i] * (vx[i] ** 2 + vy[i] ** 2) + inertia[i] * w[i] ** 2);
    }
    return sum;
  }

  private kineticNow(): number {
    const { vx, vy, w } = this.last;
    getVelocities(this.scene, vx, vy, w);
    return this.kinetic(this.last);
  }

  /** What was struck, each pair or stop once, with its greatest approach speed and its effective mass. */
  private strikes(struck: Struck[], stops: { stop: Stop; approach: number }[], state: State): Strike[] {
    const byPair = new Map<Pair, Struck[]>();
    for (const item of struck) {
      const pair = this.manager.pairs[item.touch.pair];
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
      strikes.push({ stop, x: 0, y: 0, approachSpeed: approach, effectiveMass: stop.row.mass });
    }
    return strikes;
  }

  /**
   * The mass which, moving at the approach speed, carries the energy that a frictionless plastic impact of these points
   * alone would take, joints holding: Σ λ u / u_max². For one point it is 1 / (n M⁻¹ nᵀ) through the joints.
   */
  private effectiveMass(items: Struck[], state: State): number {
    const chosen = new Set(items.map(({ touch }) => touch));
    this.ready(state);
    const live = this.solver.rigid.live;
    const all = live.splice(0, live.length, ...live.filter((touch) => chosen.has(touch)));
    for (const touch of live) touch.contact.v_friction = 0;
    this.iterate(() => undefined);
    let energy = 0;
    let most = 0;
    for (const { touch, point, approach } of items) {
      energy += touch.contact.v_points[point].normalImpulse * approach;
      most = Math.max(most, approach);
    }
    live.splice(0, live.length, ...all);
    return energy / (most * most);
  }
}
