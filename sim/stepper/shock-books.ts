import { addWork } from './contact/pair.js';
import type { ContactManager } from './contact/manager.js';
import type { Touch } from './contact/touch.js';
import type { AxisRow } from './axis-row.js';
import { getVelocities, setVelocities, type Scene } from './scene.js';
import type { VelocitySolver } from './solver.js';
import { newState, type State } from './state.js';

/**
 * Books an impulse-only solve: the work of an impulse J is exactly J·(v⁻ + v⁺)/2 at its point. Of an impact it belongs to
 * the pair or the stop that was struck; of a correction it is the method's own.
 */
export class ShockBooks {
  private readonly last: State;

  constructor(
    private readonly scene: Scene,
    private readonly manager: ContactManager,
    private readonly solver: VelocitySolver,
  ) {
    this.last = newState(scene.ids.length);
  }

  /** An impact; the velocities after it are in planck's bodies. */
  impact(before: State): void {
    this.atMean(before, () => {
      for (const joint of this.solver.joints) {
        if (joint.isReleased) continue;
        joint.bookShock('solver-residual');
        for (const stop of joint.stops) {
          const { row } = stop;
          if (stop.isClosed && row.impulse !== 0)
            stop.bookImpact(-row.impulse * row.rateA(), row.impulse * row.rateB());
        }
      }
      for (const touch of this.solver.rigid.live) this.bookTouch(touch);
    });
  }

  /** A correction: joints, closed stops and the rows it held. */
  correction(before: State, held: readonly { a: number; b: number; row: AxisRow }[]): void {
    this.atMean(before, () => {
      for (const joint of this.solver.joints) {
        if (joint.isReleased) continue;
        joint.bookShock('velocity-projection');
        for (const stop of joint.stops) if (stop.isClosed) this.bookRow(stop);
      }
      for (const row of held) this.bookRow(row);
    });
  }

  /** Runs `book` with the mean of the velocities before and after in planck's bodies. */
  private atMean(before: State, book: () => void): void {
    const { scene, last } = this;
    getVelocities(scene, last.vx, last.vy, last.w);
    scene.bodies.forEach(({ c_velocity }, i) => {
      c_velocity.v.x = (c_velocity.v.x + before.vx[i]) / 2;
      c_velocity.v.y = (c_velocity.v.y + before.vy[i]) / 2;
      c_velocity.w = (c_velocity.w + before.w[i]) / 2;
    });
    book();
    setVelocities(scene, last.vx, last.vy, last.w);
  }

  private bookRow({ a, b, row }: { a: number; b: number; row: AxisRow }): void {
    if (row.impulse === 0) return;
    this.scene.numerical.add('velocity-projection', a, -row.impulse * row.rateA());
    this.scene.numerical.add('velocity-projection', b, row.impulse * row.rateB());
  }

  private bookTouch(touch: Touch): void {
    const pair = this.manager.pairs[touch.solvedPair];
    const { contact, bodyA, bodyB } = touch;
    for (let j = 0; j < contact.v_pointCount; j += 1) {
      const point = contact.v_points[j];
      const { normalImpulse: n, tangentImpulse: t } = point;
      if (n === 0 && t === 0) continue;
      const { nA, nB, tA, tB } = this.solver.rigid.rate(touch, point);
      const onA = -(n * nA + t * tA);
      const onB = n * nB + t * tB;
      addWork(pair.accounts.impact, pair, bodyA, onA, onB);
      // What a belt puts in through its surface is no loss of the impact.
      pair.accounts.impact.heat(-(onA + onB) + t * contact.m_tangentSpeed);
      const { c } = this.scene.bodies[bodyB].c_position;
      pair.reading.x = c.x + point.rB.x;
      pair.reading.y = c.y + point.rB.y;
      pair.reading.segment = touch.solvedSegment;
    }
  }
}
