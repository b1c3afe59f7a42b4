import type { Scene } from './scene.js';
import type { State } from './state.js';

/** Slower than this is at rest [engine speed], if it also stays so. */
const STILL = 1e-6;
/** Steps over which a body must keep still: one at a turning point does not. */
const STEPS = 4;

/** When, and at which row, something came to rest. */
export interface Resting {
  time: number;
  row: number;
}

/** Tells when bodies are at rest: velocity and acceleration nil over a few steps, counted from the first still one. */
export class RestWatch {
  private readonly since: (Resting | null)[];

  constructor(
    private readonly scene: Scene,
    private readonly step: number,
  ) {
    this.since = scene.ids.map(() => null);
  }

  /** Takes the state at a time [engine time]; `record` gives the row of it, which may turn out to be where rest began. */
  look(state: State, time: number, record: () => number): void {
    for (let i = 0; i < this.since.length; i += 1) {
      const speed = Math.hypot(state.vx[i], state.vy[i]) + Math.abs(state.w[i]) * this.scene.reach[i];
      if (speed > STILL) this.since[i] = null;
      else this.since[i] ??= { time, row: record() };
    }
  }

  /** Since when a body (or 'all') has been at rest, if it has been long enough to tell. */
  restingSince(of: string, time: number): Resting | null {
    const indices = of === 'all' ? this.scene.ids.map((_, i) => i) : [this.scene.ids.indexOf(of)];
    let last: Resting | null = null;
    for (const i of indices) {
      const since = this.since[i];
      if (since === null) return null;
      if (last === null || since.time > last.time) last = since;
    }
    return last !== null && time - last.time >= STEPS * this.step ? last : null;
  }
}
