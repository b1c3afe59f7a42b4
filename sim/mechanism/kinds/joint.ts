import type { Vec } from '../../core/vec.js';
import {
  direction,
  list,
  number,
  optional,
  pair,
  position,
  quantity,
  record,
  ref,
  required,
  tagged,
  withDefault,
  type Read,
} from '../fields/spec.js';
import { idEntry, nameEntry, pointOn } from './common.js';

/** Hard stops of a pin [rad] or slide [m], from drawn; Newton restitution at the stop. */
export interface JointLimits {
  from: number;
  to: number;
  restitution: number;
}

/** Friction of a pin: by coefficient and journal radius [m], or a constant torque [N m]. */
export type PinFriction =
  { kind: 'coefficient'; coefficient: number; radius: number } | { kind: 'torque'; torque: number };
/** Friction of a slide: by coefficient on the transverse reaction, or a constant force [N]. */
export type SlideFriction = { kind: 'coefficient'; coefficient: number } | { kind: 'force'; force: number };

interface JointBase {
  id: string;
  /** Body ids or 'ground'. Angles and distances are of the first relative to the second, from drawn. */
  between: [string, string];
}
export interface Pin extends JointBase {
  kind: 'pin';
  at: Vec;
  friction?: PinFriction;
  limits?: JointLimits;
}
export interface Slide extends JointBase {
  kind: 'slide';
  at: Vec;
  /** Unit vector on the sheet as drawn, fixed in the second body. */
  axis: Vec;
  friction?: SlideFriction;
  limits?: JointLimits;
}
export interface Weld extends JointBase {
  kind: 'weld';
}
export interface Rope extends JointBase {
  kind: 'rope';
  /** Points it passes, ends first and last, each fixed to its part. */
  through: PointOn[];
  length: number;
}
export interface Gear {
  id: string;
  kind: 'gear';
  joints: [string, string];
  ratio: number;
  efficiency: number;
}
export interface Rack {
  id: string;
  kind: 'rack';
  pin: string;
  slide: string;
  radius: number;
  efficiency: number;
}
export interface Screw {
  id: string;
  kind: 'screw';
  pin: string;
  slide: string;
  lead: number;
  friction: number;
}
export type Joint = Pin | Slide | Weld | Rope | Gear | Rack | Screw;

/** A point fixed to a part, given on the sheet as drawn at time zero [m]. `of` is a body id or 'ground'. */
export interface PointOn {
  of: string;
  at: Vec;
}

const ends = required(pair(ref('body', 'ground')), 'The two parts; angles and distances are of the first.');
const restitution = withDefault(number({ atLeast: 0, atMost: 1 }), 0, 'the stop does not rebound', 'At the stops.');
const share = number({ above: 0, atMost: 1 });
const efficiency = withDefault(share, 1, 'nothing is lost in it', 'Power out over power in.');

const pinLimits = record('limits of a pin', {
  from: required(quantity('angle', 'deg'), 'Least angle from drawn.'),
  to: required(quantity('angle', 'deg'), 'Greatest angle from drawn.'),
  restitution,
});
const slideLimits = record('limits of a slide', {
  from: required(quantity('length', 'mm'), 'Least distance from drawn.'),
  to: required(quantity('length', 'mm'), 'Greatest distance from drawn.'),
  restitution,
});
const pinFriction = record(
  'friction of a pin',
  {
    coefficient: optional(number({ atLeast: 0 }), 'Coefficient at the journal.'),
    radius: optional(quantity('length', 'mm', { above: 0 }), 'Radius of the journal.'),
    torque: optional(quantity('torque', 'N m', { atLeast: 0 }), 'A friction torque that does not depend on load.'),
  },
  { alternatives: [{ groups: [['coefficient', 'radius'], ['torque']] }] },
);
const slideFriction = record(
  'friction of a slide',
  {
    coefficient: optional(number({ atLeast: 0 }), 'Coefficient in the guide.'),
    force: optional(quantity('force', 'N', { atLeast: 0 }), 'A friction force that does not depend on load.'),
  },
  { alternatives: [{ groups: [['coefficient'], ['force']] }] },
);

/** Field tables of the joints. */
export const jointFields = tagged('a joint', 'kind', {
  pin: record('a pin', {
    id: idEntry,
    name: nameEntry,
    between: ends,
    at: required(position, 'Where the pin is on the sheet.'),
    friction: optional(pinFriction, 'Friction in the bearing; none otherwise.'),
    limits: optional(pinLimits, 'Hard stops; none otherwise.'),
  }),
  slide: record('a slide', {
    id: idEntry,
    name: nameEntry,
    between: ends,
    at: required(position, 'A point of the slide on the sheet.'),
    axis: required(direction, 'Direction of travel on the sheet, fixed in the second part.'),
    friction: optional(slideFriction, 'Friction in the guide; none otherwise.'),
    limits: optional(slideLimits, 'Hard stops; none otherwise.'),
  }),
  weld: record('a weld', { id: idEntry, name: nameEntry, between: ends }),
  rope: record('a rope', {
    id: idEntry,
    name: nameEntry,
    between: optional(pair(ref('body', 'ground')), 'The parts at its ends; default: those of its end points.'),
    through: required(list(pointOn, 2), 'The points it passes, ends first and last; pulleys are frictionless.'),
    length: optional(quantity('length', 'mm', { above: 0 }), 'Length; default: as drawn, taut.'),
  }),
  gear: record('a gear pair', {
    id: idEntry,
    name: nameEntry,
    joints: required(pair(ref('pin')), 'The two pins the gears turn on.'),
    ratio: required(number({ notZero: true }), 'Turn of the second over turn of the first; negative if external.'),
    efficiency,
  }),
  rack: record('a rack', {
    id: idEntry,
    name: nameEntry,
    pin: required(ref('pin'), 'What the pinion turns on.'),
    slide: required(ref('slide'), 'What the rack travels on.'),
    radius: required(quantity('length', 'mm', { notZero: true }), 'Travel over counter-clockwise turn.'),
    efficiency,
  }),
  screw: record('a screw', {
    id: idEntry,
    name: nameEntry,
    pin: required(ref('pin'), 'What the screw turns on.'),
    slide: required(ref('slide'), 'What the nut travels on.'),
    lead: required(quantity('length', 'mm', { notZero: true }), 'Travel of one turn.'),
    friction: withDefault(number({ atLeast: 0 }), 0, 'the thread has no friction', 'Coefficient in the thread.'),
  }),
});

export type JointDocument = Read<typeof jointFields>;
