import type { Vec } from '../../core/vec.js';
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
