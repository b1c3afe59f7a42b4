import { isObject, own } from '../json/value.js';
import {
  either,
  list,
  optional,
  pair,
  quantity,
  record,
  ref,
  required,
  tagged,
  choice,
  type Entry,
  type Read,
  type Target,
  withDefault,
} from '../fields/spec.js';
import type { QuantityName } from '../units/dimension.js';
import { idEntry, nameEntry } from './common.js';

/** What a measured value must keep to; exactly one is given. All in the SI unit of the measure. */
export interface Bounds {
  atMost?: number;
  atLeast?: number;
  between?: [number, number];
}

const boundsGroups = { groups: [['atMost'], ['atLeast'], ['between']] };

const bounds = (kind: QuantityName, unit: string) => ({
  atMost: optional(quantity(kind, unit), 'It is at most this.'),
  atLeast: optional(quantity(kind, unit), 'It is at least this.'),
  between: optional(pair(quantity(kind, unit)), 'It is between these two.'),
});

const station = (doc: string): Entry<string, 'required'> => required(ref('station'), doc);
const at = station('The station at which it is taken.');
const span = {
  from: optional(ref('station'), 'From this station on; default: from the start.'),
  to: optional(ref('station'), 'To this station; default: to the end.'),
};
const pairOf = required(pair(ref('body', 'track')), 'A pair that is in contacts.');

/** A pair in contact, or an element. */
const pairOr = (says: string, ...to: Target[]) =>
  required(
    either(`a pair in contact, or ${says}`, [pair(ref('body', 'track')), ref(...to)], (value) =>
      Array.isArray(value) ? 0 : 1,
    ),
    `A pair in contact, or ${says}.`,
  );

const accountNames = choice(
  'gravity',
  'spring',
  'friction',
  'reaction',
  'damper',
  'load',
  'drive',
  'joint-friction',
  'rolling-resistance',
  'impact',
  'rope',
  'numerical',
);
const anyElement = ['body', 'joint', 'spring', 'damper', 'drive', 'load'] as const;
const account = either(
  'the name of an account, or {"account": name, "of": id or pair}',
  [
    accountNames,
    record('an account of one element', {
      account: required(accountNames, 'The account.'),
      of: pairOr('an element', ...anyElement),
    }),
  ],
  (value) => (isObject(value) && own(value, 'account') !== undefined ? 1 : 0),
);

type Own = Readonly<Record<string, Entry>>;
const measured = <const E extends Own>(says: string, kind: QuantityName, unit: string, own: E) =>
  record(says, { id: idEntry, name: nameEntry, ...own, ...bounds(kind, unit) }, { alternatives: [boundsGroups] });

/** Field tables of the criteria, by measure. */
export const criterionFields = tagged('a criterion', 'measure', {
  approachSpeed: measured('an approach speed', 'speed', 'm/s', { of: pairOf, at }),
  speed: measured('a speed', 'speed', 'm/s', { of: required(ref('body'), 'The body.'), at }),
  kineticEnergy: measured('a kinetic energy', 'energy', 'J', {
    of: required(ref('body', 'all'), 'A body, or "all" for the system.'),
    at,
  }),
  effectiveMass: measured('an effective mass', 'mass', 'kg', { of: pairOf, at }),
  peakForce: measured('a peak force', 'force', 'N', {
    of: pairOr('a spring, a joint or a damper', 'spring', 'joint', 'damper'),
    ...span,
  }),
  travel: measured('a travel', 'length', 'mm', { of: required(ref('body'), 'The body.'), ...span }),
  angle: measured('an angle', 'angle', 'deg', { of: required(ref('body'), 'The body.'), at }),
  slipSpeed: measured('a slip speed', 'speed', 'm/s', { of: pairOf, at }),
  heat: measured('a heat', 'energy', 'J', { of: pairOr('a joint or a damper', 'joint', 'damper'), ...span }),
  stroke: measured('a stroke', 'length', 'mm', {
    of: required(ref('spring', 'damper', 'slide'), 'A spring, a damper or a slide.'),
    ...span,
  }),
  storedEnergy: measured('a stored energy', 'energy', 'J', {
    of: pairOr('a spring, or a body for gravity', 'spring', 'body'),
    at,
  }),
  returnMargin: measured('a return margin', 'number', '', {
    spring: required(ref('spring'), 'The spring that returns it.'),
    from: station('Where the return begins.'),
    to: station('Where it ends.'),
    kineticEnergy: withDefault(
      quantity('energy', 'J', { atLeast: 0 }),
      0,
      'it need only get there',
      'Kinetic energy required at `to`.',
    ),
  }),
  work: measured('a work', 'energy', 'J', { account: required(account, 'The account.'), ...span }),
  peakPower: measured('a peak power', 'power', 'W', { of: required(ref('drive'), 'The drive.'), ...span }),
  meanPower: measured('a mean power', 'power', 'W', { of: required(ref('drive'), 'The drive.'), ...span }),
  efficiency: measured('an efficiency', 'number', '%', {
    useful: required(list(account, 1), 'Accounts whose work is useful.'),
    input: required(list(account, 1), 'Accounts whose work is put in.'),
    ...span,
  }),
  duration: measured('a duration', 'time', 's', {
    from: station('Where it begins.'),
    to: station('Where it ends.'),
  }),
  liftOff: measured('a lift-off', 'time', 's', { of: pairOf, ...span }),
  reached: record('a station to be reached', { id: idEntry, name: nameEntry, at: station('The station.') }),
  claimedEfficiency: record('a claimed efficiency', {
    id: idEntry,
    name: nameEntry,
    of: required(ref('drive'), 'The drive.'),
    value: required(quantity('number', '%', { above: 0 }), 'What somebody claims.'),
    ...span,
  }),
});

/** An acceptance criterion: `measure` tells which, the other keys are those of its field table, in SI. */
export type Criterion = Read<typeof criterionFields>;
export type Measure = Criterion['measure'];
