import type { AccountRequest } from '../recording/layout.js';
import type { AccountName, NumericalCause } from '../recording/recording.js';
import type { Row } from './row.js';

/** Where an account's integrals stand among the states: one for each of its bodies, then heat and input if it has them. */
export class Account {
  stored: ((q: Float64Array) => number) | null = null;

  constructor(
    readonly first: number,
    /** Slot of each body index (by body), −1 where it has none. */
    private readonly slotOf: ReadonlyMap<number, number>,
    readonly heatSlot: number,
    readonly inputSlot: number,
  ) {}

  /** Adds the power of a force λ along a row to each of its bodies, times `scale`. */
  addRow(into: Float64Array, row: Row, lambda: number, v: Float64Array): void {
    if (lambda === 0) return;
    for (let k = 0; k < row.index.length; k += 1) {
      const i = row.index[k];
      const slot = this.slotOf.get((i / 3) | 0);
      if (slot !== undefined) into[slot] += lambda * row.value[k] * v[i];
    }
  }

  add(into: Float64Array, body: number, value: number): void {
    const slot = this.slotOf.get(body);
    if (slot !== undefined) into[slot] += value;
  }

  heat(into: Float64Array, value: number): void {
    if (this.heatSlot >= 0) into[this.heatSlot] += value;
  }
}

/** Opens the accounts of a run and hands out the states that integrate them. */
export class Ledgers {
  readonly requests: AccountRequest[] = [];
  readonly accounts: Account[] = [];
  slots = 0;

  constructor(private readonly ids: readonly string[]) {}

  open(
    account: AccountName,
    of: AccountRequest['of'],
    bodies: readonly number[],
    options: { heat?: boolean; stored?: boolean; input?: boolean; cause?: NumericalCause } = {},
  ): Account {
    const moving = bodies.filter((body) => body >= 0);
    this.requests.push({ account, of, bodies: moving.map((body) => this.ids[body]), ...options });
    const slotOf = new Map(moving.map((body, k) => [body, this.slots + k]));
    const first = this.slots;
    this.slots += moving.length;
    const heatSlot = options.heat ? this.slots++ : -1;
    const inputSlot = options.input ? this.slots++ : -1;
    const opened = new Account(first, slotOf, heatSlot, inputSlot);
    this.accounts.push(opened);
    return opened;
  }
}
