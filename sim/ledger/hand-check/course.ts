import type { Vec } from '../../core/vec.js';
import type { Pin, Slide } from '../../mechanism/kinds/joint.js';
import type { Pose } from '../../recording/index.js';

/** How the motion at one place of a course goes with its coordinate q: dr/dq, d²r/dq² of the centre of mass, dθ/dq. */
export interface Rate {
  tangent: Vec;
  bend: Vec;
  turn: number;
}

/** Coulomb friction of a contact or a guide: how much of the weight presses on it, and which way its surface runs. */
export interface Rub {
  /** The pair, or the joint. */
  of: string[];
  coefficient: number;
  /** Where it is booked: a track's segment by its name, a body by its id. */
  on: string;
  /** Bodies whose weight presses on it. */
  carried: string[];
  /** +1 where a faster surface carries the body along, −1 where it is held back. */
  sense: 1 | -1;
  normal: (q: number) => Vec;
  /** Of a rolling disc [m]; its friction does no work, its rolling resistance does. */
  rolling?: { radius: number; lever: number };
}

/**
 * A stretch that one coordinate describes, q from 0 to `length`: a distance of the centre of mass [m], or an angle about
 * a fixed pin [rad]. T = ½ M q̇² with a constant M.
 */
export interface Course {
  kind: 'line' | 'track' | 'pin';
  /** Bodies that move as one; the one asked for first. */
  members: string[];
  length: number;
  /** M: a mass [kg], or a moment of inertia about the pin [kg m²]. */
  measure: number;
  /** Added to the mass by rolling, I / r² [kg]. */
  rollingMass: number;
  pose: (body: string, q: number) => Pose;
  rate: (q: number) => Rate;
  /** +1 where q runs with a joint's own sense. */
  sense: 1 | -1;
  rubs: Rub[];
  joints: (Pin | Slide)[];
  /** Slope of the line that forces are constant on [rad]; nothing on a curve. */
  slope?: number;
}

/** How a leg is gone through, where it is not along a course of one coordinate. */
export type Passage =
  | { kind: 'courses'; courses: Course[] }
  /** Nothing moves. */
  | { kind: 'still' }
  /** Too short to matter. */
  | { kind: 'none' }
  /** Carried by a belt at its speed [m/s]. */
  | { kind: 'carried'; speed: number; on: string }
  /** Nothing touches it: gravity alone works. */
  | { kind: 'flight'; from: Pose; to: Pose };
