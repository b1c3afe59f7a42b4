import { dot, left, subtract, unit, type Vec } from '../../core/vec.js';
import type { ContactPair } from '../../mechanism/kinds/contact.js';
import type { Pin, Slide } from '../../mechanism/kinds/joint.js';
import type { Pose } from '../../recording/index.js';
import type { Course, Rub } from './course.js';
import { isStill, otherOf } from './group.js';
import type { Leg } from './happenings.js';
import { refuse } from './refusal.js';
import type { Scene } from './scene.js';

/** How straight is straight: of the way gone. */
const STRAIGHT = 1e-3;

/** Whether a body goes straight without turning over a leg. */
export function goesStraight(scene: Scene, body: string, { from, to, rows }: Leg): boolean {
  const [start, end] = [scene.pose(body, from), scene.pose(body, to)];
  const way: Vec = [end.x - start.x, end.y - start.y];
  const [length, along] = [Math.hypot(...way), unit(way)];
  const size = 1e-6 * scene.mechanism.extent;
  if (length <= size) return false;
  return [end, ...rows.map((row) => scene.poseAtRow(body, row))].every(({ x, y, angle }) => {
    const aside = Math.abs(along[0] * (y - start.y) - along[1] * (x - start.x));
    return aside <= STRAIGHT * length + size && Math.abs(angle - start.angle) <= 1e-4;
  });
}

/** The course of bodies that move as one in a straight line, without turning. */
export function lineCourse(scene: Scene, members: string[], leg: Leg, joints: (Pin | Slide)[]): Course {
  const starts = new Map(members.map((id) => [id, scene.pose(id, leg.from)]));
  const [start, end] = [scene.pose(members[0], leg.from), scene.pose(members[0], leg.to)];
  const along = unit([end.x - start.x, end.y - start.y]);
  const length = Math.hypot(end.x - start.x, end.y - start.y);
  const mass = members.reduce((sum, id) => sum + scene.body(id).mass, 0);
  const slide = joints.find((joint) => joint.kind === 'slide');
  return {
    kind: 'line',
    members,
    length,
    measure: mass,
    rollingMass: 0,
    pose: (body, q) => moved(starts.get(body) ?? scene.pose(body, leg.from), along, starts.has(body) ? q : 0),
    rate: () => ({ tangent: along, bend: [0, 0], turn: 0 }),
    sense: slide && senseOf(slide, along, scene) < 0 ? -1 : 1,
    rubs: rubsOf(scene, members, leg, along, joints),
    joints,
    slope: slopeOf(scene, along),
  };
}

const moved = ({ x, y, angle }: Pose, along: Vec, q: number): Pose => ({
  x: x + along[0] * q,
  y: y + along[1] * q,
  angle,
});

/** Angle between a direction and the level, without sign [rad]; 0 where there is no gravity. */
export function slopeOf({ mechanism }: Scene, along: Vec): number {
  const down = unit(mechanism.gravity);
  return Math.asin(Math.min(1, Math.abs(dot(along, down))));
}

const senseOf = ({ axis, between }: Slide, along: Vec, scene: Scene): number => {
  return dot(axis, along) * (scene.isBody(between[0]) ? 1 : -1);
};

/** Contacts that rub: with tracks, or with bodies that stand still; those without friction do no work. */
function rubsOf(scene: Scene, members: string[], leg: Leg, along: Vec, joints: (Pin | Slide)[]): Rub[] {
  const outer = members.flatMap((body) =>
    scene
      .pairsOf(body)
      .filter((pair) => !members.includes(otherOf(pair, body)))
      .filter((pair) => leg.rows.some((row) => scene.touches(pair, row)))
      .map((pair) => ({ body, pair })),
  );
  for (const { pair } of outer) refuseSoft(pair);
  const rough = outer.filter(({ pair }) => pair.kineticFriction > 0 || pair.staticFriction > 0);
  for (const { body, pair } of rough) {
    const other = otherOf(pair, body);
    if (!isStill(scene, other, leg)) refuse(`${body} rubs on ${other}, which moves too.`);
  }
  const carriers = new Set([...rough.map(({ body }) => body), ...joints.flatMap(({ between }) => between)]);
  for (const body of members) {
    const supports = [
      ...outer
        .filter((each) => each.body === body && carries(scene, each.pair, leg, along))
        .map(({ pair }) => otherOf(pair, body)),
      ...joints.filter(({ between }) => between.includes(body)).map(({ id }) => id),
    ];
    const rubs =
      rough.some((each) => each.body === body) ||
      joints.some((joint) => joint.between.includes(body) && joint.friction?.kind === 'coefficient');
    if (supports.length > 1 && rubs) refuse(`${list(supports)} share the load of ${body}.`);
  }
  const fixed = new Set([...carriers].filter((id) => members.includes(id)));
  const guides = joints.flatMap((joint): { id: string; body: string; coefficient: number }[] => {
    if (joint.kind !== 'slide' || joint.friction?.kind !== 'coefficient') return [];
    const body = joint.between.find((id) => scene.isBody(id)) ?? members[0];
    return [{ id: joint.id, body, coefficient: joint.friction.coefficient }];
  });
  const guideRubs = guides.map(({ id, body, coefficient }): Rub => ({
    of: [id],
    coefficient,
    on: id,
    carried: carriedBy(scene, body, members, fixed, leg, along),
    sense: -1,
    normal: () => left(along),
  }));
  const pairRubs = rough.map(({ body, pair }): Rub => ({
    of: [...pair.between],
    coefficient: pair.kineticFriction,
    on: otherOf(pair, body),
    carried: carriedBy(scene, body, members, fixed, leg, along),
    sense: beltSense(scene, otherOf(pair, body), leg, along, body),
    normal: () => left(along),
  }));
  return [...guideRubs, ...pairRubs];
}

/** Whether a contact bears a load across the way, rather than against it. */
function carries(scene: Scene, pair: ContactPair, leg: Leg, along: Vec): boolean {
  const row = leg.rows.find((each) => scene.touches(pair, each)) ?? leg.rows[0];
  return Math.abs(dot(scene.normal(pair, row), along)) < 0.5;
}

export const list = (ids: string[]): string => [...new Set(ids)].join(' and ');

/** A contact that gives way stores and loses what no equation of a rigid body has. */
export function refuseSoft({ compliant, between }: ContactPair): void {
  if (compliant) refuse(`The contact ${between.join('/')} gives way and damps, which is no hand sum.`);
}

/** The bodies that ride on a body, with it; what is only pushed ahead rests on something of its own. */
function carriedBy(
  scene: Scene,
  body: string,
  members: readonly string[],
  carriers: ReadonlySet<string>,
  leg: Leg,
  along: Vec,
): string[] {
  const carried = [body];
  for (const id of carried) {
    for (const pair of scene.pairsOf(id)) {
      const other = otherOf(pair, id);
      if (!members.includes(other) || carried.includes(other)) continue;
      const isPushed = Math.abs(dot(scene.normal(pair, leg.rows[0]), along)) > 0.5;
      if (isPushed && pair.staticFriction > 0) refuse(`${id} pushes ${other} with friction, and they share the load.`);
      if (isPushed) continue;
      if (carriers.has(other)) refuse(`${list([id, other])} share the load.`);
      carried.push(other);
    }
  }
  return members.filter((id) => carried.includes(id));
}

/** Whether a belt carries along or holds back; a belt whose speed changes is no hand sum. */
export function beltSense(scene: Scene, on: string, { from, to }: Leg, along: Vec, body: string): 1 | -1 {
  const track = scene.mechanism.tracks.find(({ id }) => id === on);
  if (!track || track.surfaceSpeed === 0) return -1;
  if (typeof track.surfaceSpeed !== 'number') refuse(`The belt ${on} changes its speed.`);
  const belt = track.surfaceSpeed * Math.sign(dot(chord(scene, on), along));
  const [a, b] = [scene.pose(body, from), scene.pose(body, to)];
  return belt > dot(subtract([b.x, b.y], [a.x, a.y]), along) / (to - from) ? 1 : -1;
}

/** Direction of a straight belt. */
export function chord(scene: Scene, on: string): Vec {
  const runs = scene.tracks.find(({ id }) => id === on)?.runs ?? [];
  if (runs.length !== 1 || runs[0].pieces.some((piece) => piece.kind !== 'line'))
    refuse(`The belt ${on} is not straight.`);
  return unit(subtract(runs[0].end, runs[0].start));
}
