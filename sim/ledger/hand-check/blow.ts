import { dot, unit, type Vec } from '../../core/vec.js';
import type { ContactPair } from '../../mechanism/kinds/contact.js';
import type { Joint } from '../../mechanism/kinds/joint.js';
import { otherOf } from './group.js';
import type { Blow } from './happenings.js';
import { refuse } from './refusal.js';
import type { Scene } from './scene.js';
import { strikeNormal } from './strike-normal.js';

/** What a central blow may leave of turning, of the change of speed; how far off a line is still along it. */
const OFF_CENTRE = 1e-4;
const ALONG = 1e-3;

/** What struck a body. */
export type Strike =
  | { kind: 'limit'; joint: string; body: string; restitution: number }
  | { kind: 'fixed'; pair: ContactPair; body: string; other: string; normal: Vec }
  | { kind: 'bodies'; pair: ContactPair; body: string; other: string; normal: Vec };

/** The strike in a blow that concerns a body or those that move with it; several at once are no hand sum. */
export function strikeOn(scene: Scene, blow: Blow, members: readonly string[]): Strike | undefined {
  const pairs = blow.pairs.filter((pair) => pair.some((id) => members.includes(id)));
  const joints = blow.joints.flatMap((id) => scene.mechanism.joints.filter((joint) => joint.id === id));
  const limits = joints.filter((joint) => 'between' in joint && joint.between.some((id) => members.includes(id)));
  if (pairs.length + limits.length === 0) return undefined;
  if (pairs.length + limits.length > 1) refuse(`${members[0]} is struck in several places at once.`);
  return limits.length > 0 ? limitStrike(scene, limits[0], members) : pairStrike(scene, blow, pairs[0], members);
}

function limitStrike(scene: Scene, joint: Joint, members: readonly string[]): Strike {
  const isStopped = (joint.kind === 'pin' || joint.kind === 'slide') && joint.between.includes('ground');
  if (!isStopped) return refuse(`The stop of ${joint.id} is between moving parts.`);
  const body = joint.between.find((id) => members.includes(id)) ?? members[0];
  return { kind: 'limit', joint: joint.id, body, restitution: joint.limits?.restitution ?? 0 };
}

function pairStrike(scene: Scene, blow: Blow, named: [string, string], members: readonly string[]): Strike {
  const pair = scene.mechanism.contacts.find(({ between }) => between.every((id) => named.includes(id)));
  if (!pair) return refuse(`The pair ${named.join('/')} is not in the document.`);
  if (pair.compliant) refuse(`The contact ${named.join('/')} gives way and damps, which is no hand sum.`);
  const body = named.find((id) => members.includes(id)) ?? members[0];
  const other = otherOf(pair, body);
  return {
    kind: scene.isBody(other) ? 'bodies' : 'fixed',
    pair,
    body,
    other,
    normal: strikeNormal(scene, pair, blow.row),
  };
}

/** Share of the speed that goes into the surface: 1 for a square blow. Refuses what is neither central nor smooth. */
export function squareShare(scene: Scene, strike: Exclude<Strike, { kind: 'limit' }>, { row }: Blow): number {
  const { vx, vy } = scene.heading(strike.body, row);
  const share = Math.min(1, Math.abs(dot(unit([vx, vy]), strike.normal)));
  const isSquare = 1 - share < ALONG;
  if (!isSquare && strike.pair.kineticFriction > 0)
    refuse(`${strike.body} strikes ${strike.other} aslant, with friction.`);
  requireCentral(scene, strike, row);
  return isSquare ? 1 : share;
}

/** A blow is central where it starts no body turning that is free to turn. */
function requireCentral(scene: Scene, strike: Exclude<Strike, { kind: 'limit' }>, row: number): void {
  for (const body of strike.kind === 'bodies' ? [strike.body, strike.other] : [strike.body]) {
    const [before, after] = [scene.heading(body, row), scene.heading(body, row + 1)];
    const { mass, inertia } = scene.body(body);
    const turning = Math.sqrt(inertia / mass) * Math.abs(after.spin - before.spin);
    if (turning > OFF_CENTRE * Math.hypot(before.vx - after.vx, before.vy - after.vy)) {
      refuse(`The blow of ${strike.body} on ${strike.other} is off the centre of ${body}.`);
    }
  }
}

/** Whether a body struck along a normal can give way freely: on nothing, on a surface or on a guide along it. */
export function requireFree(scene: Scene, body: string, struckBy: string, normal: Vec, row: number): void {
  for (const joint of scene.jointsOf(body, row)) {
    const isAlong =
      joint.kind === 'slide' && joint.between.includes('ground') && Math.abs(dot(joint.axis, normal)) > 1 - ALONG;
    if (!isAlong) refuse(`${body} is held by ${joint.id} as ${struckBy} strikes it.`);
  }
  for (const pair of scene.pairsOf(body)) {
    const other = otherOf(pair, body);
    if (other === struckBy || !scene.touches(pair, row)) continue;
    if (Math.abs(dot(scene.normal(pair, row), normal)) > ALONG)
      refuse(`${other} takes a part of the blow of ${struckBy} on ${body}.`);
  }
}

/** Restitution of a pair at an approach speed: none below its rest speed. */
export const restitutionAt = ({ restitution, restSpeed }: ContactPair, approach: number): number =>
  approach < restSpeed ? 0 : restitution;

/** Whether two bodies have one speed after a blow. */
export function staysWith(scene: Scene, a: string, b: string, row: number): boolean {
  const [p, q] = [scene.heading(a, row), scene.heading(b, row)];
  return Math.hypot(p.vx - q.vx, p.vy - q.vy) <= 1e-3 * Math.max(Math.hypot(p.vx, p.vy), Math.hypot(q.vx, q.vy));
}
