import type { AccountRequest } from '../recording/layout.js';
import type { AccountName, NumericalCause } from '../recording/recording.js';

/**
 * The books of a run in engine units: one compensated sum (Neumaier 1974) for each body of each account, and one for its
 * heat. Sums over many thousand steps then stay good to the last digits, which the closure of the ledger needs.
 */
export class Books {
  readonly accounts: AccountRequest[] = [];
  private readonly slots: BookedAccount[] = [];

  open(
    account: AccountName,
    of: AccountRequest['of'],
    bodies: string[],
    options: { heat?: boolean; stored?: boolean; input?: boolean; cause?: NumericalCause } = {},
  ): BookedAccount {
    const { cause, ...columns } = options;
    this.accounts.push({ account, of, bodies, ...columns, ...(cause ? { cause } : {}) });
    const booked = new BookedAccount(bodies.length);
    this.slots.push(booked);
    return booked;
  }

  get booked(): readonly BookedAccount[] {
    return this.slots;
  }
}

/** Running sums of one account [engine energy]. */
export class BookedAccount {
  private readonly sums: Float64Array;
  private readonly rests: Float64Array;
  /** Set by elements whose energy is stored: the energy now. */
  stored = 0;
  input = 0;

  constructor(bodies: number) {
    this.sums = new Float64Array(bodies + 1);
    this.rests = new Float64Array(bodies + 1);
  }

  /** Work on the account's body number `slot`. */
  work(slot: number, value: number): void {
    const { sums, rests } = this;
    const before = sums[slot];
    const after = before + value;
    rests[slot] += Math.abs(before) >= Math.abs(value) ? before - after + value : value - after + before;
    sums[slot] = after;
  }

  /** Lost at the interface, positive. */
  heat(value: number): void {
    this.work(this.sums.length - 1, value);
  }

  workSoFar(slot: number): number {
    return this.sums[slot] + this.rests[slot];
  }

  heatSoFar(): number {
    return this.workSoFar(this.sums.length - 1);
  }
}

/** Two-body accounts: which slot a body index has; the ground has none. */
export class PairAccount {
  private readonly slotA: number;
  private readonly slotB: number;

  constructor(
    readonly booked: BookedAccount,
    bodyA: number,
    bodyB: number,
  ) {
    this.slotA = bodyA < 0 ? -1 : 0;
    this.slotB = bodyB < 0 ? -1 : bodyA < 0 ? 0 : 1;
  }

  static bodies(ids: readonly string[], bodyA: number, bodyB: number): string[] {
    return [bodyA, bodyB].filter((body) => body >= 0).map((body) => ids[body]);
  }

  add(onA: number, onB: number): void {
    if (this.slotA >= 0) this.booked.work(this.slotA, onA);
    if (this.slotB >= 0) this.booked.work(this.slotB, onB);
  }

  heat(value: number): void {
    this.booked.heat(value);
  }
}
