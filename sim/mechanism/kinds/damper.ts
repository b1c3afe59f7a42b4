import type { PointOn } from './joint.js';

/** Force (or torque) = −coefficient × |speed|^exponent × sign(speed) along the line of its ends. */
export type Damper = {
  id: string;
  coefficient: number;
  exponent: number;
  acts: 'both' | 'compression' | 'extension';
} & ({ kind: 'linear'; between: [PointOn, PointOn] } | { kind: 'rotary'; between: [string, string] });
