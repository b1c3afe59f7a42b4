import { AxisRow } from '../axis-row.js';
import { PairAccount } from '../books.js';
import type { Friction } from '../element.js';
import { partInner, type Scene } from '../scene.js';
import type { JointElement, JointImpulse } from './joint.js';

/** Greatest friction impulse in half a step, by its length and the joint's own reaction impulse. */
export type FrictionBound = (half: number, reaction: number) => number;

/** Share of its bound at which friction has reached it: impulses of short steps are no more exact than this. */
const SATURATED = 1 - 1e-6;
const reaction: JointImpulse = { px: 0, py: 0, momentA: 0, momentB: 0 };

/** Coulomb friction of a pin (on its turn) or a slide (on its travel), bounded by a constant or by the reaction. */
export class JointFriction implements Friction {
  sliding: 1 | -1 | 0 = 0;
  readonly row: AxisRow;
  readonly a: number;
  readonly b: number;
  readonly drops = false;
  private readonly account: PairAccount;
  private half = 0;

  constructor(
    private readonly scene: Scene,
    private readonly joint: JointElement,
    private readonly bound: FrictionBound,
  ) {
    this.row = new AxisRow(partInner(scene, joint.a), partInner(scene, joint.b));
    this.a = joint.a;
    this.b = joint.b;
    const bodies = PairAccount.bodies(scene.ids, joint.a, joint.b);
    const booked = scene.books.open('joint-friction', joint.id, bodies, { heat: true });
    this.account = new PairAccount(booked, joint.a, joint.b);
  }

  prepare(half: number, ratio: number): void {
    this.half = half;
    this.joint.aimFreedom(this.row);
    this.row.start(this.row.impulse * ratio);
  }

  private most(): number {
    this.joint.reader.impulse(reaction);
    return this.bound(this.half, Math.hypot(reaction.px, reaction.py));
  }

  solve(): void {
    const most = this.most();
    this.row.solve(0, -most, most);
  }

  book(): void {
    const { row, scene, joint } = this;
    const impulse = 2 * row.impulse;
    const onA = -impulse * row.rateA();
    const onB = impulse * row.rateB();
    const most = this.most();
    const slides = Math.abs(row.impulse) >= most * SATURATED;
    if (slides) {
      this.account.add(onA, onB);
      this.account.heat(-(onA + onB));
      return;
    }
    const left = onA + onB;
    scene.numerical.share('solver-residual', joint.a, joint.b, left);
    const half = joint.a >= 0 && joint.b >= 0 ? left / 2 : left;
    this.account.add(onA - half, onB - half);
  }

  isHolding(): boolean {
    return this.sliding === 0 && !this.joint.isReleased && Math.abs(this.row.impulse) < this.most() * SATURATED;
  }

  breakaway(): 1 | -1 | 0 {
    const most = this.most();
    if (most === 0 || Math.abs(this.row.impulse) < most * SATURATED) return 0;
    return this.row.impulse > 0 ? -1 : 1;
  }

  slip(): number {
    return this.row.rate();
  }

  aim(): void {
    this.joint.aimFreedom(this.row);
    this.row.impulse = 0;
  }

  hold(): void {
    this.row.solve(0, -Infinity, Infinity);
  }
}
