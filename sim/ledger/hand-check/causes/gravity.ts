import { dot, norm, type Vec } from '../../../core/vec.js';
import type { Pose } from '../../../recording/index.js';
import type { Cause, Factor, Term } from '../cause.js';
import type { Course } from '../course.js';
import type { Scene } from '../scene.js';
import { sum, type Token } from '../tokens.js';

/** Masses that move as one: m, or (m₁ + m₂). */
export const massFactors = (scene: Scene, members: readonly string[]): Factor[] =>
  members.map((id) => ({ name: `m:${id}`, value: scene.body(id).mass, kind: 'mass', joins: 'last', of: [id] }));

export const massShape = (members: readonly string[], factor: (name: string) => Token): Token[] =>
  sum(members.map((id) => [factor(`m:${id}`)]));

export const gravityFactor = ({ mechanism }: Scene): Factor => ({
  name: 'g',
  value: norm(mechanism.gravity),
  kind: 'acceleration',
  joins: 'last',
});

/** m g h, from the heights of the centres of mass. */
export function gravityCause(scene: Scene, { members, pose }: Course): Cause[] {
  if (norm(scene.mechanism.gravity) === 0) return [];
  const starts = members.map((id) => pose(id, 0));
  const given = (q: number): number =>
    members.reduce((work, id, i) => work + gravityWork(scene, id, starts[i], pose(id, q)), 0);
  return [{ given, term: (work) => gravityTerm(scene, members, work) }];
}

/** Work of gravity on one body from a pose to another [J]. */
export function gravityWork(scene: Scene, body: string, from: Pose, to: Pose): number {
  const drop: Vec = [to.x - from.x, to.y - from.y];
  return scene.body(body).mass * dot(scene.mechanism.gravity, drop);
}

export function gravityTerm(scene: Scene, members: readonly string[], work: number): Term {
  const mass = members.reduce((total, id) => total + scene.body(id).mass, 0);
  const height: Factor = {
    name: 'h',
    value: work / (mass * norm(scene.mechanism.gravity)),
    kind: 'length',
    joins: 'sum',
  };
  return {
    key: `gravity ${members.join(' ')}`,
    family: 'gravity',
    value: work,
    factors: [...massFactors(scene, members), gravityFactor(scene), height],
    shape: (factor) => [...massShape(members, factor), factor('g'), factor('h')],
  };
}
