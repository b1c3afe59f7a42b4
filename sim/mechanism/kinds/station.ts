import type { Vec } from '../../core/vec.js';
import type { PointOn } from './joint.js';

export type StationWhen =
  | { kind: 'start' }
  | { kind: 'end' }
  | { kind: 'time'; time: number }
  | { kind: 'touch'; pair: [string, string]; count: number }
  | { kind: 'parts'; pair: [string, string]; count: number }
  | { kind: 'sticks'; pair: [string, string]; count: number }
  | { kind: 'slips'; pair: [string, string]; count: number }
  | { kind: 'crosses'; point: PointOn; line: [Vec, Vec]; count: number }
  | { kind: 'turns'; of: string; along: Vec; count: number }
  | { kind: 'angle'; of: string; passes: number; count: number }
  | { kind: 'rests'; of: string };

/** A marked instant. `of` in `turns` and `angle` is a body id; `rests` takes a body id or 'all'. */
export interface Station {
  id: string;
  when: StationWhen;
  after?: string;
}
