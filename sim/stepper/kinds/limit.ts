import { AxisRow } from '../axis-row.js';
import type { PairAccount } from '../books.js';
import type { Stop } from '../element.js';
import { partInner, type Scene } from '../scene.js';
import type { JointElement } from './joint.js';

/** One hard stop of a pin's turn or a slide's travel. `sign` +1 stops it from falling below `at`, −1 from rising above. */
export class LimitStop implements Stop {
  isClosed = false;
  gapAtStart = Infinity;
  readonly row: AxisRow;
  readonly joint: string;
  readonly a: number;
  readonly b: number;

  constructor(
    private readonly scene: Scene,
    private readonly element: JointElement,
    private readonly sign: 1 | -1,
    private readonly at: number,
    readonly restitution: number,
    private readonly account: PairAccount,
  ) {
    this.a = element.a;
    this.b = element.b;
    this.joint = element.id;
    this.row = new AxisRow(partInner(scene, element.a), partInner(scene, element.b));
  }

  gap(): number {
    if (this.element.isReleased) return Infinity;
    return this.sign * (this.element.position() - this.at);
  }

  aim(): void {
    this.element.aimFreedom(this.row, this.sign);
  }

  bookImpact(onA: number, onB: number): void {
    this.account.add(onA, onB);
    this.account.heat(-(onA + onB));
  }

  bookStep(): void {
    if (!this.isClosed || this.row.impulse === 0) return;
    const impulse = 2 * this.row.impulse;
    const onA = -impulse * this.row.rateA();
    const onB = impulse * this.row.rateB();
    this.element.bookWork(onA, onB, 'solver-residual');
  }
}
