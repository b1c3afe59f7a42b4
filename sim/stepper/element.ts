/**
 * What an element of the mechanism does in a step. The step is the midpoint rule: all of it is evaluated at the mid-step
 * configuration, impulses act over half the step, and the rest of the step mirrors them (v⁺ = 2v̄ − v⁻). The work of a
 * full step's impulse J = 2·(half impulse) is then exactly J·v̄ at its point.
 */
export interface Element {
  /** Adds half a step's impulse of its force to the velocities (the mid-step configuration is set). */
  push?(half: number): void;
  /** Readies a constraint row at mid-step; `ratio` scales last step's impulse for a warm start. */
  prepare?(half: number, ratio: number): void;
  /** One sweep of the iteration. */
  solve?(): void;
  /** Books the step, while v̄ is still in planck's bodies and the mid-step configuration in force. */
  book?(half: number): void;
  /** The bodies have arrived at the step's end: books stored energy and what the rule missed of it. */
  arrive?(): void;
  /** The bodies were moved onto their constraints: books the change of stored energy as numerical. */
  project?(): void;
  /** Friction of its own, which can stop sliding within a step. */
  friction?: Friction;
  /** Hard stops of its own. */
  stops?: readonly Stop[];
}

/** Dry friction of a joint or of rolling, as the event finder sees it. */
export interface Friction {
  /** Sign of the sliding; 0 while it sticks. */
  sliding: 1 | -1 | 0;
  /** Sliding rate with the velocities now in planck's bodies. */
  slip(): number;
  /** Holds the rate at zero, without bound (used to bring a sticking joint exactly to rest). */
  hold(): void;
  /** Readies `hold` at the present configuration. */
  aim(): void;
  /** Impulse of `hold`, for the books. */
  readonly rows: readonly HeldRow[];
}

/** A row whose impulse can be booked: on B along its axis, on A against it. */
export interface HeldRow {
  impulse: number;
  rateA(): number;
  rateB(): number;
}

/** A one-sided hard stop of a joint. */
export interface Stop {
  /** Distance or angle left before it, at the bodies' present transforms; negative beyond. */
  gap(): number;
  isClosed: boolean;
  /** Its gap at the start of the step. */
  gapAtStart: number;
  readonly restitution: number;
  readonly row: {
    impulse: number;
    mass: number;
    rate(): number;
    rateA(): number;
    rateB(): number;
    start(impulse: number): void;
    solve(target: number, least: number, most: number): void;
  };
  /** Aims the row at the present configuration, so that its rate is that of `gap`. */
  aim(): void;
  readonly joint: string;
  /** Indices of its parts, and where its impact work is booked. */
  readonly a: number;
  readonly b: number;
  bookImpact(onA: number, onB: number): void;
  bookStep(half: number): void;
}
