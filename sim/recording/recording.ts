import type { Vec } from '../core/vec.js';

/** Names of accounts, as the result contract has them. */
export type AccountName =
  | 'gravity'
  | 'spring'
  | 'friction'
  | 'reaction'
  | 'damper'
  | 'load'
  | 'drive'
  | 'joint-friction'
  | 'rolling-resistance'
  | 'impact'
  | 'rope'
  | 'numerical';

/** What the method itself made or lost, by where it arises. */
export type NumericalCause =
  'force-truncation' | 'solver-residual' | 'velocity-projection' | 'position-projection' | 'clamp';

/**
 * One account of a run. Its columns are *cumulative* from the start of the run, so the ledger between any two rows is a
 * difference and any boundary can be drawn without a new run.
 */
export interface AccountSpec {
  account: AccountName;
  /** The element or pair it belongs to; a body's id for gravity; nothing for `numerical`. */
  of: string | [string, string] | null;
  cause?: NumericalCause;
  /** Bodies it can do work on; `columns.work` has one column for each, in this order [J]. */
  bodies: string[];
  columns: {
    /** Work done on each of `bodies` so far [J]. */
    work: number[];
    /** Lost at the interface so far (slip, damping, impact), positive [J]. Absent where nothing can be lost. */
    heat?: number;
    /** Energy stored now [J] (gravity, spring, compliant contact); work so far = −(stored − stored at the start). */
    stored?: number;
    /** Energy the drive took in so far [J], where it has an efficiency. */
    input?: number;
  };
}

/** Columns of one body: centre of mass [m], angle unwrapped [rad], velocity [m/s], spin [rad/s]. */
export interface BodySpec {
  id: string;
  mass: number;
  inertia: number;
  columns: { x: number; y: number; angle: number; vx: number; vy: number; spin: number };
}

/** Columns of one contact pair. */
export interface ContactSpec {
  between: [string, string];
  columns: {
    /** Number of closed points (0: apart). */
    points: number;
    /** Sum of the normal forces of its points [N]; of an impact row nothing (impulses are no forces). */
    normal: number;
    /** Friction force on the first of the pair, along its tangent [N]. */
    friction: number;
    /** Sliding velocity of the first relative to the second's surface, along the tangent [m/s]. */
    slip: number;
    /** Where it acts on the sheet [m] (force-weighted mean of its points; the last place when apart). */
    x: number;
    y: number;
    /** Unit normal, from the second towards the first. */
    nx: number;
    ny: number;
    /** Index of the track's segment it is on; −1 for body–body. */
    segment: number;
  };
}

/** Reaction of a joint on its first body [N], [N m], at its point [m]; turn [rad] or travel [m] from drawn. */
export interface JointSpec {
  id: string;
  columns: { fx: number; fy: number; torque: number; x: number; y: number; position: number };
}

/** One end of a spring or damper. `of` is a body's id or 'ground'. */
export interface LinkEnd {
  of: string;
  at?: Vec;
}

/** Deflection [m] or [rad] and force [N] or torque [N m] of a spring or damper (positive pulls its ends together). */
export interface LinkSpec {
  id: string;
  /** What its ends are fixed to: a point [m], as drawn at the first row, or a part alone where it acts on angles. */
  ends: [LinkEnd, LinkEnd];
  columns: { deflection: number; force: number };
}

export interface RecordingLayout {
  /** Column 0 is always time [s]. */
  width: number;
  bodies: BodySpec[];
  accounts: AccountSpec[];
  contacts: ContactSpec[];
  joints: JointSpec[];
  springs: LinkSpec[];
  dampers: LinkSpec[];
}

/** Something that happened, at a row. An impact has two rows at one time: `row` is the one before it, `row + 1` after. */
export type RunEvent = { time: number; row: number } & (
  | { kind: 'touch'; pair: [string, string]; at: Vec; approachSpeed: number; effectiveMass: number }
  | { kind: 'parts' | 'sticks' | 'slips'; pair: [string, string]; at: Vec }
  | { kind: 'limit'; joint: string; approachSpeed: number; effectiveMass: number }
  | { kind: 'release'; latch: string }
  | { kind: 'station'; station: string; touch?: { approachSpeed: number; effectiveMass: number } }
);

/** A finding of a run or a comparison, as the result contract prints it. */
export interface Finding {
  severity: 'error' | 'warning' | 'note';
  code: string;
  text: string;
  of: string[];
  /** [s] */
  at?: number;
}

/** A solver's own estimate of its error at a station: of the time [s], and the greatest of any body [m], [m/s]. */
export interface StationError {
  station: string;
  time: number;
  position: number;
  speed: number;
}

/** How a run ended. */
export type RunEnd =
  | 'reachedEnd'
  | 'stepTooSmall'
  | 'maxSteps'
  | 'nonFinite'
  | 'noSolution'
  | 'eventsAccumulate'
  | 'timeBudget'
  | 'cancelled'
  | 'notSimulated';

/**
 * A recorded run. `rows` holds `rowCount × layout.width` numbers, row-major; rows are in order of time. Rows may be
 * thinner than the solver's steps; since account columns are cumulative, nothing is lost by that. Every station that was
 * reached, and both sides of every impact, are rows.
 */
export interface Recording {
  solver: 'stepper' | 'auditor';
  layout: RecordingLayout;
  rows: Float64Array;
  rowCount: number;
  events: RunEvent[];
  findings: Finding[];
  end: RunEnd;
  /** Step used [s] (stepper). */
  step?: number;
  /** Its own estimate of its errors (auditor). */
  errors?: StationError[];
  /** Work counters, for benchmarks and the curious. */
  counters: Record<string, number>;
}
