import type { Assembly } from './assembly.js';
import { isPressedKey, type Touch } from './contact/touch.js';
import type { RunLog } from './run-log.js';

/** A contact that presses and has given way by this much was not solved [engine length]. */
const GIVES_WAY = 1e-3;

/** Tells of points that carried force all through the step and yet gave way: their forces were not found. */
export function noticeGivingWay({ scene, manager }: Assembly, live: readonly Touch[], log: RunLog): void {
  for (const touch of live) {
    for (let i = 0; i < touch.count; i += 1) {
      const { key, gap } = touch.candidates[i as 0 | 1];
      if (gap >= -GIVES_WAY || !isPressedKey(touch, key)) continue;
      const [first, second] = manager.pairs[touch.solvedPair].between;
      const depth = Number((-gap * scene.scale.length).toPrecision(2));
      const text = `The forces at the contacts were not found: "${first}" went ${depth} m into "${second}", which presses on it. Very unlike masses on each other do that; no figure from here on can be relied on.`;
      log.warn('not-converged', text, [first, second], 'error');
    }
  }
}
