import type { HeldRow } from '../axis-row.js';
import type { ContactInternals, XY } from '../planck-internals.js';
import { newFoot } from '../../geometry/index.js';
import type { ChainFoot } from './chain.js';
import type { CoreShape, CornersShape, SurfaceShape } from './shapes.js';
import { MANIFOLD_CIRCLES } from '../planck-internals.js';

/** One possible contact point of a pair of outlines. */
export interface Candidate {
  /** Names the features that meet, so that a point is known again in the next step. */
  key: number;
  /** Distance of the surfaces, negative when they overlap [engine length]. */
  gap: number;
  /** In the frame planck's manifold wants it (second body's for a face of the first, and so on). */
  local: XY;
}

/**
 * What the stepper knows of one planck contact: its candidate points in the present configuration, which of them are
 * closed, and whether it sticks or slides.
 */
export interface Touch {
  /** Numbers touches in the order they were first seen. */
  id: number;
  contact: ContactInternals;
  shapeA: CoreShape | SurfaceShape | CornersShape;
  shapeB: CoreShape;
  /** Body indices; −1 is the ground. */
  bodyA: number;
  bodyB: number;
  /** Index of the contact pair in force now; −1 where the document lists none for this stretch. */
  pair: number;
  /** Index of the track's segment under it; −1 between bodies. */
  segment: number;
  /** Pair and segment that the last solve was for (the present ones are those of the latest configuration). */
  solvedPair: number;
  solvedSegment: number;
  /** Pair and link of the chain it was on at the start of the step, and how far from the next pair's stretch. */
  startPair: number;
  startLink: number;
  startSeam: number;
  /** Newly closed, or on another pair than before: whether it slides must be found out. */
  isFresh: boolean;
  /** Another touch stands for the same point of the same round: the corner that two chains end at. */
  isSpare: boolean;

  type: number;
  normal: XY;
  point: XY;
  candidates: [Candidate, Candidate];
  count: number;

  /** Keys of the points closed at the start of the step (−1: none). */
  closed: [number, number];
  /** Keys that were closed before the present configuration was settled. */
  closedBefore: [number, number];
  /** Least gap of the points that are not closed, at the start of the step. */
  openGap: number;
  /** Of a track drawn free on both sides: the side the body is on; otherwise the track's own. 0: not known yet. */
  side: 1 | -1 | 0;
  /** False while the body is behind the surface, where nothing is solid. */
  armed: boolean;

  /** Keys of the points that carried force over the last step (−1: none). */
  pressed: [number, number];

  /** +1 or −1: slides that way along the tangent; 0: sticks. */
  sliding: 1 | -1 | 0;
  /** What `sliding` was, and the sliding rate, where the step starts: every trial of it starts from there. */
  slidingAtStart: 1 | -1 | 0;
  slipAtStart: number;
  /** Rows that hold its points in a correction: a normal and a tangent each; made when first needed. */
  held: HeldRow[];
  /** Where it last was on its chain. */
  foot: ChainFoot;
  /** The geometry changes within a step by more than planck's local manifold follows (curved surfaces). */
  curved: boolean;
}

export const NO_KEY = -1;

export function newTouch(id: number, contact: ContactInternals, bodyA: number, bodyB: number): Touch {
  return {
    id,
    contact,
    shapeA: contact.m_fixtureA.m_shape as Touch['shapeA'],
    shapeB: contact.m_fixtureB.m_shape as CoreShape,
    bodyA,
    bodyB,
    pair: -1,
    segment: -1,
    solvedPair: -1,
    solvedSegment: -1,
    startPair: -1,
    startLink: 0,
    startSeam: Infinity,
    isFresh: true,
    isSpare: false,
    type: MANIFOLD_CIRCLES,
    normal: { x: 0, y: 1 },
    point: { x: 0, y: 0 },
    candidates: [newCandidate(), newCandidate()],
    count: 0,
    closed: [NO_KEY, NO_KEY],
    closedBefore: [NO_KEY, NO_KEY],
    openGap: Infinity,
    side: 0,
    armed: true,
    pressed: [NO_KEY, NO_KEY],
    sliding: 0,
    slidingAtStart: 0,
    slipAtStart: 0,
    held: [],
    foot: { foot: newFoot(), link: 0, held: false },
    curved: false,
  };
}

function newCandidate(): Candidate {
  return { key: NO_KEY, gap: Infinity, local: { x: 0, y: 0 } };
}

export function setCandidate(touch: Touch, index: 0 | 1, key: number, gap: number, x: number, y: number): void {
  const candidate = touch.candidates[index];
  candidate.key = key;
  candidate.gap = gap;
  candidate.local.x = x;
  candidate.local.y = y;
}

export const isPressedKey = ({ pressed }: Touch, key: number): boolean => pressed[0] === key || pressed[1] === key;

export const isClosedKey = (touch: Touch, key: number): boolean => touch.closed[0] === key || touch.closed[1] === key;

export const wasClosedKey = ({ closedBefore }: Touch, key: number): boolean =>
  closedBefore[0] === key || closedBefore[1] === key;

/**
 * Least gap among the candidates that were not closed at the start of the step. One that overlaps by more than `deepest`
 * did not come through the surface but round an end of it.
 */
export function leastOpenGap(touch: Touch, deepest: number): number {
  if (!touch.armed || touch.pair < 0) return Infinity;
  let least = Infinity;
  for (let i = 0; i < touch.count; i += 1) {
    const { key, gap } = touch.candidates[i as 0 | 1];
    if (gap < least && gap >= -deepest && !isClosedKey(touch, key)) least = gap;
  }
  return least;
}

/**
 * Puts the closed candidates into planck's manifold. Warm-starting impulses of points that were there are kept.
 */
export function fillManifold(touch: Touch): void {
  const { m_manifold: manifold } = touch.contact;
  if (touch.closed[0] === NO_KEY) {
    manifold.pointCount = 0;
    return;
  }
  const k0 = manifold.points[0].id.key;
  const k1 = manifold.points[1].id.key;
  const n0 = manifold.points[0].normalImpulse;
  const t0 = manifold.points[0].tangentImpulse;
  const n1 = manifold.points[1].normalImpulse;
  const t1 = manifold.points[1].tangentImpulse;
  const had = manifold.pointCount;
  (manifold as { type: number }).type = touch.type;
  manifold.localNormal.x = touch.normal.x;
  manifold.localNormal.y = touch.normal.y;
  manifold.localPoint.x = touch.point.x;
  manifold.localPoint.y = touch.point.y;
  let used = 0;
  for (let i = 0; i < touch.count; i += 1) {
    const candidate = touch.candidates[i as 0 | 1];
    if (!isClosedKey(touch, candidate.key)) continue;
    const point = manifold.points[used];
    point.localPoint.x = candidate.local.x;
    point.localPoint.y = candidate.local.y;
    const kept = had > 0 && k0 === candidate.key ? 0 : had > 1 && k1 === candidate.key ? 1 : -1;
    point.normalImpulse = kept === 0 ? n0 : kept === 1 ? n1 : 0;
    point.tangentImpulse = kept === 0 ? t0 : kept === 1 ? t1 : 0;
    point.id.key = candidate.key;
    used += 1;
  }
  manifold.pointCount = used;
}
