import type { AccountSpec, BodySpec, ContactSpec, LinkEnd, LinkSpec, Recording } from './recording.js';
import type { Vec } from '../core/vec.js';

/** Motion of a body at one instant: centre of mass [m], angle [rad], velocity [m/s], spin [rad/s]. */
export interface BodyState {
  x: number;
  y: number;
  angle: number;
  vx: number;
  vy: number;
  spin: number;
}

/** Where a body is drawn: centre of mass [m] and angle [rad]. */
export interface Pose {
  x: number;
  y: number;
  angle: number;
}

/** One recorded number. */
export function valueAt(recording: Recording, row: number, column: number): number {
  return recording.rows[row * recording.layout.width + column];
}

/** Time of a row [s]. */
export function timeOfRow(recording: Recording, row: number): number {
  return valueAt(recording, row, 0);
}

/**
 * The last row at or before a time [s]; the first row where the time is before the run. Of the two rows of an impact it
 * is the one after it.
 */
export function rowAtOrBefore(recording: Recording, time: number): number {
  let low = 0;
  let high = recording.rowCount;
  while (high - low > 1) {
    const middle = (low + high) >> 1;
    if (timeOfRow(recording, middle) <= time) low = middle;
    else high = middle;
  }
  return low;
}

/** Find a body of the run by its id. */
export function bodyOf(recording: Recording, id: string): BodySpec | undefined {
  return recording.layout.bodies.find((body) => body.id === id);
}

/** Find a contact pair of the run, named in either order. */
export function contactOf(recording: Recording, pair: readonly [string, string]): ContactSpec | undefined {
  return recording.layout.contacts.find(({ between: [a, b] }) => {
    return (a === pair[0] && b === pair[1]) || (a === pair[1] && b === pair[0]);
  });
}

/** A body's motion at a row. */
export function bodyAtRow(recording: Recording, { columns }: BodySpec, row: number): BodyState {
  const read = (column: number): number => valueAt(recording, row, column);
  return {
    x: read(columns.x),
    y: read(columns.y),
    angle: read(columns.angle),
    vx: read(columns.vx),
    vy: read(columns.vy),
    spin: read(columns.spin),
  };
}

/**
 * A body's pose at any time [s], by cubic Hermite interpolation of position and velocity between the rows around it
 * (error of fourth order in their distance; exact for a constant acceleration). Before the first and after the last row
 * the body stands still.
 */
export function poseAtTime(recording: Recording, body: BodySpec, time: number): Pose {
  const row = rowAtOrBefore(recording, time);
  const start = bodyAtRow(recording, body, row);
  const fraction = fractionAfter(recording, row, time);
  if (fraction === 0) return { x: start.x, y: start.y, angle: start.angle };
  const end = bodyAtRow(recording, body, row + 1);
  const span = timeOfRow(recording, row + 1) - timeOfRow(recording, row);
  return {
    x: hermite(fraction, span, start.x, start.vx, end.x, end.vx),
    y: hermite(fraction, span, start.y, start.vy, end.y, end.vy),
    angle: hermite(fraction, span, start.angle, start.spin, end.angle, end.spin),
  };
}

/** How far a time lies from a row to the next, 0 to 1; 0 outside the run. */
function fractionAfter(recording: Recording, row: number, time: number): number {
  if (row + 1 >= recording.rowCount) return 0;
  const start = timeOfRow(recording, row);
  const span = timeOfRow(recording, row + 1) - start;
  return span > 0 && time > start ? (time - start) / span : 0;
}

function hermite(s: number, span: number, p0: number, v0: number, p1: number, v1: number): number {
  const r = 1 - s;
  return r * r * (1 + 2 * s) * p0 + s * s * (3 - 2 * s) * p1 + span * s * r * (r * v0 - s * v1);
}

/** Work of an account on each of its bodies from the run's start to a row [J], in the order of `account.bodies`. */
export function workAtRow(recording: Recording, account: AccountSpec, row: number): number[] {
  return account.columns.work.map((column) => valueAt(recording, row, column));
}

/** A cumulative column at any time [s], linear between rows: it never passes the values at either side. */
export function valueAtTime(recording: Recording, column: number, time: number): number {
  const row = rowAtOrBefore(recording, time);
  const start = valueAt(recording, row, column);
  const fraction = fractionAfter(recording, row, time);
  return fraction === 0 ? start : start + fraction * (valueAt(recording, row + 1, column) - start);
}

/** Work of an account on each of its bodies from the run's start to any time [J]. */
export function workAtTime(recording: Recording, account: AccountSpec, time: number): number[] {
  return account.columns.work.map((column) => valueAtTime(recording, column, time));
}

/** Kinetic energy of one body at a row, ½ m v² + ½ I ω² [J]. */
export function kineticEnergyOf(recording: Recording, { mass, inertia, columns }: BodySpec, row: number): number {
  const vx = valueAt(recording, row, columns.vx);
  const vy = valueAt(recording, row, columns.vy);
  const spin = valueAt(recording, row, columns.spin);
  return 0.5 * (mass * (vx * vx + vy * vy) + inertia * spin * spin);
}

/** Energy an account stores at a row [J]; nothing where the account stores none. */
export function storedAtRow(recording: Recording, { columns }: AccountSpec, row: number): number | undefined {
  return columns.stored === undefined ? undefined : valueAt(recording, row, columns.stored);
}

/**
 * Where the middle of a spring or damper is at a row [m]. An end given by its part alone counts at that body's centre of
 * mass, and one on the ground then not at all. Nothing where neither end has a place.
 */
export function middleOfLink(recording: Recording, link: LinkSpec, row: number): Vec | undefined {
  const places = link.ends.map((end) => endAtRow(recording, end, row)).filter((place) => place !== undefined);
  if (places.length === 0) return undefined;
  const sum = (axis: 0 | 1): number => places.reduce((total, place) => total + place[axis], 0);
  return [sum(0) / places.length, sum(1) / places.length];
}

/**
 * Where an end of a spring or damper is at a row [m]: a point of a body or of the ground, given as drawn. One given by
 * its part alone is at that body's centre of mass, and on the ground nowhere.
 */
export function endAtRow(recording: Recording, end: LinkEnd, row: number): Vec | undefined {
  const body = bodyOf(recording, end.of);
  if (!body) return end.at;
  const now = bodyAtRow(recording, body, row);
  if (!end.at) return [now.x, now.y];
  const drawn = bodyAtRow(recording, body, 0);
  const [dx, dy] = [end.at[0] - drawn.x, end.at[1] - drawn.y];
  const [cos, sin] = [Math.cos(now.angle - drawn.angle), Math.sin(now.angle - drawn.angle)];
  return [now.x + cos * dx - sin * dy, now.y + sin * dx + cos * dy];
}
