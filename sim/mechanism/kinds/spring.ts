import type { Vec } from '../../core/vec.js';
import {
  number,
  optional,
  pair,
  quantity,
  record,
  ref,
  required,
  table,
  tagged,
  withDefault,
  type Read,
} from '../fields/spec.js';
import { acts, idEntry, nameEntry, pointOn } from './common.js';
import type { PointOn } from './joint.js';

export interface WireData {
  diameter: number;
  meanDiameter: number;
  activeCoils: number;
  shearModulus: number;
}

/** Force along the line of its ends; deflection = length − freeLength; positive force pulls the ends together. */
export interface LinearSpring {
  kind: 'linear';
  id: string;
  between: [PointOn, PointOn];
  /** [N/m]; the slope at the free length where `curve` is given. */
  rate: number;
  freeLength: number;
  acts: 'both' | 'compression' | 'extension';
  /** [[deflection m, force N], ...] in place of the rate; strictly increasing deflection. */
  curve?: Vec[];
  wire?: WireData;
  solidLength?: number;
  initialTension?: number;
}
/** Torque on the first body = −rate × (angle − freeAngle), angle of the first relative to the second, from drawn. */
export interface TorsionSpring {
  kind: 'torsion';
  id: string;
  between: [string, string];
  rate: number;
  freeAngle: number;
}
export interface GasSpring {
  kind: 'gas';
  id: string;
  between: [PointOn, PointOn];
  force: number;
  stroke: number;
  ratio: number;
}
export type Spring = LinearSpring | TorsionSpring | GasSpring;

const wire = record('wire data', {
  diameter: required(quantity('length', 'mm', { above: 0 }), 'Diameter of the wire, d.'),
  meanDiameter: required(quantity('length', 'mm', { above: 0 }), 'Mean diameter of the coil, D.'),
  activeCoils: required(number({ above: 0 }), 'Number of active coils, n.'),
  shearModulus: required(quantity('stress', 'MPa', { above: 0 }), 'Shear modulus of the wire, G.'),
});

const points = required(pair(pointOn), 'The points its ends are fixed to.');

/** Field tables of the springs. */
export const springFields = tagged('a spring', 'kind', {
  linear: record(
    'a linear spring',
    {
      id: idEntry,
      name: nameEntry,
      between: points,
      rate: optional(quantity('rate', 'N/mm', { above: 0 }), 'Force over deflection; or give wire, or curve.'),
      wire: optional(wire, 'Rate by EN 13906-1 from the wire: G d^4 / (8 D^3 n).'),
      curve: optional(table('length', 'force'), 'Pairs of deflection and force; the last slope goes on.'),
      freeLength: optional(quantity('length', 'mm', { atLeast: 0 }), 'Relaxed length; default: as drawn.'),
      acts: acts('acts both ways'),
      solidLength: optional(quantity('length', 'mm', { above: 0 }), 'Length with all coils touching.'),
      initialTension: optional(quantity('force', 'N', { atLeast: 0 }), 'Of an extension spring, wound in.'),
    },
    { alternatives: [{ groups: [['rate'], ['wire'], ['curve']] }] },
  ),
  torsion: record('a torsion spring', {
    id: idEntry,
    name: nameEntry,
    between: required(pair(ref('body', 'ground')), 'The two parts; the torque given is that on the first.'),
    rate: required(quantity('torsionRate', 'N m/rad', { above: 0 }), 'Torque over angle.'),
    freeAngle: withDefault(
      quantity('angle', 'deg'),
      0,
      'relaxed as drawn',
      'Angle of the first part relative to the second, from drawn, where the torque is nil.',
    ),
  }),
  gas: record('a gas spring', {
    id: idEntry,
    name: nameEntry,
    between: points,
    force: required(quantity('force', 'N', { above: 0 }), 'Force at full extension.'),
    stroke: required(quantity('length', 'mm', { above: 0 }), 'Travel from full extension to full compression.'),
    ratio: required(number({ atLeast: 1 }), 'Force at full compression over force at full extension.'),
  }),
});

export type SpringDocument = Read<typeof springFields>;
