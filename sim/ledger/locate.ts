import type { Vec } from '../core/vec.js';
import type { AccountSpec, ContactSpec, LinkSpec, Recording, RunEvent } from '../recording/index.js';
import { contactOf, middleOfLink, valueAt } from '../recording/index.js';

/** Told where something acted, and the share of it that acted there; segment −1 where there is none. */
export type Visitor = (segment: number, x: number, y: number, share: number) => void;

/** Finds where an account acts between a row and the next. */
export interface Locator {
  /** The track, body, joint, damper or spring it acts on. */
  on: string;
  visit: (row: number, visitor: Visitor) => void;
}

/** How to find where an account acts: at its contact, its joint, or its damper. Nothing where it has no place. */
export function locatorOf(recording: Recording, { of }: AccountSpec): Locator | undefined {
  if (of === null) return undefined;
  if (typeof of !== 'string') {
    const contact = contactOf(recording, of);
    return contact && contactLocator(recording, contact);
  }
  const { joints, dampers, springs } = recording.layout;
  const joint = joints.find(({ id }) => id === of);
  if (joint) return { on: of, visit: betweenRows(recording, joint.columns) };
  const link = [...dampers, ...springs].find(({ id }) => id === of);
  return link && linkLocator(recording, link);
}

function betweenRows(recording: Recording, { x, y }: { x: number; y: number }): Locator['visit'] {
  const middleOf = (row: number, column: number): number => {
    return (valueAt(recording, row, column) + valueAt(recording, row + 1, column)) / 2;
  };
  return (row, visitor) => visitor(-1, middleOf(row, x), middleOf(row, y), 1);
}

function linkLocator(recording: Recording, link: LinkSpec): Locator {
  return {
    on: link.id,
    visit: (row, visitor) => {
      const [before, after] = [middleOfLink(recording, link, row), middleOfLink(recording, link, row + 1)];
      if (before && after) visitor(-1, (before[0] + after[0]) / 2, (before[1] + after[1]) / 2, 1);
    },
  };
}

/**
 * A pair acts on what is not a body of the run (the track); of two bodies, on the second. While the contact passes from
 * one segment to the next between two rows, each has half. An impact acts where its event says.
 */
function contactLocator(recording: Recording, { between, columns }: ContactSpec): Locator {
  const bodies = new Set(recording.layout.bodies.map(({ id }) => id));
  const touches = touchesByRow(recording, between);
  const { rows } = recording;
  const { width } = recording.layout;
  const visit: Locator['visit'] = (row, visitor) => {
    const before = row * width;
    const after = before + width;
    const [segmentBefore, segmentAfter] = [rows[before + columns.segment], rows[after + columns.segment]];
    const put = (at: number, segment: number, share: number): void => {
      visitor(segment, rows[at + columns.x], rows[at + columns.y], share);
    };
    const touch = touches.get(row);
    const closedBefore = rows[before + columns.points] > 0;
    const closedAfter = rows[after + columns.points] > 0;
    if (touch) visitor(segmentAfter, touch[0], touch[1], 1);
    else if (closedBefore && !closedAfter) put(before, segmentBefore, 1);
    else if (closedAfter && !closedBefore) put(after, segmentAfter, 1);
    else {
      put(before, segmentBefore, 0.5);
      put(after, segmentAfter, 0.5);
    }
  };
  return { on: between.find((id) => !bodies.has(id)) ?? between[1], visit };
}

/** Where a pair's impacts were, by the row before them; several points of one pair count at their middle. */
function touchesByRow(recording: Recording, [a, b]: [string, string]): Map<number, Vec> {
  const touches = new Map<number, Vec>();
  for (const event of recording.events) {
    if (!isTouch(event)) continue;
    const [first, second] = event.pair;
    if (!((first === a && second === b) || (first === b && second === a))) continue;
    const { at, row } = event;
    const earlier = touches.get(row);
    touches.set(row, earlier ? [(earlier[0] + at[0]) / 2, (earlier[1] + at[1]) / 2] : at);
  }
  return touches;
}

function isTouch(event: RunEvent): event is RunEvent & { kind: 'touch' } {
  return event.kind === 'touch';
}
