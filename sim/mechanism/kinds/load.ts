import type { Vec } from '../../core/vec.js';
import type { PointOn } from './joint.js';

/** A moment in a run: a time [s] or a station id. */
export type Moment = { time: number } | { station: string };

export type Load = { id: string; from?: Moment; until?: Moment } & (
  | { kind: 'force'; on: PointOn; force: Vec; follows: 'sheet' | 'body' }
  | { kind: 'torque'; on: string; torque: number }
);
