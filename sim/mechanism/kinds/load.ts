import type { Vec } from '../../core/vec.js';
import { isObject } from '../json/value.js';
import {
  choice,
  either,
  optional,
  quantity,
  record,
  ref,
  required,
  vector,
  withDefault,
  type Read,
} from '../fields/spec.js';
import { idEntry, moment, nameEntry, pointOn } from './common.js';
import type { PointOn } from './joint.js';

/** A moment in a run: a time [s] or a station id. */
export type Moment = { time: number } | { station: string };

export type Load = { id: string; from?: Moment; until?: Moment } & (
  { kind: 'force'; on: PointOn; force: Vec; follows: 'sheet' | 'body' } | { kind: 'torque'; on: string; torque: number }
);

const span = {
  from: optional(moment, 'Acts from this moment on; default: from the start.'),
  until: optional(moment, 'Acts until this moment; default: to the end.'),
};
const force = record('a force', {
  id: idEntry,
  name: nameEntry,
  on: required(pointOn, 'The point it acts on.'),
  force: required(vector('force', 'N'), 'The force on the sheet.'),
  follows: withDefault(choice('sheet', 'body'), 'sheet', 'keeps its direction', 'Whether it turns with the body.'),
  ...span,
});
const torque = record('a torque', {
  id: idEntry,
  name: nameEntry,
  on: required(ref('body'), 'The body it acts on.'),
  torque: required(quantity('torque', 'N m'), 'The torque, counter-clockwise.'),
  ...span,
});

/** Field table of a load. */
export const loadFields = either('a load with a force on a point, or a torque on a body', [force, torque], (value) =>
  isObject(value) ? (Object.hasOwn(value, 'torque') ? 1 : 0) : -1,
);

export type LoadDocument = Read<typeof loadFields>;
