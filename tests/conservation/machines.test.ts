import { describe, expect, it } from 'vitest';
import { bookLedger } from '../../sim/ledger/index.js';
import { machines } from '../support/machines.js';
import { expectSound } from '../support/expect.js';
import { run, type Run } from '../support/run.js';

describe.each(Object.entries(machines))('the account of %s', (_, parts) => {
  let known: Run | undefined;
  const ran = (): Run => (known ??= run(parts));

  it('closes to 1e-12 of the turnover, for all bodies, each body, and each quarter of the run', () => {
    expectSound(ran());
    const { recording, lastRow } = ran();
    const inside = recording.layout.bodies.map(({ id }) => id);
    const whole = ran().ledger();
    const marks = [0, 0.25, 0.5, 0.75, 1].map((share) => Math.round(share * lastRow));
    for (const [i, fromRow] of marks.slice(0, -1).entries()) {
      const { unbooked } = bookLedger(recording, { from: 'a', to: 'b', fromRow, toRow: marks[i + 1] }, inside);
      expect(Math.abs(unbooked)).toBeLessThanOrEqual(1e-12 * whole.turnover);
    }
    console.log(
      `unbooked ${ran().openShare().toExponential(1)}, numerical ${ran().numericalShare().toExponential(1)} of ${whole.turnover.toPrecision(4)} J`,
    );
  });

  it('has less than half a percent of the turnover as numerical (limit of the contract)', () => {
    expect(ran().numericalShare()).toBeLessThan(5e-3);
  });

  it('has no heat below nil, and none where work is done without loss', () => {
    const { entries, turnover } = ran().ledger();
    for (const { account, heat } of entries) {
      expect(heat, account).toBeGreaterThanOrEqual(-1e-12 * turnover);
      if (['gravity', 'spring', 'reaction', 'load', 'drive', 'numerical'].includes(account))
        expect(heat, account).toBe(0);
    }
  });

  it('loses at an interface with the ground that stands still exactly what it takes', () => {
    const { entries, turnover } = ran().ledger();
    const moving = new Set(
      ran()
        .mechanism.tracks.filter(({ surfaceSpeed }) => surfaceSpeed !== 0)
        .map(({ id }) => id),
    );
    for (const { account, of, work, heat } of entries) {
      if (!['friction', 'joint-friction', 'damper', 'impact', 'rolling-resistance'].includes(account)) continue;
      if ([of].flat().some((id) => moving.has(id ?? ''))) continue;
      expect(Math.abs(work + heat), `${account} ${String(of)}`).toBeLessThanOrEqual(1e-9 * turnover);
    }
  });

  it('would not close if one numerical cause were not booked: what it leaves out is then unbooked', () => {
    const { entries, unbooked } = ran().ledger();
    for (const { kind, cause, work } of entries) {
      if (kind !== 'numerical' || work === 0) continue;
      const { recording, lastRow } = ran();
      const accounts = recording.layout.accounts.filter((account) => account.cause !== cause);
      const without = { ...recording, layout: { ...recording.layout, accounts } };
      const span = { from: 'a', to: 'b', fromRow: 0, toRow: lastRow };
      const left = bookLedger(
        without,
        span,
        recording.layout.bodies.map(({ id }) => id),
      );
      expect(Math.abs(left.unbooked - unbooked - work)).toBeLessThanOrEqual(1e-12 * left.turnover);
    }
  });
});
