import type { Chain } from './chain.js';
import { SURFACE } from './shapes.js';
import { NO_KEY, type Touch } from './touch.js';

/** Points nearer than this are one [engine length]. */
const SAME = 1e-9;

/**
 * A convex corner is where two chains end, and a round that stands on it touches both in one and the same point. Marks all
 * but one of them as spare: the one that is left is on the flank beside it, or else the one that was there before.
 *
 * @returns true where it is another than before
 */
export function spareCorners(touches: readonly Touch[], isActive: (touch: Touch) => boolean): boolean {
  const rounds = touches.filter((touch) => isRound(touch) && (touch.isSpare || isActive(touch)));
  const spares = rounds.filter((touch) => isActive(touch) && rounds.some((other) => outranks(other, touch, isActive)));
  let isNew = false;
  for (const touch of rounds) {
    if (spares.includes(touch) === touch.isSpare) continue;
    isNew = true;
    if (touch.isSpare && isActive(touch)) takeOver(touch, rounds);
  }
  for (const touch of rounds) touch.isSpare = spares.includes(touch);
  for (const touch of spares) touch.pressed[0] = touch.pressed[1] = NO_KEY;
  return isNew;
}

const isRound = ({ shapeA, shapeB }: Touch): boolean =>
  shapeA.kind === SURFACE && shapeB.vertices.length === 1 && !shapeB.isCorner;

/** The same point by its other chain: whether it slides, and that it pressed, is known already. */
function takeOver(touch: Touch, rounds: readonly Touch[]): void {
  const before = rounds.find((other) => other !== touch && !other.isSpare && isSameRound(other, touch));
  if (!before) return;
  touch.sliding = before.sliding;
  touch.pressed[0] = before.pressed[0];
  touch.isFresh = false;
}

const isSameRound = (a: Touch, b: Touch): boolean => a.contact.m_fixtureB === b.contact.m_fixtureB;

function outranks(other: Touch, touch: Touch, isActive: (touch: Touch) => boolean): boolean {
  if (other === touch || !touch.foot.held || !isActive(other) || !isSameRound(other, touch)) return false;
  const { x, y } = touch.foot.foot;
  if (other.shapeA.kind !== SURFACE || !endsAt(other.shapeA.chain, x, y)) return false;
  if (!other.foot.held) return true;
  if (Math.hypot(other.foot.foot.x - x, other.foot.foot.y - y) > SAME) return false;
  if (other.isSpare !== touch.isSpare) return touch.isSpare;
  return other.isFresh === touch.isFresh ? other.id < touch.id : touch.isFresh;
}

const endsAt = ({ ends }: Chain, x: number, y: number): boolean =>
  ends.some((end) => Math.hypot(end.x - x, end.y - y) <= SAME);
