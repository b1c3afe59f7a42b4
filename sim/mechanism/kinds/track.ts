import type { Vec } from '../../core/vec.js';

/** One drawn piece of a track, from the end of the one before it. */
export type TrackSegment = { name?: string } & (
  | { kind: 'line'; to: Vec }
  | { kind: 'arc'; to: Vec; bulge: number }
  | { kind: 'spline'; through: Vec[] }
);

/** A value in time: constant, or piecewise linear through [time, value] pairs (held beyond its ends). */
export type Curve = number | Vec[];

/** A fixed profile. `segments` includes the closing line of a closed track. */
export interface Track {
  id: string;
  from: Vec;
  segments: TrackSegment[];
  closed: boolean;
  side: 'left' | 'right' | 'both';
  /** Speed of the surface along the path [m/s]; 0 for a still track. */
  surfaceSpeed: Curve;
  material?: string;
}
