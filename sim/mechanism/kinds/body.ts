import {
  optional,
  position,
  quantity,
  record,
  ref,
  required,
  text,
  vector,
  withDefault,
  type Read,
} from '../fields/spec.js';
import { idEntry, nameEntry } from './common.js';
import { shapeFields } from './shape.js';
import type { Vec } from '../../core/vec.js';

/** Shape of a body in body coordinates [m]; the origin is the body's own (disc and box centre, bar middle). */
export type Shape =
  | { kind: 'particle' }
  | { kind: 'disc'; radius: number }
  | { kind: 'box'; width: number; height: number }
  | { kind: 'bar'; length: number; width: number }
  /** Counter-clockwise, whichever way it was typed. */
  | { kind: 'polygon'; points: Vec[] }
  | CamShape
  | { kind: 'none' };

export interface CamShape {
  kind: 'cam';
  baseRadius: number;
  segments: CamSegment[];
  turns: 'counterclockwise' | 'clockwise';
  follower: CamFollower;
}

export type CamLaw =
  'parabolic' | 'harmonic' | 'cycloidal' | '3-4-5' | '4-5-6-7' | 'modified-trapezoid' | 'modified-sine' | 'table';

/** One segment of a cam's turn: `lift` [m] (positive rise, negative fall, 0 dwell; or [rad] for a swinging follower). */
export interface CamSegment {
  lift: number;
  over: number;
  law: CamLaw | 'dwell';
  table?: Vec[];
}

/** `along` (a unit vector) and `pivot` [m] are in body coordinates, as drawn. */
export interface CamFollower {
  kind: 'roller' | 'flat' | 'knife';
  radius: number;
  offset: number;
  along: Vec;
  pivot?: Vec;
  arm?: number;
}

/** A rigid body as the solvers take it: everything in SI, every default applied. */
export interface Body {
  id: string;
  name: string;
  shape: Shape;
  /** [kg], positive. */
  mass: number;
  /** About the centre of mass [kg m²]; 0 for a particle (it does not turn). */
  inertia: number;
  /** In body coordinates [m]. */
  centerOfMass: Vec;
  /** Sheet position of the body's origin [m] (already resolved from `rest` where that was given). */
  at: Vec;
  /** [rad] */
  angle: number;
  /** Of the centre of mass [m/s]. */
  velocity: Vec;
  /** [rad/s] */
  spin: number;
  material?: string;
  /** The track it was laid on, where the document said `rest`. */
  rest?: { on: string; at: number };
}

/** Field table of a body. */
export const bodyFields = record(
  'a body',
  {
    id: idEntry,
    name: nameEntry,
    shape: required(shapeFields, 'Its outline in body coordinates.'),
    mass: optional(quantity('mass', 'kg', { above: 0 }), 'Mass; or give density and thickness.'),
    density: optional(quantity('density', 'kg/m^3', { above: 0 }), 'Density, with thickness in place of mass.'),
    thickness: optional(quantity('length', 'mm', { above: 0 }), 'Thickness of the plate it is cut from.'),
    inertia: optional(
      quantity('inertia', 'kg m^2', { above: 0 }),
      'Moment of inertia about the centre of mass; default: from shape and mass, of uniform density.',
    ),
    centerOfMass: optional(position, "Centre of mass in body coordinates; default: the shape's centroid."),
    at: optional(position, "Sheet position of the body's origin; or give rest."),
    angle: optional(quantity('angle', 'deg'), 'Angle on the sheet, counter-clockwise; default 0.'),
    rest: optional(
      record('a place on a track', {
        on: required(ref('track'), 'The track it is laid on, square to it, on its free side.'),
        at: required(quantity('length', 'mm', { atLeast: 0 }), 'Distance along the track.'),
      }),
      'In place of at and angle: laid on a track.',
    ),
    velocity: withDefault(
      vector('speed', 'm/s'),
      ['0 m/s', '0 m/s'],
      'starts at rest',
      'Velocity of the centre of mass.',
    ),
    spin: withDefault(quantity('spin', 'rpm'), '0 rpm', 'starts at rest', 'Speed of rotation, counter-clockwise.'),
    material: optional(text, 'Name in the table of materials.'),
  },
  {
    alternatives: [
      { groups: [['mass'], ['density', 'thickness']] },
      { groups: [['at'], ['rest']] },
      { groups: [['angle'], ['rest']], optional: true },
    ],
  },
);

export type BodyDocument = Read<typeof bodyFields>;
