import type { NumericalCause } from '../../recording/recording.js';
import type { Scene } from '../scene.js';
import type { Strike } from '../strike.js';
import type { ContactManager } from './manager.js';
import { addWork, type Pair } from './pair.js';
import { SoftPoint, STANDS_STILL, type Belt } from './soft-point.js';
import { isClosedKey, wasClosedKey, type Touch } from './touch.js';

/** An approach slower than this is rounding, not a touch [engine speed]. */
const APPROACH = 1e-6;

/** Contacts with `stiffness`: forces of the overlap, so that no impact is needed and the energy stays booked. */
export class SoftContacts {
  /** Points that overlap at the present mid-step. */
  live: SoftPoint[] = [];
  readonly isEmpty: boolean;
  private readonly points = new Map<string, SoftPoint>();
  private half = 0;

  constructor(
    private readonly scene: Scene,
    private readonly manager: ContactManager,
  ) {
    this.isEmpty = !manager.pairs.some((pair) => pair.isSoft);
  }

  private *touches(): Generator<Touch> {
    for (const touch of this.manager.touches) {
      if (touch.armed && touch.pair >= 0 && this.manager.pairs[touch.pair].isSoft) yield touch;
    }
  }

  /** Points that overlap as drawn start compressed, with the energy that takes; the bodies' velocities are in planck. */
  begin(): void {
    for (const touch of this.touches()) {
      for (let i = 0; i < touch.count; i += 1) {
        const { gap } = touch.candidates[i];
        if (gap >= 0) continue;
        const point = this.ready(touch, i as 0 | 1);
        point.gapBefore = gap;
        point.isEngaged = !touch.isSpare;
        point.stored = point.isEngaged ? point.energyOf(gap) : 0;
      }
    }
    this.restore('position-projection');
  }

  prepare(half: number): void {
    this.half = half;
    this.live = [];
    for (const touch of this.touches()) {
      this.manager.evaluate(touch);
      if (touch.pair < 0) continue;
      const face: SoftPoint[] = [];
      for (let i = 0; i < touch.count; i += 1) {
        if (touch.candidates[i].gap < 0) face.push(this.ready(touch, i as 0 | 1));
      }
      // A spare one is only followed, so that it can take over where it is.
      if (touch.isSpare) continue;
      for (const point of face) point.face = face;
      this.live.push(...face);
    }
  }

  private ready(touch: Touch, index: 0 | 1): SoftPoint {
    const { key, gap } = touch.candidates[index];
    const name = `${touch.id}/${key}`;
    let point = this.points.get(name);
    const isNew = point === undefined;
    point ??= this.newPoint(touch, key);
    this.points.set(name, point);
    point.gap = gap;
    point.aimAt(index, this.beltOf(touch), this.scene.time + this.half);
    if (isNew) point.startSliding();
    return point;
  }

  private newPoint(touch: Touch, key: number): SoftPoint {
    const pair = this.manager.pairs[touch.pair];
    return new SoftPoint(this.scene, touch, key, pair);
  }

  private beltOf({ shapeA, foot }: Touch): Belt {
    if (shapeA.kind === 'core') return STANDS_STILL;
    const { track } = shapeA.chain.links[foot.link];
    return (time) => this.manager.surfaceSpeed(track, time);
  }

  solve(): void {
    for (const point of this.live) point.solve(this.half);
  }

  /** Normal impulse of a pair in the present solve. */
  normalImpulse(pair: Pair): number {
    let sum = 0;
    for (const point of this.live) if (point.pair === pair) sum += point.normal.impulse;
    return sum;
  }

  book(): void {
    for (const point of this.live) point.book(this.half);
  }

  /** At the step's end: stored energy, and what the springs' impulses missed of it. */
  arrive(): void {
    const pressing = new Set(this.live.filter((point) => point.normal.impulse > 0));
    for (const point of this.points.values()) {
      const engages = pressing.has(point);
      if (engages !== point.isEngaged) this.engage(point, engages);
    }
    this.restore('force-truncation');
  }

  project(): void {
    this.restore('position-projection');
  }

  /**
   * A contact that lets go while it still overlaps gives nothing back: what is left in its spring is lost to its damper
   * there and then. One that presses again before it was clear has it back.
   */
  private engage(point: SoftPoint, engages: boolean): void {
    const { pair, touch } = point;
    const gained = engages ? point.energyOf(point.gapBefore) : -point.stored;
    point.isEngaged = engages;
    // Without a damper it has let go too early by part of a step, which is the method's doing.
    if (gained === 0 || pair.damping === 0) return;
    point.stored += gained;
    share(touch, -gained, (onA, onB) => {
      addWork(pair.accounts.spring, pair, touch.bodyA, onA, onB);
      addWork(pair.accounts.damper, pair, touch.bodyA, -onA, -onB);
    });
    pair.accounts.damper?.heat(-gained);
  }

  private restore(cause: NumericalCause): void {
    const stored = new Map<Pair, number>();
    for (const point of this.points.values()) {
      const { touch, pair } = point;
      const gap = this.gapNow(point);
      point.gapBefore = gap;
      const now = point.isEngaged ? point.energyOf(gap) : 0;
      const missed = point.springWork + (now - point.stored);
      if (missed !== 0) {
        this.scene.numerical.share(cause, touch.bodyA, touch.bodyB, missed);
        share(touch, -missed, (onA, onB) => {
          addWork(pair.accounts.spring, pair, touch.bodyA, onA, onB);
        });
      }
      point.stored = now;
      point.springWork = 0;
      stored.set(pair, (stored.get(pair) ?? 0) + now);
    }
    for (const [pair, energy] of stored) if (pair.accounts.spring) pair.accounts.spring.booked.stored = energy;
  }

  private gapNow({ touch, key }: SoftPoint): number {
    for (let i = 0; i < touch.count; i += 1) if (touch.candidates[i].key === key) return touch.candidates[i].gap;
    return 0;
  }

  /** Touches that begin now, as the run's events have them: no impulse, so nothing else happens. */
  strikes(): Strike[] {
    const strikes = new Map<Pair, Strike>();
    for (const touch of this.touches()) {
      for (let i = 0; i < touch.count; i += 1) {
        const { key } = touch.candidates[i];
        if (touch.isSpare || !isClosedKey(touch, key) || wasClosedKey(touch, key)) continue;
        const point = this.newPoint(touch, key);
        point.aimAt(i as 0 | 1, STANDS_STILL, 0);
        const approach = -point.normal.rate();
        if (approach < APPROACH) continue;
        const known = strikes.get(point.pair);
        const rows = [...(known?.rows ?? []), point.normal];
        const approachSpeed = Math.max(approach, known?.approachSpeed ?? 0);
        strikes.set(point.pair, { pair: point.pair, x: point.x, y: point.y, approachSpeed, effectiveMass: 0, rows });
      }
    }
    return [...strikes.values()];
  }
}

/** Splits work that belongs to a pair between its bodies; the ground takes none. */
function share(touch: Touch, work: number, book: (onA: number, onB: number) => void): void {
  if (touch.bodyA < 0) book(0, work);
  else book(work / 2, work / 2);
}
