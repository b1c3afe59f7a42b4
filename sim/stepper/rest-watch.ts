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

/** What is kept of a state until it can be judged: two steps later, by how the velocities went on from it. */
interface Past {
  time: number;
  /** Row of it, where a body was slow enough then to need one. */
  row: number;
  vx: Float64Array;
  vy: Float64Array;
  w: Float64Array;
}

const LOOK_AHEAD = 2;

/**
 * Tells when bodies are at rest: velocity, and the acceleration over the two steps that follow, both nil on the scales of
 * the mechanism, and so for a few steps more. Over two steps, since what the midpoint rule leaves of a rate it only mirrors
 * from one to the next.
 */
export class RestWatch {
  private readonly since: (Resting | null)[];
  private readonly speed: number;
  private readonly acceleration: number;
  private readonly past: Past[] = [];

  constructor(
    private readonly scene: Scene,
    private readonly step: number,
  ) {
    const { mechanism, scale, ids } = scene;
    const scales = restScales(mechanism);
    this.since = ids.map(() => null);
    this.speed = scales.speed / scale.speed;
    this.acceleration = scales.acceleration / scale.acceleration;
  }

  /** Takes the state at a time [engine time]; `record` gives the row of it, which may turn out to be where rest began. */
  look(state: State, time: number, record: () => number): void {
    const mayRest = this.since.some((since, i) => since === null && this.slowness(state, i) <= AT_REST);
    const { past } = this;
    const { vx, vy, w } = state;
    past.push({ time, row: mayRest ? record() : -1, vx: vx.slice(), vy: vy.slice(), w: w.slice() });
    if (past.length <= LOOK_AHEAD) return;
    const then = past.shift();
    if (then) this.judge(then, state, time);
  }

  private slowness({ vx, vy, w }: Pick<State, 'vx' | 'vy' | 'w'>, i: number): number {
    return Math.hypot(vx[i], vy[i], w[i] * this.scene.reach[i]) / this.speed;
  }

  private judge(then: Past, now: State, time: number): void {
    for (let i = 0; i < this.since.length; i += 1) {
      const change = Math.hypot(
        now.vx[i] - then.vx[i],
        now.vy[i] - then.vy[i],
        (now.w[i] - then.w[i]) * this.scene.reach[i],
      );
      const unrest = this.slowness(then, i) + change / (time - then.time) / this.acceleration;
      if (!(unrest <= AT_REST)) this.since[i] = null;
      else if (then.row >= 0) this.since[i] ??= { time: then.time, row: then.row };
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
