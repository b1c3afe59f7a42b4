import type { Account } from './ledgers.js';
import type { Row } from './row.js';

/** A force of known size along a row, and the account of its work. */
export interface Force {
  row: Row;
  /** Size, at the last `update`; on the row's positive side. */
  size: number;
  account: Account;
  /** All its (negative) power is lost as heat. */
  isLossy: boolean;
  /** Power taken in per power given out (drives), 0 where none is booked. */
  inputRatio: number;
  update(q: Float64Array, v: Float64Array, t: number): void;
}

/** Constraints that hold both ways: the joint's positions are off by `errors`, its rows' rates by J·v − `speeds`. */
export interface Bilateral {
  id: string;
  rows: Row[];
  errors: Float64Array;
  /** Rate each row is held at (nil but for drives), and how fast that changes. */
  speeds: Float64Array;
  changes: Float64Array;
  /** Forces of the last solve. */
  lambda: Float64Array;
  account: Account;
  isReleased: boolean;
  update(q: Float64Array, v: Float64Array, t: number): void;
}

/** Dry friction on one rate (a pin's turn, a slide's travel, rolling): sticks, or slides with a bounded force. */
export interface DryFriction {
  row: Row;
  /** 0: sticks; ±1: slides that way. */
  sliding: 1 | -1 | 0;
  isActive: boolean;
  account: Account;
  lambda: number;
  /** Greatest force now, by the reactions of the last solve. */
  bound(): number;
  update(q: Float64Array, v: Float64Array): void;
}

/** A stored energy: what the recorder shows beside the work. */
export interface Store {
  account: Account;
  energy(q: Float64Array): number;
}

/** Deflection (length or angle) and force of a spring or damper, for the recorder. */
export interface Link {
  id: string;
  read(q: Float64Array, v: Float64Array): { deflection: number; force: number };
}
