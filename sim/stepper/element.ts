import type { AxisRow } from './axis-row.js';

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
}

/** Dry friction other than that of planck's contacts: of joints, of rolling, of compliant contacts. */
export interface Friction {
  /** Sign of the sliding; 0 while it sticks. */
  sliding: 1 | -1 | 0;
  /** Indices of its parts, and the row its impulse acts along (on B, against it on A). */
  readonly a: number;
  readonly b: number;
  readonly row: AxisRow;
  /** Its static and kinetic coefficients differ. */
  readonly drops: boolean;
  /** It sticks, with friction to spare, by the last solve. */
  isHolding(): boolean;
  /** Sliding rate with the velocities now in planck's bodies, against a surface as it runs at an engine time. */
  slip(time: number): number;
  /** The way it breaks loose when the last solve reached its bound, else 0. */
  breakaway(): 1 | -1 | 0;
  /** Readies `hold` at the present configuration. */
  aim(): void;
  /** Brings the sliding rate to nil, without bound. */
  hold(): void;
}

/** A one-sided hard stop of a joint. */
export interface Stop {
  isClosed: boolean;
  /** Its gap at the start of the step. */
  gapAtStart: number;
  readonly restitution: number;
  readonly row: AxisRow;
  readonly joint: string;
  readonly a: number;
  readonly b: number;
  /** Distance or angle left before it, at the bodies' present transforms; negative beyond. */
  gap(): number;
  /** Aims the row at the present configuration, so that its rate is that of `gap`. */
  aim(): void;
  bookImpact(onA: number, onB: number): void;
  bookStep(): void;
}
