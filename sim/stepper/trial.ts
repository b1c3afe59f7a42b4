import type { StationWatch } from '../recording/station-watch.js';
import { SKIN, type ContactManager } from './contact/manager.js';
import type { Touch } from './contact/touch.js';
import type { Friction, Stop } from './element.js';
import { getVelocities, poseBetween, poseBodies, setVelocities, startSweep, type Scene } from './scene.js';
import type { SceneMotion } from './motion.js';
import type { VelocitySolver } from './solver.js';
import { newState, type State } from './state.js';

/** Sliding slower than this has stopped [engine speed]. */
export const STILL = 1e-9;
/** A warm start from a step this much shorter would only carry its rounding. */
const WARM_LEAST = 1e-3;

/** Something whose value turns negative within a step; values are in units of their own tolerance. */
export type Passage =
  | { kind: 'gap'; source: Touch; value: number }
  | { kind: 'seam'; source: Touch; value: number }
  | { kind: 'slip'; source: Touch | Friction; value: number }
  | { kind: 'stop'; source: Stop; value: number }
  | { kind: 'station'; source: number; value: number };

/** One trial step: the midpoint rule from the present state over a given time, with nothing booked. */
export class Trial {
  readonly mean: State;
  readonly middle: State;
  readonly next: State;
  private readonly modes = new Map<Friction, 1 | -1 | 0>();
  private readonly startSlip = new Map<Touch | Friction, number>();
  private lastHalf = 0;
  /** The state that the trial started from. */
  private from: State;
  count = 0;

  constructor(
    private readonly scene: Scene,
    private readonly manager: ContactManager,
    private readonly solver: VelocitySolver,
    private readonly watch: StationWatch,
    private readonly motion: SceneMotion,
  ) {
    const n = scene.ids.length;
    this.mean = newState(n);
    this.middle = newState(n);
    this.next = newState(n);
    this.from = scene.state;
  }

  /** Remembers which contacts stick and slide, so that every trial starts from the same. */
  begin(): void {
    const { scene, manager, solver } = this;
    setVelocities(scene, scene.state.vx, scene.state.vy, scene.state.w);
    for (const touch of manager.touches) {
      touch.slidingAtStart = touch.sliding;
      const slides = touch.sliding !== 0 && manager.isActive(touch);
      touch.slipAtStart = slides ? solver.rigid.slipNow(touch, scene.time) : 0;
    }
    this.modes.clear();
    for (const friction of solver.frictions()) this.modes.set(friction, friction.sliding);
  }

  private restoreModes(): void {
    for (const touch of this.manager.touches) touch.sliding = touch.slidingAtStart;
    for (const [friction, sliding] of this.modes) friction.sliding = sliding;
  }

  /** Tries a step of `tau` from `state`: afterwards planck holds the end configuration, and contacts are evaluated there. */
  run(state: State, tau: number): void {
    const { scene, mean, middle, next } = this;
    const half = tau / 2;
    this.count += 1;
    this.from = state;
    this.restoreModes();
    for (let i = 0; i < scene.ids.length; i += 1) {
      middle.x[i] = state.x[i] + half * state.vx[i];
      middle.y[i] = state.y[i] + half * state.vy[i];
      middle.a[i] = state.a[i] + half * state.w[i];
    }
    poseBodies(scene, middle.x, middle.y, middle.a);
    const ratio = this.lastHalf > 0 && this.lastHalf > WARM_LEAST * half ? half / this.lastHalf : 0;
    this.solver.solveStep(state, half, ratio);
    this.lastHalf = half;
    getVelocities(scene, mean.vx, mean.vy, mean.w);
    this.noteSlips(state);
    for (let i = 0; i < scene.ids.length; i += 1) {
      next.x[i] = state.x[i] + tau * mean.vx[i];
      next.y[i] = state.y[i] + tau * mean.vy[i];
      next.a[i] = state.a[i] + tau * mean.w[i];
      next.vx[i] = 2 * mean.vx[i] - state.vx[i];
      next.vy[i] = 2 * mean.vy[i] - state.vy[i];
      next.w[i] = 2 * mean.w[i] - state.w[i];
    }
    startSweep(scene, state);
    poseBodies(scene, next.x, next.y, next.a);
    this.manager.setTravel(mean, tau);
    this.manager.refresh();
    setVelocities(scene, next.vx, next.vy, next.w);
    this.motion.state = next;
  }

  /** Sliding rates at the step's start; what has only just broken away had none. */
  private noteSlips(state: State): void {
    this.startSlip.clear();
    for (const touch of this.solver.rigid.live) {
      if (touch.sliding !== 0) this.startSlip.set(touch, (touch.sliding * touch.slipAtStart) / STILL);
    }
    const frictions = this.solver.frictions();
    if (frictions.length === 0) return;
    setVelocities(this.scene, state.vx, state.vy, state.w);
    for (const friction of frictions) {
      if (friction.sliding !== 0)
        this.startSlip.set(friction, (friction.sliding * friction.slip(this.scene.time)) / STILL);
    }
  }

  /**
   * Everything that is past its zero at the trial's end by more than its tolerance; `contacts`: what contacts and stops do
   * too, not stations alone.
   */
  passed(contacts: boolean): Passage[] {
    const found: Passage[] = contacts ? [...this.passedTouches(), ...this.passedSlips()] : [];
    for (const source of this.watch.smooth()) {
      const value = this.stationValue(source);
      if (value < -1) found.push({ kind: 'station', source, value });
    }
    return found;
  }

  /** What slides the other way at the trial's end than at its start. */
  passedSlips(): Passage[] {
    const found: Passage[] = [];
    for (const source of this.startSlip.keys()) {
      const value = this.slipValue(source);
      if (value < -1) found.push({ kind: 'slip', source, value });
    }
    return found;
  }

  private passedTouches(): Passage[] {
    const found: Passage[] = [];
    for (const source of this.manager.touches) {
      const value = this.gapValue(source);
      if (value < -1) found.push({ kind: 'gap', source, value });
      const beyond = seamValue(this.manager.seamNow(source));
      if (beyond < -1) found.push({ kind: 'seam', source, value: beyond });
    }
    for (const joint of this.solver.joints) {
      for (const source of joint.stops) {
        const value = stopValue(source, source.gap());
        if (value < -1) found.push({ kind: 'stop', source, value });
      }
    }
    return found;
  }

  /** Value of a passage at the trial's end. */
  valueOf(passage: Passage): number {
    if (passage.kind === 'gap') return this.gapValue(passage.source);
    if (passage.kind === 'seam') return seamValue(this.manager.seamNow(passage.source));
    if (passage.kind === 'slip') return this.slipValue(passage.source);
    if (passage.kind === 'stop') return stopValue(passage.source, passage.source.gap());
    return this.stationValue(passage.source);
  }

  /** Value of a passage at the step's start. */
  startValueOf(passage: Passage, state: State): number {
    if (passage.kind === 'gap') return (passage.source.openGap - SKIN / 4) / (SKIN / 4);
    if (passage.kind === 'seam') return seamValue(passage.source.startSeam);
    if (passage.kind === 'slip') return this.startSlip.get(passage.source) ?? Infinity;
    if (passage.kind === 'stop') return stopValue(passage.source, passage.source.gapAtStart);
    this.motion.state = state;
    const value = this.stationValue(passage.source);
    this.motion.state = this.next;
    return value;
  }

  private gapValue(touch: Touch): number {
    const gap = this.manager.openGapNow(touch);
    const least = gap < 0 ? gap : this.gapOnTheWay(touch, gap);
    return (least - SKIN / 4) / (SKIN / 4);
  }

  /** The first negative gap between the trial's ends, or the gap at its end. */
  private gapOnTheWay(touch: Touch, atEnd: number): number {
    const { scene, manager, from, next } = this;
    const looks = manager.looksBetween(touch);
    if (looks === 0) return atEnd;
    let found = atEnd;
    for (let i = 1; i <= looks && found >= 0; i += 1) {
      for (const body of [touch.bodyA, touch.bodyB]) poseBetween(scene, body, from, next, i / (looks + 1));
      manager.evaluate(touch);
      const gap = manager.openGapNow(touch);
      if (gap < 0) found = gap;
    }
    for (const body of [touch.bodyA, touch.bodyB]) poseBetween(scene, body, from, next, 1);
    manager.evaluate(touch);
    return found;
  }

  private slipValue(source: Touch | Friction): number {
    const start = this.startSlip.get(source) ?? 0;
    // One that has only just broken away starts from rest and has nothing to stop.
    if (start <= 1) return Infinity;
    const end = this.scene.time + 2 * this.lastHalf;
    const slip = 'contact' in source ? this.solver.rigid.slipNow(source, end) : source.slip(end);
    return (source.sliding * slip) / STILL;
  }

  private stationValue(index: number): number {
    return this.watch.signedValue(index, this.motion) / this.watch.blurOf(index);
  }
}

const stopValue = (stop: Stop, gap: number): number => (stop.isClosed ? Infinity : (gap - SKIN / 4) / (SKIN / 4));

/** Met a little beyond the seam, so that the next step starts on the other stretch. */
const seamValue = (distance: number): number => (distance + SKIN / 2) / (SKIN / 4);
