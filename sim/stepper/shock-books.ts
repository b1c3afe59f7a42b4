import { addWork } from './contact/pair.js';
import type { ContactManager } from './contact/manager.js';
import type { Touch } from './contact/touch.js';
import type { Friction } from './element.js';
import type { JointElement } from './kinds/joint.js';
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

  /** Books every impulse at the mean of the velocities before (kept) and after (in planck). */
  book(before: State, isImpact: boolean, held: readonly Friction[]): void {
    const { scene, last, solver } = this;
    getVelocities(scene, last.vx, last.vy, last.w);
    scene.bodies.forEach(({ c_velocity }, i) => {
      c_velocity.v.x = (c_velocity.v.x + before.vx[i]) / 2;
      c_velocity.v.y = (c_velocity.v.y + before.vy[i]) / 2;
      c_velocity.w = (c_velocity.w + before.w[i]) / 2;
    });
    for (const joint of solver.joints) if (!joint.isReleased) this.bookJoint(joint, isImpact);
    if (!isImpact) for (const friction of held) this.bookHeld(friction);
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
  }

  private bookHeld({ a, b, row }: Friction): void {
    this.scene.numerical.add('velocity-projection', a, -row.impulse * row.rateA());
    this.scene.numerical.add('velocity-projection', b, row.impulse * row.rateB());
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
}
