import type { Assembly } from './assembly.js';
import type { RunLog } from './run-log.js';

/** Tells of springs whose ends passed each other within a step: there the force jumps, which no step follows exactly. */
export function noticeTurnedSprings({ springs }: Assembly, log: RunLog): void {
  for (const { id, hasTurnedRound } of springs) {
    if (!hasTurnedRound) continue;
    const text = `Spring "${id}" was pulled through no length, where its force turns round within one step; what that makes or loses is booked as numerical, and is less with a smaller step.`;
    log.warn('spring-through-zero', text, [id]);
  }
}
