import { AxisRow } from '../axis-row.js';
import type { Friction } from '../element.js';
import { partInner, type Scene } from '../scene.js';
import { addWork, type Pair } from './pair.js';

/** Share of its bound at which friction has reached it: impulses of short steps are no more exact than this. */
const SATURATED = 1 - 1e-6;

/** Rolling resistance of a pair: a torque against the relative turn, at most lever arm × normal force. */
export class RollingResistance implements Friction {
  sliding: 1 | -1 | 0 = 0;
  readonly a: number;
  readonly b: number;
  readonly drops = false;
  readonly row: AxisRow;
  private most = 0;

  constructor(
    private readonly scene: Scene,
    readonly pair: Pair,
  ) {
    this.row = new AxisRow(partInner(scene, pair.low), partInner(scene, pair.high));
    this.a = pair.low;
    this.b = pair.high;
    this.row.turn();
  }

  prepare(ratio: number): void {
    this.row.turn();
    this.row.start(this.row.impulse * ratio);
  }

  solve(normalImpulse: number): void {
    this.most = this.pair.rollingResistance * normalImpulse;
    this.row.solve(0, -this.most, this.most);
  }

  /** Books the step at v̄; nothing turned against anything while the pair was apart. */
  book(): void {
    const { row, pair, scene } = this;
    const impulse = 2 * row.impulse;
    if (impulse === 0) return;
    const onA = -impulse * row.rateA();
    const onB = impulse * row.rateB();
    if (Math.abs(row.impulse) >= this.most * SATURATED) {
      addWork(pair.accounts.rolling, pair, pair.low, onA, onB);
      pair.accounts.rolling?.heat(-(onA + onB));
      return;
    }
    const left = onA + onB;
    scene.numerical.share('solver-residual', pair.low, pair.high, left);
    const half = pair.low >= 0 && pair.high >= 0 ? left / 2 : left;
    addWork(pair.accounts.rolling, pair, pair.low, pair.low >= 0 ? onA - half : onA, onB - half);
  }

  isHolding(): boolean {
    return this.sliding === 0 && Math.abs(this.row.impulse) < this.most * SATURATED;
  }

  breakaway(): 1 | -1 | 0 {
    if (this.most === 0 || Math.abs(this.row.impulse) < this.most * SATURATED) return 0;
    return this.row.impulse > 0 ? -1 : 1;
  }

  slip(): number {
    return this.row.rate();
  }

  aim(): void {
    this.row.turn();
    this.row.impulse = 0;
  }

  hold(): void {
    this.row.solve(0, -Infinity, Infinity);
  }
}
