import type { Vec } from '../../core/vec.js';
import { isObject } from '../json/value.js';
import {
  choice,
  either,
  flag,
  list,
  number,
  optional,
  position,
  record,
  required,
  text,
  withDefault,
  type Read,
} from '../fields/spec.js';
import { idEntry, nameEntry, overTime } from './common.js';

/** One drawn piece of a track, from the end of the one before it. */
export type TrackSegment = { name?: string } & (
  { kind: 'line'; to: Vec } | { kind: 'arc'; to: Vec; bulge: number } | { kind: 'spline'; through: Vec[] }
);

/** A value in time: constant, or piecewise linear through [time, value] pairs (held beyond its ends). */
export type Curve = number | Vec[];

/** A fixed profile. `segments` includes the closing line of a closed track. */
export interface Track {
  id: string;
  from: Vec;
  segments: TrackSegment[];
  closed: boolean;
  side: 'left' | 'right' | 'both';
  /** Speed of the surface along the path [m/s]; 0 for a still track. */
  surfaceSpeed: Curve;
  material?: string;
}

const lineOrArc = record('a line or an arc', {
  to: required(position, 'Where it ends.'),
  bulge: optional(number(), 'Makes it an arc: tangent of a quarter of its angle, positive counter-clockwise.'),
  name: optional(text, 'Name of the segment.'),
});
const spline = record('a spline', {
  through: required(list(position, 1), 'Points that a natural cubic spline passes through, from where the track is.'),
  name: optional(text, 'Name of the segment.'),
});
const segment = either('a segment: {"to": [x, y]} or {"through": [[x, y], ...]}', [lineOrArc, spline], (value) =>
  isObject(value) ? (Object.hasOwn(value, 'through') ? 1 : 0) : -1,
);

/** Field table of a track. */
export const trackFields = record('a track', {
  id: idEntry,
  name: nameEntry,
  from: required(position, 'Where the track starts.'),
  to: required(list(segment, 1), 'Its segments, each from the end of the one before.'),
  closed: withDefault(flag, false, 'the track is open', 'Closes with a straight segment where the ends differ.'),
  side: withDefault(
    choice('left', 'right', 'both'),
    'left',
    'the free side is on the left',
    'The side, looking along the path, that is free space.',
  ),
  surfaceSpeed: withDefault(
    overTime('speed', 'm/s'),
    0,
    'the surface stands still',
    'A belt: speed of its surface along the path.',
  ),
  material: optional(text, 'Name in the table of materials.'),
});

export type TrackDocument = Read<typeof trackFields>;
