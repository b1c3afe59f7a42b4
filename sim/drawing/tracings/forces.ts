import { norm, scale, type Vec } from '../../core/vec.js';
import type { Mechanism } from '../../mechanism/model.js';
import type { ContactSpec, Recording } from '../../recording/recording.js';
import { bodyOf, poseAtTime, rowAtOrBefore, valueAt } from '../../recording/reader.js';
import { forceArrow } from '../kinds/arrow.js';
import { niceAtLeast, toPaper } from '../paper.js';
import type { DrawOperation } from '../operations.js';

/** A force on a body at an instant: point of action [m], force [N], and its letter. */
export interface BodyForce {
  symbol: 'W' | 'N' | 'F';
  at: Vec;
  force: Vec;
}

/** Weight, normal and friction forces on a body at a time, as recorded. */
export function forcesOn(mechanism: Mechanism, recording: Recording, body: string, time: number): BodyForce[] {
  const spec = bodyOf(recording, body);
  if (!spec || recording.rowCount === 0) return [];
  const { x, y } = poseAtTime(recording, spec, time);
  const row = rowAtOrBefore(recording, time);
  const weight: BodyForce = { symbol: 'W', at: [x, y], force: scale(mechanism.gravity, spec.mass) };
  const contacts = recording.layout.contacts.filter(({ between }) => between.includes(body));
  return [weight, ...contacts.flatMap((contact) => contactForces(recording, contact, body, row))].filter(
    ({ force }) => norm(force) > 0,
  );
}

function contactForces(
  recording: Recording,
  { between, columns }: ContactSpec,
  body: string,
  row: number,
): BodyForce[] {
  const read = (column: number) => valueAt(recording, row, column);
  if (read(columns.points) === 0) return [];
  const sign = between[0] === body ? 1 : -1;
  const at: Vec = [read(columns.x), read(columns.y)];
  const normal: Vec = [read(columns.nx), read(columns.ny)];
  // The tangent is the normal turned clockwise: on level ground, with the normal up, it points to the right.
  const tangent: Vec = [normal[1], -normal[0]];
  return [
    { symbol: 'N', at, force: scale(normal, sign * read(columns.normal)) },
    { symbol: 'F', at, force: scale(tangent, sign * read(columns.friction)) },
  ];
}

/** Force that an arrow of `length` pixels stands for: a round figure, so that the greatest weight is about that long. */
export function forceScale(mechanism: Mechanism, length = 50): number {
  const weight = Math.max(0, ...mechanism.bodies.map(({ mass }) => mass)) * norm(mechanism.gravity);
  return niceAtLeast(weight > 0 ? weight : 1) / length;
}

/** Forces as arrows on paper. Arrows are cut at `limit` pixels: an impact's neighbour row may hold a giant. */
export function forceArrows(
  forces: readonly BodyForce[],
  pixels: number,
  perPixel: number,
  limit = 160,
): DrawOperation[] {
  return forces.flatMap(({ at, force }) => {
    const length = Math.min(norm(force) / perPixel, limit);
    const [ux, uy] = [force[0] / norm(force), force[1] / norm(force)];
    return forceArrow(toPaper(at, pixels), [ux * length, -uy * length]);
  });
}
