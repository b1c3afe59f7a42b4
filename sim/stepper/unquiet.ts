import type { BodyInternals } from './planck-internals.js';
import { newState, type State } from './state.js';

/** Says how much the velocities of an iteration still change. */
export class Unquiet {
  private readonly last: State;

  constructor(count: number) {
    this.last = newState(count);
  }

  /** Greatest change of a velocity since last asked, relative to the greatest. */
  change(bodies: readonly BodyInternals[]): number {
    const { vx, vy, w } = this.last;
    let change = 0;
    let most = 1e-3;
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
}
