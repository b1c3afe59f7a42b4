import type { Vec } from '../../core/vec.js';

/** Hard stops of a pin [rad] or slide [m], from drawn; Newton restitution at the stop. */
export interface JointLimits {
  from: number;
  to: number;
  restitution: number;
}

/** Friction of a pin: by coefficient and journal radius [m], or a constant torque [N m]. */
export type PinFriction = { kind: 'coefficient'; coefficient: number; radius: number } | { kind: 'torque'; torque: number };
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
