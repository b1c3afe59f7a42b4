import { TimeStep } from 'planck';
import type { BodyInternals, ConstraintPoint } from '../planck-internals.js';
import { MANIFOLD_FACE_A } from '../planck-internals.js';
import { partInner, type Scene } from '../scene.js';
import type { State } from '../state.js';
import type { ContactManager } from './manager.js';
import type { PairAccount } from '../books.js';
import { addWork, type Pair } from './pair.js';
import { CORE } from './shapes.js';
import { frameOf } from './soft-point.js';
import { fillManifold, isClosedKey, NO_KEY, type Touch } from './touch.js';

/** Share of its bound at which friction has reached it: impulses of short steps are no more exact than this. */
const SATURATED = 1 - 1e-6;
const step = new TimeStep();

/** Rates of a contact point on both bodies, along the normal and the tangent, with the velocities now in planck. */
const rates = { nA: 0, nB: 0, tA: 0, tB: 0 };

/** Rigid contacts with Coulomb friction, on planck's contact constraints. */
export class RigidContacts {
  /** Touches whose closed points are in the present solve. */
  readonly live: Touch[] = [];
  private half = 0;
  /** The manager's version, and the time, that the live touches are ready for without a step; −1 while they are not. */
  private readyFor = -1;
  private readyAt = 0;

  constructor(
    private readonly scene: Scene,
    private readonly manager: ContactManager,
  ) {}

  /** The pair that the present solve is for. */
  private pairOf(touch: Touch): Pair {
    return this.manager.pairs[touch.solvedPair];
  }

  /** Readies the closed points at the mid-step configuration; `ratio` > 0 scales last step's impulses (warm start). */
  prepare(half: number, ratio: number, time: number): void {
    this.half = half;
    this.readyFor = -1;
    step.warmStarting = ratio > 0;
    step.dtRatio = ratio;
    this.live.length = 0;
    for (const touch of this.manager.touches) {
      if (touch.isSpare || !this.manager.isActive(touch)) continue;
      if (touch.curved) {
        this.manager.evaluate(touch);
        fillManifold(touch);
      }
      if (touch.pair < 0 || touch.contact.m_manifold.pointCount === 0) continue;
      if (this.manager.pairs[touch.pair].isSoft) continue;
      touch.solvedPair = touch.pair;
      touch.solvedSegment = touch.segment;
      this.live.push(touch);
      this.ready(touch, time);
    }
    if (ratio > 0) for (const { contact } of this.live) contact.warmStartConstraint(step);
  }

  /** Readies the closed points for impulses alone at the present configuration; what is ready is only cleared. */
  prepareShock(time: number): void {
    const { version } = this.manager;
    if (this.readyFor === version && this.readyAt === time) {
      for (const touch of this.live) this.clear(touch);
      return;
    }
    this.prepare(0, 0, time);
    this.readyFor = version;
    this.readyAt = time;
  }

  /** Takes a ready touch back to no impulse, no restitution and its present friction. */
  clear(touch: Touch): void {
    const { contact } = touch;
    contact.m_friction = this.frictionOf(touch);
    contact.v_friction = contact.m_friction;
    for (let j = 0; j < contact.v_pointCount; j += 1) {
      const point = contact.v_points[j as 0 | 1];
      point.normalImpulse = 0;
      point.tangentImpulse = 0;
      point.velocityBias = 0;
    }
  }

  private frictionOf(touch: Touch): number {
    const pair = this.pairOf(touch);
    return touch.sliding === 0 ? pair.staticFriction : pair.kineticFriction;
  }

  private ready(touch: Touch, time: number): void {
    const { contact } = touch;
    contact.m_friction = this.frictionOf(touch);
    contact.m_restitution = 0;
    contact.m_tangentSpeed = 0;
    contact.initConstraint(step);
    contact.initVelocityConstraint(step);
    contact.m_tangentSpeed = this.beltSpeed(touch, time);
    contact.v_tangentSpeed = contact.m_tangentSpeed;
  }

  /** Speed of a belt's surface along planck's tangent at the contact. */
  private beltSpeed(touch: Touch, time: number): number {
    if (touch.shapeA.kind === CORE) return 0;
    const link = touch.shapeA.chain.links[touch.foot.link];
    const speed = this.manager.surfaceSpeed(link.track, time);
    if (speed === 0) return 0;
    const { v_normal } = touch.contact;
    const { foot } = touch.foot;
    const isStraightFace = touch.type === MANIFOLD_FACE_A && touch.shapeB.vertices.length > 1;
    const [tx, ty] = isStraightFace ? lineTangent(touch) : [foot.tx, foot.ty];
    return speed * Math.sign(v_normal.y * tx - v_normal.x * ty);
  }

  solve(): void {
    this.solveThese(this.live);
  }

  solveThese(touches: readonly Touch[]): void {
    for (const { contact } of touches) contact.solveVelocityConstraint(step);
  }

  keepImpulses(): void {
    for (const { contact } of this.live) contact.storeConstraintImpulses(step);
  }

  /** Sums of the tangential and normal impulses of a touch. */
  private sums({ contact }: Touch): { normal: number; tangent: number } {
    let normal = 0;
    let tangent = 0;
    for (let j = 0; j < contact.v_pointCount; j += 1) {
      normal += contact.v_points[j as 0 | 1].normalImpulse;
      tangent += contact.v_points[j as 0 | 1].tangentImpulse;
    }
    return { normal, tangent };
  }

  private isSaturated(touch: Touch, coefficient: number): boolean {
    const { normal, tangent } = this.sums(touch);
    return normal > 0 && Math.abs(tangent) >= coefficient * normal * SATURATED;
  }

  /**
   * Lets sticking contacts go whose friction has reached its static limit.
   * @returns true when one did and its kinetic coefficient differs, so that the solve must be done again
   */
  breakAway(): boolean {
    let again = false;
    for (const touch of this.live) {
      const pair = this.pairOf(touch);
      if (touch.sliding !== 0 || !this.isSaturated(touch, pair.staticFriction)) continue;
      const { tangent } = this.sums(touch);
      if (tangent === 0) continue;
      touch.sliding = tangent > 0 ? -1 : 1;
      again ||= pair.kineticFriction !== pair.staticFriction;
    }
    return again;
  }

  /** Books the step at v̄, and notes what the recorder shows. */
  book(): void {
    for (const touch of this.live) this.bookTouch(touch);
  }

  private bookTouch(touch: Touch): void {
    const pair = this.pairOf(touch);
    const { contact, bodyA, bodyB } = touch;
    const saturated = this.isSaturated(touch, contact.m_friction);
    const force = this.half > 0 ? 1 / this.half : 0;
    touch.pressed[0] = touch.pressed[1] = NO_KEY;
    for (let j = 0; j < contact.v_pointCount; j += 1) {
      const point = contact.v_points[j as 0 | 1];
      if (point.normalImpulse > 0) touch.pressed[j as 0 | 1] = contact.m_manifold.points[j].id.key;
      this.rate(touch, point);
      const normal = 2 * point.normalImpulse;
      const tangent = 2 * point.tangentImpulse;
      this.bookClean(pair.accounts.reaction, pair, bodyA, bodyB, -normal * rates.nA, normal * rates.nB, 0);
      const slip = rates.tB - rates.tA - contact.m_tangentSpeed;
      const drag = tangent * contact.m_tangentSpeed;
      if (tangent !== 0) {
        if (saturated) {
          addWork(pair.accounts.friction, pair, bodyA, -tangent * rates.tA, tangent * rates.tB);
          pair.accounts.friction?.heat(-tangent * slip);
        } else
          this.bookClean(pair.accounts.friction, pair, bodyA, bodyB, -tangent * rates.tA, tangent * rates.tB, drag);
      }
      this.note(touch, pair, point, slip, force);
    }
  }

  /** Books a pair of works that should sum to `due`; what they miss it by is the solver's. */
  private bookClean(
    account: PairAccount | null,
    pair: Pair,
    bodyA: number,
    bodyB: number,
    onA: number,
    onB: number,
    due: number,
  ): void {
    const left = onA + onB - due;
    this.scene.numerical.share('solver-residual', bodyA, bodyB, left);
    const half = bodyA >= 0 && bodyB >= 0 ? left / 2 : left;
    addWork(account, pair, bodyA, bodyA >= 0 ? onA - half : onA, onB - half);
  }

  private note(touch: Touch, pair: Pair, point: ConstraintPoint, slip: number, force: number): void {
    const { reading } = pair;
    const { contact, bodyB } = touch;
    const { c } = partInner(this.scene, bodyB).c_position;
    const weight = point.normalImpulse;
    const before = reading.normal;
    const now = weight * force;
    const share = before + now > 0 ? now / (before + now) : reading.points === 0 ? 1 : 0.5;
    const x = c.x + point.rB.x;
    const y = c.y + point.rB.y;
    reading.x += share * (x - reading.x);
    reading.y += share * (y - reading.y);
    reading.normal = before + now;
    reading.friction += point.tangentImpulse * force;
    reading.slip = slip;
    const sign = pair.first === bodyB || (pair.first < 0 && bodyB < 0) ? 1 : -1;
    reading.nx = sign * contact.v_normal.x;
    reading.ny = sign * contact.v_normal.y;
    if (share >= 0.5) reading.segment = touch.solvedSegment;
    reading.points += 1;
  }

  /** Normal and tangential rates of both bodies at a point. */
  rate(touch: Touch, { rA, rB }: ConstraintPoint): typeof rates {
    const { v_normal: n } = touch.contact;
    const a = partInner(this.scene, touch.bodyA).c_velocity;
    const b = partInner(this.scene, touch.bodyB).c_velocity;
    const ax = a.v.x - a.w * rA.y;
    const ay = a.v.y + a.w * rA.x;
    const bx = b.v.x - b.w * rB.y;
    const by = b.v.y + b.w * rB.x;
    rates.nA = n.x * ax + n.y * ay;
    rates.nB = n.x * bx + n.y * by;
    rates.tA = n.y * ax - n.x * ay;
    rates.tB = n.y * bx - n.x * by;
    return rates;
  }

  /** Sliding rate of a live touch with the velocities now in planck, at its first point as the solve had it. */
  slip(touch: Touch): number {
    const { tA, tB } = this.rate(touch, touch.contact.v_points[0]);
    return tB - tA - touch.contact.m_tangentSpeed;
  }

  /**
   * Sliding rate of a touch where its bodies stand now, against the surface as it runs at `time`. At a step's ends a turning
   * body's point has another velocity than the one it had at mid-step.
   */
  slipNow(touch: Touch, time: number): number {
    const index = isClosedKey(touch, touch.candidates[0].key) ? 0 : 1;
    if (index >= touch.count) return this.slip(touch);
    const { nx, ny, x, y } = frameOf(touch, index);
    const along = ({ c_position: { c }, c_velocity: { v, w } }: BodyInternals): number =>
      ny * (v.x - w * (y - c.y)) - nx * (v.y + w * (x - c.x));
    const { m_fixtureA, m_fixtureB } = touch.contact;
    return along(m_fixtureB.m_body) - along(m_fixtureA.m_body) - this.beltSpeed(touch, time);
  }
}

function lineTangent(touch: Touch): [number, number] {
  if (touch.shapeA.kind === CORE) return [1, 0];
  const { start, end, length } = touch.shapeA.chain.links[0].run;
  return [(end[0] - start[0]) / length, (end[1] - start[1]) / length];
}

/** Velocities before an impulse-only solve. */
export type Velocities = Pick<State, 'vx' | 'vy' | 'w'>;
