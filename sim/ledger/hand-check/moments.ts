import type { Moment } from '../../mechanism/kinds/load.js';
import type { Leg } from './happenings.js';
import { refuse } from './refusal.js';
import type { Scene } from './scene.js';

/** Whether a load or drive acts during a leg; one that begins or ends within it is no hand sum. */
export function isActive(
  scene: Scene,
  { id, from, until }: { id: string; from?: Moment; until?: Moment },
  leg: Leg,
): boolean {
  const start = from ? timeOf(scene, from) : -Infinity;
  const end = until ? timeOf(scene, until) : Infinity;
  const slack = 1e-9 * Math.max(leg.to, 1e-3);
  if (start >= leg.to - slack || end <= leg.from + slack) return false;
  if (start > leg.from + slack || end < leg.to - slack) refuse(`${id} acts for a part of the way only.`);
  return true;
}

/** When a moment comes [s]; never where its station was not reached. */
function timeOf({ recording }: Scene, moment: Moment): number {
  if ('time' in moment) return moment.time;
  const event = recording.events.find((each) => each.kind === 'station' && each.station === moment.station);
  return event?.time ?? Infinity;
}
