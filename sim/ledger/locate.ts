import type { Vec } from '../core/vec.js';
import type { AccountSpec, ContactSpec, Recording, RunEvent } from '../recording/index.js';
import { contactOf, middleOfLink, valueAt } from '../recording/index.js';

/** Where something acted between a row and the next, and the share of it that acted there. */
export interface Spot {
  on: string;
  segment?: number;
  at: Vec;
  share: number;
}

export type Locator = (row: number) => Spot[];

/** How to find where an account acts: at its contact, its joint, or its damper. Nothing where it has no place. */
export function locatorOf(recording: Recording, { of }: AccountSpec): Locator | undefined {
  if (of === null) return undefined;
  if (typeof of !== 'string') return contactLocator(recording, of);
  const joint = recording.layout.joints.find(({ id }) => id === of);
  if (joint) {
    const { x, y } = joint.columns;
    return (row) => [
      { on: of, at: middle(pointAt(recording, row, x, y), pointAt(recording, row + 1, x, y)), share: 1 },
    ];
  }
  const link = [...recording.layout.dampers, ...recording.layout.springs].find(({ id }) => id === of);
  if (!link) return undefined;
  return (row) => {
    const [before, after] = [middleOfLink(recording, link, row), middleOfLink(recording, link, row + 1)];
    return before && after ? [{ on: of, at: middle(before, after), share: 1 }] : [];
  };
}

/**
 * A pair acts on what is not a body of the run (the track); of two bodies, on the second. While the contact passes from
 * one segment to the next between two rows, each has half. An impact acts where its event says.
 */
function contactLocator(recording: Recording, pair: [string, string]): Locator | undefined {
  const contact = contactOf(recording, pair);
  if (!contact) return undefined;
  const bodies = new Set(recording.layout.bodies.map(({ id }) => id));
  const on = contact.between.find((id) => !bodies.has(id)) ?? contact.between[1];
  const touches = touchesByRow(recording, contact);
  return (row) => {
    const after = spotAt(recording, contact, on, row + 1);
    const touch = touches.get(row);
    if (touch) return [{ ...after, at: touch }];
    const before = spotAt(recording, contact, on, row);
    const [closedBefore, closedAfter] = [row, row + 1].map((r) => valueAt(recording, r, contact.columns.points) > 0);
    if (closedBefore !== closedAfter) return [closedBefore ? before : after];
    if (before.segment === after.segment) return [{ ...after, at: middle(before.at, after.at) }];
    return [before, after].map((spot) => ({ ...spot, share: 0.5 }));
  };
}

function spotAt(recording: Recording, { columns }: ContactSpec, on: string, row: number): Spot {
  const segment = valueAt(recording, row, columns.segment);
  const at = pointAt(recording, row, columns.x, columns.y);
  return { on, ...(segment >= 0 ? { segment } : {}), at, share: 1 };
}

/** Where a pair's impacts were, by the row before them; several points of one pair count at their middle. */
function touchesByRow(recording: Recording, { between: [a, b] }: ContactSpec): Map<number, Vec> {
  const touches = new Map<number, Vec>();
  for (const event of recording.events) {
    if (!isTouch(event)) continue;
    const [first, second] = event.pair;
    if (!((first === a && second === b) || (first === b && second === a))) continue;
    const earlier = touches.get(event.row);
    touches.set(event.row, earlier ? middle(earlier, event.at) : event.at);
  }
  return touches;
}

function isTouch(event: RunEvent): event is RunEvent & { kind: 'touch' } {
  return event.kind === 'touch';
}

function pointAt(recording: Recording, row: number, x: number, y: number): Vec {
  return [valueAt(recording, row, x), valueAt(recording, row, y)];
}

function middle(a: Vec, b: Vec): Vec {
  return [(a[0] + b[0]) / 2, (a[1] + b[1]) / 2];
}
