import type { ContactManager } from './contact/manager.js';
import type { Touch } from './contact/touch.js';
import type { RunLog } from './run-log.js';
import { setVelocities, type Scene } from './scene.js';
import type { VelocitySolver } from './solver.js';
import { STILL, type Passage } from './trial.js';

const signOf = (slip: number): 1 | -1 | 0 => (Math.abs(slip) <= 10 * STILL ? 0 : slip > 0 ? 1 : -1);

/** Keeps which contacts, joints and rolling pairs stick and which slide between steps, and tells when that changes. */
export class SlidingModes {
  constructor(
    private readonly scene: Scene,
    private readonly manager: ContactManager,
    private readonly solver: VelocitySolver,
  ) {}

  /** Starts everything again by the rates it has: at the start, and after an impact. */
  renew(): void {
    for (const touch of this.ready()) touch.sliding = signOf(this.solver.rigid.slip(touch));
    for (const friction of this.solver.frictions()) {
      friction.aim();
      friction.sliding = signOf(friction.slip(this.scene.time));
    }
  }

  /** Contacts that have just closed, or come onto another pair's stretch, start by the rates they have. */
  renewFresh(): void {
    if (!this.manager.touches.some(({ isFresh }) => isFresh)) return;
    for (const touch of this.ready()) if (touch.isFresh) touch.sliding = signOf(this.solver.rigid.slip(touch));
  }

  private ready(): readonly Touch[] {
    const { scene, solver } = this;
    setVelocities(scene, scene.state.vx, scene.state.vy, scene.state.w);
    solver.rigid.prepareShock(scene.time);
    return solver.rigid.live;
  }

  /** What stopped sliding at a step's end sticks from now on, until its static limit is met. */
  stop(met: readonly Passage[]): void {
    for (const passage of met) if (passage.kind === 'slip') passage.source.sliding = 0;
  }

  /** Tells of pairs in lasting contact that began or ceased to slide. */
  notice(log: RunLog): void {
    const { rigid, soft } = this.solver;
    const sliding = new Set<number>();
    for (const touch of rigid.live) if (touch.sliding !== 0) sliding.add(touch.solvedPair);
    for (const point of soft.live) if (point.sliding !== 0) sliding.add(point.pair.index);
    for (const pair of this.manager.met) {
      if (!pair.rubs) continue;
      const slides = sliding.has(pair.index);
      if (slides === pair.wasSliding) continue;
      pair.wasSliding = slides;
      if (pair.isLasting) log.pair(slides ? 'slips' : 'sticks', pair);
    }
  }
}
