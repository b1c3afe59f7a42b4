import type { AxisRow } from './axis-row.js';
import type { Pair } from './contact/pair.js';
import type { Touch } from './contact/touch.js';
import type { Stop } from './element.js';

/** A pair or a stop that was struck, for the run's events. */
export interface Strike {
  pair?: Pair;
  stop?: Stop;
  x: number;
  y: number;
  approachSpeed: number;
  effectiveMass: number;
  /** Rows of its points, for the effective mass through the joints. */
  rows?: AxisRow[];
}

/** A closed point that approaches. */
export interface Struck {
  touch: Touch;
  point: 0 | 1;
  approach: number;
}
