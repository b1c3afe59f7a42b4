import { contactOf, type Recording } from '../../recording/index.js';

/** Reads the parts of a force at a row [N]; its magnitude is their root sum of squares. */
export type ForceReader = (row: number) => readonly number[];

/** A force that was recorded, or why there is none. */
export type ForceSource = { read: ForceReader } | { none: string };

const column =
  ({ rows, layout: { width } }: Recording, ...columns: number[]): ForceReader =>
  (row) =>
    columns.map((each) => rows[row * width + each]);

/**
 * The force of a pair (its points' normal forces and its friction), of a spring or damper along its line, or of a joint.
 * Nothing for a pair that never met, which has no force.
 */
export function forceOf(recording: Recording, of: string | [string, string]): ForceSource | null {
  if (typeof of !== 'string') {
    const contact = contactOf(recording, of);
    return contact ? { read: column(recording, contact.columns.normal, contact.columns.friction) } : null;
  }
  const { springs, dampers, joints } = recording.layout;
  const link = [...springs, ...dampers].find(({ id }) => id === of);
  if (link?.ends.some(({ at }) => at === undefined)) return { none: `${of} gives a torque, not a force` };
  if (link) return { read: column(recording, link.columns.force) };
  const joint = joints.find(({ id }) => id === of);
  return joint
    ? { read: column(recording, joint.columns.fx, joint.columns.fy) }
    : { none: `no force of ${of} is recorded` };
}
