import type { Vec } from '../core/vec.js';
import { buildTrack, pointAt } from '../geometry/index.js';
import type { PointOn } from '../mechanism/kinds/joint.js';
import type { DrawingContext } from './figure.js';
import type { Item } from './items.js';
import { shapeOutline } from './kinds/body.js';
import { boxAround, toPaper } from './paper.js';
import { carried, onSheet, type Poses } from './pose.js';

/** Where an item's leader ends on paper [px]; null for one that has no place. */
export type AnchorOf = (now: Poses) => Vec | null;

/** Finds the anchor of each item: inside a body, half way along a track, mid-length of a spring, at a joint. */
export function anchorOf(item: Item, context: DrawingContext): { at: AnchorOf; onLine: boolean } {
  const { mechanism, pixels, drawn } = context;
  const byId = <T extends { id: string }>(list: readonly T[]) => list.find(({ id }) => id === item.id);
  const middle =
    (between: readonly [PointOn, PointOn]): AnchorOf =>
    (now) => {
      const [a, b] = between.map((end) => toPaper(carried(end, drawn, now), pixels));
      return [(a[0] + b[0]) / 2, (a[1] + b[1]) / 2];
    };
  const pivot =
    (of: readonly string[]): AnchorOf =>
    (now) => {
      const pose = of.map((id) => now.get(id)).find((each) => each !== undefined);
      return pose ? toPaper(pose.at, pixels) : null;
    };
  const atJoint = (id: string): AnchorOf => {
    const joint = mechanism.joints.find((each) => each.id === id);
    if (!joint || !('between' in joint)) return () => null;
    if (!('at' in joint)) return pivot(joint.between);
    const of = joint.between[0] === 'ground' ? joint.between[1] : joint.between[0];
    return (now) => toPaper(carried({ of, at: joint.at }, drawn, now), pixels);
  };
  const link = (
    list: readonly ({ id: string } & (
      { between: readonly [PointOn, PointOn] } | { between: readonly [string, string] }
    ))[],
  ) => {
    const found = byId(list);
    if (!found) return () => null;
    const [first, second] = found.between;
    return typeof first === 'string' || typeof second === 'string'
      ? pivot(found.between as readonly [string, string])
      : middle([first, second]);
  };
  const finders: Record<Item['kind'], () => { at: AnchorOf; onLine: boolean }> = {
    body: () => ({ at: bodyAnchor(item.id, context), onLine: false }),
    track: () => ({ at: trackAnchor(item.id, context), onLine: true }),
    spring: () => ({ at: link(mechanism.springs), onLine: true }),
    damper: () => ({ at: link(mechanism.dampers), onLine: true }),
    drive: () => ({ at: atJoint(byId(mechanism.drives)?.on ?? ''), onLine: true }),
    joint: () => ({ at: atJoint(item.id), onLine: true }),
  };
  return finders[item.kind]();
}

/** A point inside a body, off its mass centre's mark. */
function bodyAnchor(id: string, { mechanism, pixels }: DrawingContext): AnchorOf {
  const body = mechanism.bodies.find((each) => each.id === id);
  if (!body) return () => null;
  const box = boxAround(shapeOutline(body.shape));
  const [cx, cy] = body.centerOfMass;
  const inside: Vec = box && body.shape.kind !== 'polygon' ? [cx + (box.right - box.left) * 0.25, cy + (box.high - box.low) * 0.2] : [cx, cy]; // prettier-ignore
  return (now) => {
    const pose = now.get(id);
    return pose ? toPaper(onSheet(pose, inside), pixels) : null;
  };
}

function trackAnchor(id: string, { mechanism, pixels }: DrawingContext): AnchorOf {
  const track = mechanism.tracks.find((each) => each.id === id);
  if (!track) return () => null;
  const { runs } = buildTrack(track);
  const longest = runs.reduce((a, b) => (b.length > a.length ? b : a));
  const { x, y } = pointAt(longest, longest.length * 0.42);
  const at = toPaper([x, y], pixels);
  return () => at;
}
