import type { ContactManager } from './contact/manager.js';
import type { Pair } from './contact/pair.js';
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
    const { scene, solver } = this;
    setVelocities(scene, scene.state.vx, scene.state.vy, scene.state.w);
    solver.rigid.prepare(0, 0, scene.time);
    for (const touch of solver.rigid.live) touch.sliding = signOf(solver.rigid.slip(touch));
    for (const friction of solver.frictions()) {
      friction.aim();
      friction.sliding = signOf(friction.slip());
    }
    for (const pair of this.manager.pairs) pair.wasSliding = this.isSliding(pair);
  }

  /** What stopped sliding at a step's end sticks from now on, until its static limit is met. */
  stop(met: readonly Passage[]): void {
    for (const passage of met) if (passage.kind === 'slip') passage.source.sliding = 0;
  }

  /** Tells of pairs that began or ceased to slide in the last step. */
  notice(log: RunLog): void {
    for (const pair of this.manager.pairs) {
      if (pair.reading.points === 0 || pair.friction === null) continue;
      const slides = this.isSliding(pair);
      if (slides === pair.wasSliding) continue;
      pair.wasSliding = slides;
      log.pair(slides ? 'slips' : 'sticks', pair);
    }
  }

  private isSliding({ index }: Pair): boolean {
    const { rigid, soft } = this.solver;
    if (soft.live.some((point) => point.pair.index === index && point.sliding !== 0)) return true;
    return rigid.live.some((touch) => touch.pair === index && touch.sliding !== 0);
  }
}
