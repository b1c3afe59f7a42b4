import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { Ledger } from '../../sim/ledger/index.js';
import { accountPage, bookLedger, closes } from '../../sim/ledger/index.js';
import type { Recording } from '../../sim/recording/index.js';
import { BODIES, closedRun, increments } from './synthetic-run.js';

function book(run: Recording, fromRow: number, toRow: number, system: readonly string[] = BODIES): Ledger {
  return bookLedger(run, { from: 'x', to: 'y', fromRow, toRow }, system);
}

const runs = increments.map((steps) => closedRun(steps));
const runsWithRows = runs.chain((run) => {
  const row = fc.nat(run.rowCount - 1);
  return fc.tuple(row, row, row).map((rows) => ({ run, rows: rows.sort((a, b) => a - b) }));
});
const systems = fc.subarray([...BODIES]);

describe('any ledger of a run whose motion is explained', () => {
  it('closes to rounding, whatever the boundary and the rows', () => {
    fc.assert(
      fc.property(runsWithRows, systems, ({ run, rows: [from, to] }, system) => {
        const ledger = book(run, from, to, system);
        expect(Math.abs(ledger.unbooked)).toBeLessThanOrEqual(1e-12 * ledger.turnover + 1e-300);
        expect(closes(ledger)).toBe(true);
      }),
    );
  });

  it('states the identity kineticChange = Σ work + unbooked', () => {
    fc.assert(
      fc.property(runsWithRows, systems, ({ run, rows: [from, to] }, system) => {
        const ledger = book(run, from, to, system);
        const sum = ledger.entries.reduce((total, { work }) => total + work, ledger.unbooked);
        expect(Math.abs(ledger.kineticChange - sum)).toBeLessThanOrEqual(1e-12 * (1 + ledger.turnover));
      }),
    );
  });

  it('turns over no less than half of all work, and no less than the motion at either end', () => {
    fc.assert(
      fc.property(runsWithRows, systems, ({ run, rows: [from, to] }, system) => {
        const { turnover, kineticFrom, kineticTo, entries } = book(run, from, to, system);
        const half = entries.reduce((sum, { work }) => sum + Math.abs(work) / 2, 0);
        expect(turnover).toBeGreaterThanOrEqual(Math.max(kineticFrom, kineticTo, half * (1 - 1e-12)));
      }),
    );
  });
});

describe('ledgers of adjoining spans', () => {
  it('add up, entry by entry and body by body', () => {
    fc.assert(
      fc.property(runsWithRows, systems, ({ run, rows: [first, middle, last] }, system) => {
        const [early, late, whole] = [
          book(run, first, middle, system),
          book(run, middle, last, system),
          book(run, first, last, system),
        ];
        whole.entries.forEach((entry, i) => {
          const [one, two] = [early.entries[i], late.entries[i]];
          expect([one.account, one.of, one.kind]).toEqual([entry.account, entry.of, entry.kind]);
          expect(one.work + two.work).toBeCloseTo(entry.work, 8);
          expect(one.heat + two.heat).toBeCloseTo(entry.heat, 8);
          for (const body of Object.keys(entry.byBody)) {
            expect(one.byBody[body] + two.byBody[body]).toBeCloseTo(entry.byBody[body], 8);
          }
        });
        expect(early.kineticTo).toBe(late.kineticFrom);
      }),
    );
  });
});

describe('moving the boundary', () => {
  const split = fc.tuple(runsWithRows, systems);

  it('never changes what an account did to a body', () => {
    fc.assert(
      fc.property(
        split,
        ([
          {
            run,
            rows: [from, to],
          },
          system,
        ]) => {
          const all = book(run, from, to);
          for (const { account, of, cause, byBody } of book(run, from, to, system).entries) {
            const same = all.entries.find((e) => e.account === account && e.of === of && e.cause === cause)!;
            for (const [body, work] of Object.entries(byBody)) expect(work).toBe(same.byBody[body]);
          }
        },
      ),
    );
  });

  it('shares every entry between the inside and the outside', () => {
    fc.assert(
      fc.property(
        split,
        ([
          {
            run,
            rows: [from, to],
          },
          system,
        ]) => {
          const outside = BODIES.filter((body) => !system.includes(body));
          const parts = [book(run, from, to, system), book(run, from, to, outside)];
          for (const { account, of, cause, work } of book(run, from, to).entries) {
            const shares = parts.flatMap(({ entries }) =>
              entries.filter((e) => e.account === account && e.of === of && e.cause === cause),
            );
            expect(shares.reduce((sum, share) => sum + share.work, 0)).toBeCloseTo(work, 8);
          }
          expect(parts[0].kineticChange + parts[1].kineticChange).toBeCloseTo(book(run, from, to).kineticChange, 7);
        },
      ),
    );
  });

  it('lists only bodies that are inside', () => {
    fc.assert(
      fc.property(
        split,
        ([
          {
            run,
            rows: [from, to],
          },
          system,
        ]) => {
          const listed = book(run, from, to, system).entries.flatMap(({ byBody }) => Object.keys(byBody));
          expect(listed.filter((body) => !(system as string[]).includes(body))).toEqual([]);
        },
      ),
    );
  });

  it('books friction between two bodies inside as the sum of its work on both', () => {
    fc.assert(
      fc.property(runsWithRows, ({ run, rows: [from, to] }) => {
        const both = book(run, from, to, ['a', 'b']).entries.find(
          ({ account, of }) => account === 'friction' && of?.[1] === 'b',
        )!;
        expect(both.kind).toBe('internal');
        const single = ['a', 'b'].map((body) => book(run, from, to, [body]).entries.find(({ of }) => of === both.of)!);
        expect(single.map(({ kind }) => kind)).toEqual(['external', 'external']);
        expect(both.work).toBeCloseTo(single[0].work + single[1].work, 8);
      }),
    );
  });
});

describe('a numerical cause that a solver forgets to book', () => {
  it('is what the ledger then shows as unbooked', () => {
    fc.assert(
      fc.property(increments, (steps) => {
        const [honest, careless] = [{}, { unbookedCause: 'clamp' }].map((options) => closedRun(steps, options));
        const missing = book(honest, 0, steps.length).entries.find(({ cause }) => cause === 'clamp')!.work;
        const ledger = book(careless, 0, steps.length);
        expect(Math.abs(ledger.unbooked - missing)).toBeLessThanOrEqual(1e-12 * ledger.turnover);
        if (Math.abs(missing) > 1e-8 * ledger.turnover) expect(closes(ledger)).toBe(false);
      }),
    );
  });
});

describe('a printed account', () => {
  const options = fc.record({ view: fc.constantFrom('work' as const, 'stored' as const), split: fc.boolean() });

  it('adds up on both sides to the printed total, in either view', () => {
    fc.assert(
      fc.property(runsWithRows, systems, options, ({ run, rows: [from, to] }, system, choice) => {
        const page = accountPage(book(run, from, to, system), choice);
        for (const side of [page.received, page.paidOut]) {
          const units = side.reduce((sum, { printed }) => sum + unitsOf(printed), 0);
          expect(units).toBe(unitsOf(page.total));
        }
      }),
    );
  });

  it('prints no line further than one last digit from its amount', () => {
    fc.assert(
      fc.property(runsWithRows, systems, options, ({ run, rows: [from, to] }, system, choice) => {
        const page = accountPage(book(run, from, to, system), choice);
        for (const { printed, amount } of [...page.received, ...page.paidOut]) {
          const exact = (amount / page.scale.joules) * 10 ** page.scale.decimals;
          expect(Math.abs(unitsOf(printed) - exact)).toBeLessThanOrEqual(1 + 1e-6);
        }
      }),
    );
  });

  it('carries forward in the very digits in which the next page brings forward', () => {
    fc.assert(
      fc.property(runsWithRows, ({ run, rows: [first, middle, last] }) => {
        const scale = { unit: 'J', joules: 1, decimals: 3 };
        const [early, late] = [book(run, first, middle), book(run, middle, last)].map((ledger) =>
          accountPage(ledger, { scale }),
        );
        const carried = early.paidOut.find(({ role }) => role === 'carried');
        const brought = late.received.find(({ role }) => role === 'brought');
        expect(carried?.printed).toBe(brought?.printed);
      }),
    );
  });
});

/** Printed digits as whole last digits. */
function unitsOf(printed: string): number {
  return Number(printed.replace('−', '-').replace('.', ''));
}
