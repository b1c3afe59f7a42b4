import { AT_REST, restScales } from '../recording/station-watch.js';
import type { Scene } from './scene.js';
import type { State } from './state.js';

/** Steps over which a body must keep still: one at a turning point does not. */
const STEPS = 4;

/** When, and at which row, something came to rest. */
export interface Resting {
  time: number;
  row: number;
}

/** Tells when bodies are at rest: velocity and acceleration nil over a few steps, counted from the first still one. */
export class RestWatch {
  /** Since when each body has been slow, and whether it has no acceleration either by now. */
  private readonly since: (Resting | null)[];
  private readonly isSteady: boolean[];
  private readonly speed: number;
  private readonly acceleration: number;
  /** Velocities one step ago and two steps ago, and when those were. */
  private before: Past;
  private earlier: Past;

  constructor(
    private readonly scene: Scene,
    private readonly step: number,
  ) {
    const { mechanism, scale, ids } = scene;
    const scales = restScales(mechanism);
    this.since = ids.map(() => null);
    this.isSteady = ids.map(() => false);
    this.speed = scales.speed / scale.speed;
    this.acceleration = scales.acceleration / scale.acceleration;
    this.before = newPast(ids.length);
    this.earlier = newPast(ids.length);
  }

  /**
   * Takes the state at a time [engine time]; `record` gives the row of it, which may turn out to be where rest began.
   * Acceleration is taken over two steps: what the midpoint rule leaves of a rate it only mirrors from step to step.
   */
  look(state: State, time: number, record: () => number): void {
    const { earlier, scene } = this;
    const elapsed = time - earlier.time;
    for (let i = 0; i < this.since.length; i += 1) {
      const reach = scene.reach[i];
      const speed = Math.hypot(state.vx[i], state.vy[i], state.w[i] * reach);
      const [dx, dy, dw] = [state.vx[i] - earlier.vx[i], state.vy[i] - earlier.vy[i], state.w[i] - earlier.w[i]];
      const acceleration = elapsed > 0 ? Math.hypot(dx, dy, dw * reach) / elapsed : Infinity;
      if (speed / this.speed > AT_REST) this.since[i] = null;
      else this.since[i] ??= { time, row: record() };
      this.isSteady[i] = speed / this.speed + acceleration / this.acceleration <= AT_REST;
    }
    [this.before, this.earlier] = [this.earlier, this.before];
    this.before.vx.set(state.vx);
    this.before.vy.set(state.vy);
    this.before.w.set(state.w);
    this.before.time = time;
  }

  /** Since when a body (or 'all') has been at rest, if it has been long enough to tell. */
  restingSince(of: string, time: number): Resting | null {
    const indices = of === 'all' ? this.scene.ids.map((_, i) => i) : [this.scene.ids.indexOf(of)];
    let last: Resting | null = null;
    for (const i of indices) {
      const since = this.since[i];
      if (since === null || !this.isSteady[i]) return null;
      if (last === null || since.time > last.time) last = since;
    }
    return last !== null && time - last.time >= STEPS * this.step ? last : null;
  }
}

interface Past {
  time: number;
  vx: Float64Array;
  vy: Float64Array;
  w: Float64Array;
}

const newPast = (count: number): Past => ({
  time: -Infinity,
  vx: new Float64Array(count),
  vy: new Float64Array(count),
  w: new Float64Array(count),
});
