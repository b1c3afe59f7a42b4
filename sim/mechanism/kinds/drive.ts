import type { Vec } from '../../core/vec.js';
import { isObject, own } from '../json/value.js';
import {
  choice,
  either,
  number,
  optional,
  quantity,
  record,
  ref,
  required,
  table,
  withDefault,
  type Read,
} from '../fields/spec.js';
import { idEntry, moment, nameEntry, overTime } from './common.js';
import type { Moment } from './load.js';

/** What a drive does on its joint: an effort (torque on a pin, force on a slide), a held speed, or a motor's line. */
export type DriveLaw =
  | { kind: 'effort'; value: number }
  | { kind: 'effortCurve'; over: 'time' | 'position'; curve: Vec[] }
  | { kind: 'speed'; value: number | Vec[]; limit?: number }
  | { kind: 'motor'; stallTorque: number; noLoadSpeed: number };

/** Torque, force and speed are those of the joint's first body relative to its second. */
export interface Drive {
  id: string;
  on: string;
  law: DriveLaw;
  efficiency: number;
  from?: Moment;
  until?: Moment;
}

const shared = {
  efficiency: withDefault(number({ above: 0, atMost: 1 }), 1, 'the drive loses nothing', 'Output over input power.'),
  from: optional(moment, 'Drives from this moment on; default: from the start.'),
  until: optional(moment, 'Drives until this moment; default: to the end.'),
};

/** An effort that is constant, or a curve over time or over the joint's position. */
function effort(kind: 'force' | 'torque', unit: string, over: 'length' | 'angle') {
  const overTimeFields = record('a curve over time', {
    curve: required(table('time', kind), `Pairs of time and ${kind}.`),
    over: required(choice('time'), 'What the first numbers are.'),
  });
  const overPosition = record('a curve over position', {
    curve: required(table(over, kind), `Pairs of position and ${kind}.`),
    over: required(choice('time', 'position'), 'What the first numbers are: "time" or "position".'),
  });
  const says = `a ${kind}, or {"curve": [[x, ${kind}], ...], "over": "time" or "position"}`;
  return either(says, [quantity(kind, unit), overTimeFields, overPosition], (value) => {
    if (!isObject(value)) return 0;
    return own(value, 'over') === 'time' ? 1 : 2;
  });
}

const onPin = record(
  'a drive on a pin',
  {
    id: idEntry,
    name: nameEntry,
    on: required(ref('pin', 'slide'), 'The pin or slide it drives.'),
    torque: optional(effort('torque', 'N m', 'angle'), 'Torque on the first part.'),
    speed: optional(overTime('spin', 'rpm'), 'Speed held, of the first part relative to the second.'),
    limit: optional(quantity('torque', 'N m', { above: 0 }), 'Greatest torque with which a speed is held.'),
    motor: optional(
      record('a motor', {
        stallTorque: required(quantity('torque', 'N m', { above: 0 }), 'Torque at standstill.'),
        noLoadSpeed: required(quantity('spin', 'rpm', { notZero: true }), 'Speed at which the torque is nil.'),
      }),
      'Straight line from stall torque to no-load speed; it goes on beyond both ends.',
    ),
    ...shared,
  },
  { alternatives: [{ groups: [['torque'], ['speed'], ['motor']] }] },
);
const onSlide = record(
  'a drive on a slide',
  {
    id: idEntry,
    name: nameEntry,
    on: required(ref('pin', 'slide'), 'The pin or slide it drives.'),
    force: optional(effort('force', 'N', 'length'), 'Force on the first part, along the axis.'),
    speed: optional(overTime('speed', 'm/s'), 'Speed held, of the first part relative to the second.'),
    limit: optional(quantity('force', 'N', { above: 0 }), 'Greatest force with which a speed is held.'),
    ...shared,
  },
  { alternatives: [{ groups: [['force'], ['speed']] }] },
);

/** Field table of a drive: what it may be depends on the kind of joint it is on. */
export const driveFields = either('a drive', [onPin, onSlide], (value, reading) => {
  if (!isObject(value)) return -1;
  const joint = own(value, 'on');
  const kind = typeof joint === 'string' ? reading?.ids.get(joint)?.kind : undefined;
  return kind === 'slide' || (kind !== 'pin' && Object.hasOwn(value, 'force')) ? 1 : 0;
});

export type DriveDocument = Read<typeof driveFields>;
