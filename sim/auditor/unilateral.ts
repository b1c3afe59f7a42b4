import type { Account } from './ledgers.js';
import type { Pair } from './contact/pair.js';
import { Row } from './row.js';

/**
 * One thing that can hold one way only: a possible contact point, a rope, a joint's stop. It is open (its gap is free to
 * change) or closed (its gap stays nil, by a force that only pushes).
 */
export abstract class Unilateral {
  isClosed = false;
  /** Positive when open; valid after `locate`. */
  gap = Infinity;
  /** The gap is real here: not beyond an end, not behind a surface. */
  isValid = true;
  readonly normal = new Row();
  /** Force (or impulse) of the last solve. */
  lambda = 0;
  /** Offset of a gap that was not quite nil when it opened, so that rounding is no new touch. */
  slack = 0;
  abstract readonly restitution: number;
  abstract readonly restSpeed: number;
  /** Bodies it can act on. */
  abstract readonly bodies: readonly number[];

  /** Works out the gap at a configuration. */
  abstract locate(q: Float64Array): void;
  /** Works out `normal` (and what else the kind has) at a state; after `locate`. */
  abstract aim(q: Float64Array, v: Float64Array, t: number): void;
  /** Account that its force's work goes to, and the one for its impacts. */
  abstract readonly account: Account;
  abstract readonly impactAccount: Account;

  rate(v: Float64Array): number {
    return this.normal.rate(v);
  }
}

/** A contact point: a unilateral with a surface, so with friction. */
export abstract class ContactPoint extends Unilateral {
  readonly tangent = new Row();
  /** What the surface itself moves at along the tangent (a belt), and how fast that changes. */
  surfaceSpeed = 0;
  surfaceChange = 0;
  /** Normal from A to B, and place on the sheet. */
  nx = 0;
  ny = 1;
  x = 0;
  y = 0;
  segment = -1;
  /** A body came to be behind its surface: nothing is solid there until it is in front again. */
  isArmed = true;
  abstract pair: Pair;
  abstract readonly bodyA: number;
  abstract readonly bodyB: number;

  get restitution(): number {
    return this.pair.restitution;
  }
  get restSpeed(): number {
    return this.pair.restSpeed;
  }
  get bodies(): readonly number[] {
    return [this.bodyA, this.bodyB];
  }
  get account(): Account {
    return this.pair.reaction;
  }
  get impactAccount(): Account {
    return this.pair.impact;
  }

  /** Sliding rate of B on A's surface. */
  slip(v: Float64Array): number {
    return this.tangent.rate(v) - this.surfaceSpeed;
  }

  /**
   * How far it is to the next place where the surface's law changes (another piece, another track, a corner), negative
   * beyond, seen from where `mark` was last called. The integration must be begun anew there.
   */
  abstract seam(): number;
  /**
   * Takes the present place as where seams are seen from. A closed point keeps to the law of that place (its piece of
   * track, its face), continued beyond its ends, until it is marked anew: within a step the law is then smooth.
   */
  abstract mark(q: Float64Array, v: Float64Array): void;
}
