import type { AccountRequest } from '../recording/layout.js';
import type { AccountName, NumericalCause } from '../recording/recording.js';

/**
 * The books of a run in engine units: one compensated sum (Neumaier 1974) for each body of each account, and one for its
 * heat. Sums over many thousand steps then stay good to the last digits, which the closure of the ledger needs.
 */
export class Books {
  readonly accounts: AccountRequest[] = [];
  private readonly slots: BookedAccount[] = [];
  /** All sums in one piece each, account after account: a row of a recording reads every one of them. */
  private readonly sums: Sums = { sums: new Float64Array(256), rests: new Float64Array(256) };
  private used = 0;

  open(
    account: AccountName,
    of: AccountRequest['of'],
    bodies: string[],
    options: { heat?: boolean; stored?: boolean; input?: boolean; cause?: NumericalCause } = {},
  ): BookedAccount {
    const { cause, ...columns } = options;
    this.accounts.push({ account, of, bodies, ...columns, ...(cause ? { cause } : {}) });
    const booked = new BookedAccount(this.sums, this.take(bodies.length + 1), bodies.length);
    this.slots.push(booked);
    return booked;
  }

  /** Room for so many sums more; returns the first. */
  private take(count: number): number {
    const first = this.used;
    this.used += count;
    const { sums, rests } = this.sums;
    if (this.used > sums.length) {
      this.sums.sums = larger(sums);
      this.sums.rests = larger(rests);
    }
    return first;
  }

  get booked(): readonly BookedAccount[] {
    return this.slots;
  }

  /** Every sum in the order of the accounts: of one its bodies', then its heat. */
  sumsSoFar(): Readonly<Sums> {
    return this.sums;
  }
}

/** Compensated sums: what each has come to, and what rounding has left of it. */
interface Sums {
  sums: Float64Array;
  rests: Float64Array;
}

function larger(values: Float64Array): Float64Array {
  const wider = new Float64Array(2 * values.length);
  wider.set(values);
  return wider;
}

/** Running sums of one account [engine energy]. */
export class BookedAccount {
  /** Set by elements whose energy is stored: the energy now. */
  stored = 0;
  input = 0;

  constructor(
    private readonly all: Sums,
    private readonly first: number,
    private readonly bodies: number,
  ) {}

  /** Work on the account's body number `slot`. */
  work(slot: number, value: number): void {
    const { sums, rests } = this.all;
    const at = this.first + slot;
    const before = sums[at];
    const after = before + value;
    rests[at] += Math.abs(before) >= Math.abs(value) ? before - after + value : value - after + before;
    sums[at] = after;
  }

  /** Lost at the interface, positive. */
  heat(value: number): void {
    this.work(this.bodies, value);
  }

  workSoFar(slot: number): number {
    const { sums, rests } = this.all;
    return sums[this.first + slot] + rests[this.first + slot];
  }

  heatSoFar(): number {
    return this.workSoFar(this.bodies);
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
