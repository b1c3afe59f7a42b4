import type { Scene } from './scene.js';
import type { State } from './state.js';

/** Slower than this is at rest [engine speed], if it also stays so. */
const STILL = 1e-6;
/** Steps over which a body must keep still: one at a turning point does not. */
const STEPS = 4;

/** Tells when bodies are at rest: velocity and acceleration nil over a few steps. */
export class RestWatch {
  private readonly since: Float64Array;

  constructor(
    private readonly scene: Scene,
    private readonly step: number,
  ) {
    this.since = new Float64Array(scene.ids.length).fill(Infinity);
  }

  /** Takes the state at a time; returns a test of a body's id, or 'all'. */
  look(state: State, time: number): (of: string) => boolean {
    const { since, scene } = this;
    for (let i = 0; i < since.length; i += 1) {
      const speed = Math.hypot(state.vx[i], state.vy[i]) + Math.abs(state.w[i]) * scene.reach[i];
      if (speed > STILL) since[i] = Infinity;
      else if (since[i] === Infinity) since[i] = time;
    }
    const rests = (i: number): boolean => time - since[i] >= STEPS * this.step;
    return (of) => (of === 'all' ? scene.ids.every((_, i) => rests(i)) : rests(scene.ids.indexOf(of)));
  }
}
