import type { ContactPair } from '../../mechanism/kinds/contact.js';
import type { Leg } from './happenings.js';
import type { Scene } from './scene.js';

/** How far bodies may shift against each other or stray from rest and still count as one, or as still: of the extent. */
const SHIFT = 1e-5;

/** Whether a body keeps its place over a leg, to 1e-6 of the mechanism's extent. */
export function isStill(scene: Scene, body: string, { from, to, rows }: Leg): boolean {
  if (!scene.isBody(body)) return true;
  const start = scene.pose(body, from);
  const size = scene.mechanism.extent;
  return [scene.pose(body, to), ...rows.map((row) => scene.poseAtRow(body, row))].every(({ x, y, angle }) => {
    return Math.hypot(x - start.x, y - start.y) <= SHIFT * 0.1 * size && Math.abs(angle - start.angle) <= SHIFT;
  });
}

/** The bodies that move as one with a body over a leg, by lasting contact without slip; itself first. */
export function groupOf(scene: Scene, body: string, leg: Leg): string[] {
  const group = [body];
  for (const member of group) {
    for (const pair of scene.pairsOf(member)) {
      const other = otherOf(pair, member);
      if (!scene.isBody(other) || group.includes(other)) continue;
      if (leg.rows.every((row) => scene.touches(pair, row)) && keepTogether(scene, member, other, leg))
        group.push(other);
    }
  }
  return group;
}

export const otherOf = ({ between: [a, b] }: ContactPair, id: string): string => (a === id ? b : a);

function keepTogether(scene: Scene, a: string, b: string, { from, to, rows }: Leg): boolean {
  const offsets = [
    [scene.pose(a, from), scene.pose(b, from)],
    [scene.pose(a, to), scene.pose(b, to)],
    ...rows.map((row) => [scene.poseAtRow(a, row), scene.poseAtRow(b, row)]),
  ].map(([p, q]) => [q.x - p.x, q.y - p.y, q.angle - p.angle]);
  const size = scene.mechanism.extent;
  return offsets.every(([x, y, angle]) => {
    const [x0, y0, angle0] = offsets[0];
    return Math.hypot(x - x0, y - y0) <= SHIFT * size && Math.abs(angle - angle0) <= SHIFT;
  });
}
