import { TimeStep } from 'planck';
import type { JointLimits, Pin, Slide, Weld } from '../../mechanism/kinds/joint.js';
import type { AxisRow } from '../axis-row.js';
import { PairAccount } from '../books.js';
import type { Element, Stop } from '../element.js';
import type { JointInternals } from '../planck-internals.js';
import { anchorAt, anchorOf, partIndex, partInner, type Anchor, type Scene } from '../scene.js';
import { JointFriction, type FrictionBound } from './joint-friction.js';
import { LimitStop } from './limit.js';
import { turnOf } from './spring.js';

/** Impulse of a joint on its second planck part (B, the document's first), with its moment about each mass centre. */
export interface JointImpulse {
  px: number;
  py: number;
  momentA: number;
  momentB: number;
}

/** How to read a kind of joint out of planck. */
export interface JointReader {
  joint: JointInternals;
  /** Impulse of the last solve (half a step's). */
  impulse(out: JointImpulse): void;
  /** Keeps, and puts back, the impulses that warm-start the next step. */
  save(): void;
  restore(): void;
  /** Greatest rate of the constraint with the velocities now in planck's bodies. */
  violation(): number;
  destroy(): void;
}

type SimulatedJoint = Pin | Slide | Weld;

const step = new TimeStep();
const impulse: JointImpulse = { px: 0, py: 0, momentA: 0, momentB: 0 };

/**
 * A joint held by planck's own constraint, solved at mid-step: there it does no work, so that a pin does not bleed the
 * energy that a linearly implicit step takes. What the iteration leaves is booked as solver-residual.
 */
export class JointElement implements Element {
  readonly id: string;
  readonly kind: SimulatedJoint['kind'];
  /** planck's A is the document's second part, B the first. */
  readonly a: number;
  readonly b: number;
  isReleased = false;
  readonly stops: readonly Stop[];
  readonly frictionRow?: JointFriction;
  private readonly account: PairAccount;
  private readonly anchorA: Anchor;
  private readonly anchorB: Anchor;
  private readonly axis: { x: number; y: number };
  private readonly pointA = { x: 0, y: 0 };
  private readonly pointB = { x: 0, y: 0 };
  private half = 0;
  private readonly reaction: JointImpulse = { px: 0, py: 0, momentA: 0, momentB: 0 };

  constructor(
    private readonly scene: Scene,
    joint: SimulatedJoint,
    readonly reader: JointReader,
  ) {
    this.id = joint.id;
    this.kind = joint.kind;
    this.a = partIndex(scene, joint.between[1]);
    this.b = partIndex(scene, joint.between[0]);
    const bodies = PairAccount.bodies(scene.ids, this.a, this.b);
    this.account = new PairAccount(scene.books.open('reaction', joint.id, bodies), this.a, this.b);
    const at = joint.kind === 'weld' ? middleOf(scene, this.a, this.b) : joint.at;
    this.anchorA = anchorOf(scene, { of: joint.between[1], at });
    this.anchorB = anchorOf(scene, { of: joint.between[0], at });
    this.axis = joint.kind === 'slide' ? localAxis(scene, this.a, joint.axis) : { x: 1, y: 0 };
    if (joint.kind !== 'weld' && joint.friction) {
      this.frictionRow = new JointFriction(scene, this, boundOf(scene, joint));
    }
    this.stops = joint.kind !== 'weld' && joint.limits ? this.limitStops(joint.limits) : [];
  }

  private limitStops(limits: JointLimits): Stop[] {
    const unit = this.kind === 'slide' ? this.scene.scale.length : 1;
    const bodies = PairAccount.bodies(this.scene.ids, this.a, this.b);
    const booked = this.scene.books.open('impact', this.id, bodies, { heat: true });
    const account = new PairAccount(booked, this.a, this.b);
    return [
      new LimitStop(this.scene, this, 1, limits.from / unit, limits.restitution, account),
      new LimitStop(this.scene, this, -1, limits.to / unit, limits.restitution, account),
    ];
  }

  prepare(half: number, ratio: number): void {
    this.half = half;
    if (this.isReleased) return;
    step.warmStarting = ratio > 0;
    step.dtRatio = ratio;
    this.reader.joint.initVelocityConstraints(step);
    this.frictionRow?.prepare(half, ratio);
  }

  solve(): void {
    if (this.isReleased) return;
    this.reader.joint.solveVelocityConstraints(step);
    this.frictionRow?.solve();
  }

  book(): void {
    if (this.isReleased) return;
    this.reader.impulse(this.reaction);
    this.bookImpulse(this.reaction, 2, 'solver-residual');
    this.frictionRow?.book();
    for (const stop of this.stops) stop.bookStep();
  }

  /** Books `times` the present impulse at the velocities now in planck's bodies. */
  private bookImpulse(
    { px, py, momentA, momentB }: JointImpulse,
    times: number,
    cause: 'solver-residual' | 'velocity-projection',
  ): void {
    const velocityA = partInner(this.scene, this.a).c_velocity;
    const velocityB = partInner(this.scene, this.b).c_velocity;
    const onA = -times * (px * velocityA.v.x + py * velocityA.v.y + momentA * velocityA.w);
    const onB = times * (px * velocityB.v.x + py * velocityB.v.y + momentB * velocityB.w);
    this.bookWork(onA, onB, cause);
  }

  /** Books the work of a constraint: what the two sides do not share is the method's, not the joint's. */
  bookWork(onA: number, onB: number, cause: 'solver-residual' | 'velocity-projection'): void {
    const left = onA + onB;
    this.scene.numerical.share(cause, this.a, this.b, left);
    const half = this.a >= 0 && this.b >= 0 ? left / 2 : left;
    this.account.add(onA - half, onB - half);
  }

  /** Books an impulse-only solve; the mean of the velocities before and after is in planck's bodies. */
  bookShock(cause: 'solver-residual' | 'velocity-projection'): void {
    this.reader.impulse(impulse);
    this.bookImpulse(impulse, 1, cause);
  }

  /** Aims a row at the joint's free motion at the present configuration: its turn, or its travel. */
  aimFreedom(row: AxisRow, sign = 1): void {
    if (this.kind !== 'slide') {
      row.turn();
      if (sign < 0) {
        row.leverA = -1;
        row.leverB = -1;
      }
      return;
    }
    const { x, y } = this.axisNow();
    anchorAt(this.scene, this.anchorB, this.pointB);
    row.aim(sign * x, sign * y, this.pointB.x, this.pointB.y);
  }

  private axisNow(): { x: number; y: number } {
    const { s, c } = partInner(this.scene, this.a).m_xf.q;
    return { x: c * this.axis.x - s * this.axis.y, y: s * this.axis.x + c * this.axis.y };
  }

  /** Turn [rad] or travel [engine length] of the first part relative to the second, from drawn. */
  position(): number {
    if (this.kind !== 'slide') return turnOf(this.scene, this.b) - turnOf(this.scene, this.a);
    const { x, y } = this.axisNow();
    anchorAt(this.scene, this.anchorA, this.pointA);
    anchorAt(this.scene, this.anchorB, this.pointB);
    return x * (this.pointB.x - this.pointA.x) + y * (this.pointB.y - this.pointA.y);
  }

  /** Size of the reaction in the last step [engine force]. */
  reactionForce(): number {
    return this.half > 0 ? Math.hypot(this.reaction.px, this.reaction.py) / this.half : 0;
  }

  reading(): { fx: number; fy: number; torque: number; x: number; y: number; position: number } {
    const { force, energy, length } = this.scene.scale;
    anchorAt(this.scene, this.anchorB, this.pointB);
    const { px, py, momentB } = this.reaction;
    const inner = partInner(this.scene, this.b).c_position.c;
    const free = this.isReleased || this.half === 0 ? 0 : 1 / this.half;
    const lever = (this.pointB.x - inner.x) * py - (this.pointB.y - inner.y) * px;
    return {
      fx: px * free * force,
      fy: py * free * force,
      torque: (momentB - lever) * free * energy,
      x: this.pointB.x * length,
      y: this.pointB.y * length,
      position: this.position() * (this.kind === 'slide' ? length : 1),
    };
  }

  release(): void {
    if (this.isReleased) return;
    this.isReleased = true;
    this.reader.destroy();
  }
}

function localAxis(scene: Scene, part: number, [x, y]: readonly [number, number]): { x: number; y: number } {
  const angle = part < 0 ? 0 : scene.start.a[part];
  const [c, s] = [Math.cos(angle), Math.sin(angle)];
  return { x: c * x + s * y, y: -s * x + c * y };
}

function middleOf(scene: Scene, a: number, b: number): [number, number] {
  const { length } = scene.scale;
  const body = b >= 0 ? b : a;
  return [scene.start.x[body] * length, scene.start.y[body] * length];
}

function boundOf({ scale }: Scene, joint: Pin | Slide): FrictionBound {
  const { friction } = joint;
  if (!friction) return () => 0;
  if (friction.kind === 'torque') return (half) => (friction.torque / scale.energy) * half;
  if (friction.kind === 'force') return (half) => (friction.force / scale.force) * half;
  const lever = friction.coefficient * ('radius' in friction ? friction.radius / scale.length : 1);
  return (_half, reaction) => lever * reaction;
}
