import type { Vec } from '../../core/vec.js';
import { isObject } from '../json/value.js';
import {
  direction,
  either,
  flag,
  number,
  optional,
  pair,
  position,
  quantity,
  record,
  ref,
  required,
  withDefault,
  type Read,
} from '../fields/spec.js';
import { idEntry, nameEntry, pointOn } from './common.js';
import type { PointOn } from './joint.js';

export type StationWhen =
  | { kind: 'start' }
  | { kind: 'end' }
  | { kind: 'time'; time: number }
  | { kind: 'touch'; pair: [string, string]; count: number }
  | { kind: 'parts'; pair: [string, string]; count: number }
  | { kind: 'sticks'; pair: [string, string]; count: number }
  | { kind: 'slips'; pair: [string, string]; count: number }
  | { kind: 'crosses'; point: PointOn; line: [Vec, Vec]; count: number }
  | { kind: 'turns'; of: string; along: Vec; count: number }
  | { kind: 'angle'; of: string; passes: number; count: number }
  | { kind: 'rests'; of: string };

/** A marked instant. `of` in `turns` and `angle` is a body id; `rests` takes a body id or 'all'. */
export interface Station {
  id: string;
  when: StationWhen;
  after?: string;
}

const count = withDefault(number({ atLeast: 1, whole: true }), 1, 'the first time', 'Which time of its happening.');

const pairFields = required(pair(ref('body', 'track')), 'A pair that is in contacts.');

/** The forms of `when`, by the key that tells them apart. */
export const whenForms = {
  start: record('the start', { start: required(flag, 'true: the start of the run.') }),
  end: record('the end', { end: required(flag, 'true: the end of the run.') }),
  time: record('a time', { time: required(quantity('time', 's', { atLeast: 0 }), 'This time.') }),
  touch: record('a touch', { touch: pairFields, count }),
  parts: record('a parting', { parts: pairFields, count }),
  sticks: record('a sticking', { sticks: pairFields, count }),
  slips: record('a slipping', { slips: pairFields, count }),
  crosses: record('a crossing', {
    crosses: required(
      record('a point and a line', {
        point: required(pointOn, 'The point.'),
        line: required(pair(position), 'The line segment it crosses, by its two ends.'),
      }),
      'A point of a body crosses a line.',
    ),
    count,
  }),
  turns: record('a turning back', {
    turns: required(
      record('a body and a direction', {
        of: required(ref('body'), 'The body.'),
        along: required(direction, 'The velocity along this direction changes sign.'),
      }),
      'A velocity changes sign.',
    ),
    count,
  }),
  angle: record('an angle', {
    angle: required(
      record('a body and an angle', {
        of: required(ref('body'), 'The body.'),
        passes: required(quantity('angle', 'deg'), 'The angle on the sheet, turns counted.'),
      }),
      'A body passes an angle.',
    ),
    count,
  }),
  rests: record('a rest', { rests: required(ref('body', 'all'), 'A body, or "all".') }),
} as const;

const forms = Object.keys(whenForms) as (keyof typeof whenForms)[];

const when = either(`an object with one of ${forms.join(', ')}`, Object.values(whenForms), (value) =>
  isObject(value) ? forms.findIndex((key) => Object.hasOwn(value, key)) : -1,
);

/** Field table of a station. */
export const stationFields = record('a station', {
  id: idEntry,
  name: nameEntry,
  when: required(when, 'The instant it marks.'),
  after: optional(ref('station'), 'Only after this station was reached.'),
});

export type StationDocument = Read<typeof stationFields>;
