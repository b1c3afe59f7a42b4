import type { Vec } from '../../core/vec.js';

/** Shape of a body in body coordinates [m]; the origin is the body's own (disc and box centre, bar middle). */
export type Shape =
  | { kind: 'particle' }
  | { kind: 'disc'; radius: number }
  | { kind: 'box'; width: number; height: number }
  | { kind: 'bar'; length: number; width: number }
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
  | 'parabolic'
  | 'harmonic'
  | 'cycloidal'
  | '3-4-5'
  | '4-5-6-7'
  | 'modified-trapezoid'
  | 'modified-sine'
  | 'table';

/** One segment of a cam's turn: `lift` [m] (positive rise, negative fall, 0 dwell; or [rad] for a swinging follower). */
export interface CamSegment {
  lift: number;
  over: number;
  law: CamLaw | 'dwell';
  table?: Vec[];
}

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
