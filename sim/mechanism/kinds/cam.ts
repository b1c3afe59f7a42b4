import { isObject } from '../json/value.js';
import {
  choice,
  direction,
  either,
  list,
  measure,
  optional,
  pair,
  position,
  quantity,
  record,
  required,
  tagged,
  withDefault,
  type Read,
} from '../fields/spec.js';

const over = required(
  quantity('angle', 'deg', { above: 0, atMost: 2 * Math.PI }),
  'Angle of the cam over which it happens.',
);
const law = required(
  choice('parabolic', 'harmonic', 'cycloidal', '3-4-5', '4-5-6-7', 'modified-trapezoid', 'modified-sine', 'table'),
  'Law of motion.',
);
const points = optional(
  list(pair(measure), 2),
  'For the law "table": pairs of angle and displacement, both from the start of the segment, joined by a spline.',
);

const riseFields = record('a rise', {
  rise: required(measure, 'How far the follower rises.'),
  over,
  law,
  table: points,
});
const fallFields = record('a fall', {
  fall: required(measure, 'How far the follower falls.'),
  over,
  law,
  table: points,
});
const dwellFields = record('a dwell', {
  dwell: required(quantity('angle', 'deg', { above: 0 }), 'Angle it stays for.'),
});

const segment = either(
  'a segment: {"rise": …}, {"fall": …} or {"dwell": …}',
  [riseFields, fallFields, dwellFields],
  (value) => (isObject(value) ? ['rise', 'fall', 'dwell'].findIndex((key) => Object.hasOwn(value, key)) : -1),
);

const offset = withDefault(quantity('length', 'mm'), 0, 'the follower is radial', 'Offset of its line, to its right.');
const along = withDefault(direction, [0, 1], 'the follower stands upright', 'Where its line points, from the cam.');
const roller = record(
  'a roller',
  {
    radius: required(quantity('length', 'mm', { above: 0 }), 'Radius of the roller.'),
    offset,
    along,
    pivot: optional(position, 'Pivot of a swinging follower, on the sheet.'),
    arm: optional(quantity('length', 'mm', { above: 0 }), 'From the pivot to the centre of the roller.'),
  },
  { alternatives: [{ groups: [['pivot', 'arm']], optional: true }] },
);
const follower = tagged('a follower', 'kind', {
  roller,
  flat: record('a flat follower', { offset, along }),
  knife: record('a knife-edged follower', { offset, along }),
});

/** Field table of a cam; its profile is the one that gives the follower this motion. */
export const camFields = record('a cam', {
  baseRadius: required(quantity('length', 'mm', { above: 0 }), 'Radius of the base circle.'),
  segments: required(list(segment, 1), 'Rises, falls and dwells of one turn, 360 deg in all.'),
  turns: withDefault(
    choice('counterclockwise', 'clockwise'),
    'counterclockwise',
    'segments run as the cam turns counter-clockwise',
    'Sense of rotation in which the segments run.',
  ),
  follower: required(follower, 'What rides on it.'),
});

export type CamDocument = Read<typeof camFields>;
