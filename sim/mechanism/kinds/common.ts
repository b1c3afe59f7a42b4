import { isObject } from '../json/value.js';
import {
  choice,
  either,
  id,
  optional,
  position,
  quantity,
  record,
  ref,
  required,
  table,
  text,
  withDefault,
} from '../fields/spec.js';

export const idEntry = required(id, 'Unique in the document; letters, digits, - and _.');
export const nameEntry = optional(text, 'What people call it; default: its id.');

/** A point on a part, given on the sheet as drawn. */
export const pointOn = record('a point such as {"of": "block", "at": [x, y]}', {
  of: required(ref('body', 'ground'), 'The body it is fixed to, or "ground".'),
  at: required(position, 'Where it is on the sheet as drawn.'),
});

const stationMoment = record('{"station": id}', { station: required(ref('station'), 'A station.') });

/** A time, or the instant of a station. */
export const moment = either(
  'a time such as "0.2 s", or {"station": id}',
  [quantity('time', 's', { atLeast: 0 }), stationMoment],
  (value) => (isObject(value) ? 1 : 0),
);

/** A value that stays the same, or goes piecewise linearly through pairs of time and value and is held beyond them. */
export const overTime = (kind: 'speed' | 'spin', unit: string) =>
  either(
    `${kind === 'speed' ? 'a speed' : 'a speed of rotation'}, or {"curve": [[time, value], ...]}`,
    [
      quantity(kind, unit),
      record('a curve over time', { curve: required(table('time', kind), 'Pairs of time and value.') }),
    ],
    (value) => (isObject(value) ? 1 : 0),
  );

/** Which way a spring or damper acts. */
export const acts = (why: string) =>
  withDefault(choice('both', 'compression', 'extension'), 'both', why, 'Whether it acts both ways or only one.');
