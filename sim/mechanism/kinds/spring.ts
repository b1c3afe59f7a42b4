import type { Vec } from '../../core/vec.js';
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
