import { isObject, own } from '../json/value.js';
import { either, measure, number, pair, record, ref, required, withDefault, type Read } from '../fields/spec.js';
import { acts, idEntry, nameEntry, pointOn } from './common.js';
import type { PointOn } from './joint.js';

/** Force (or torque) = −coefficient × |speed|^exponent × sign(speed) along the line of its ends. */
export type Damper = {
  id: string;
  coefficient: number;
  exponent: number;
  acts: 'both' | 'compression' | 'extension';
} & ({ kind: 'linear'; between: [PointOn, PointOn] } | { kind: 'rotary'; between: [string, string] });

const shared = {
  coefficient: required(measure, 'Force or torque over speed to the power of the exponent.'),
  exponent: withDefault(number({ above: 0 }), 1, 'a viscous damper', '1 viscous, 2 an orifice.'),
};

const linear = record('a damper', {
  id: idEntry,
  name: nameEntry,
  between: required(pair(pointOn), 'The points its ends are fixed to.'),
  ...shared,
  acts: acts('acts both ways'),
});
const rotary = record('a rotary damper', {
  id: idEntry,
  name: nameEntry,
  between: required(pair(ref('body', 'ground')), 'The two parts.'),
  ...shared,
});

/** Field table of a damper: rotary where it is between ids. */
export const damperFields = either('a damper', [linear, rotary], (value) => {
  const ends = isObject(value) ? own(value, 'between') : undefined;
  if (!isObject(value)) return -1;
  return Array.isArray(ends) && ends.some((end) => typeof end === 'string') ? 1 : 0;
});

export type DamperDocument = Read<typeof damperFields>;
