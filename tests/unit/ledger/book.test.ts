import { describe, expect, it } from 'vitest';
import type { Entry, Ledger } from '../../../sim/ledger/index.js';
import { bookLedger, closes } from '../../../sim/ledger/index.js';
import { startRun } from '../recording/synthetic.js';
import { twoCrates } from './two-crates.js';

const span = { from: '1', to: '2', fromRow: 0, toRow: 2 };

function entryOf(ledger: Ledger, account: string, of: string): Entry {
  const found = ledger.entries.find((entry) => entry.account === account && [entry.of].flat().join('/') === of);
  if (!found) throw new Error(`no entry ${account} ${of}`);
  return found;
}

describe('bookLedger', () => {
  const run = twoCrates();
  const both = bookLedger(run, span, ['upper', 'lower']);

  it('books the work on each body inside, and their sum', () => {
    const friction = entryOf(both, 'friction', 'upper/lower');
    expect(friction.byBody).toEqual({ upper: -6, lower: 4 });
    expect(friction.work).toBe(-2);
    expect(friction.heat).toBe(2);
  });

  it('turns internal into external when one of the two bodies is left outside', () => {
    expect(entryOf(both, 'friction', 'upper/lower').kind).toBe('internal');
    const friction = entryOf(bookLedger(run, span, ['lower']), 'friction', 'upper/lower');
    expect(friction).toMatchObject({ kind: 'external', work: 4, byBody: { lower: 4 }, heat: 2 });
  });

  it('has no entry for an account that works on outside bodies only', () => {
    const ledger = bookLedger(run, span, ['upper']);
    expect(ledger.entries.map(({ account, of }) => [account, of])).toEqual([
      ['gravity', 'upper'],
      ['friction', ['upper', 'lower']],
      ['numerical', null],
    ]);
  });

  it('keeps an entry that is nil, as a frictionless reaction is', () => {
    expect(entryOf(both, 'reaction', 'lower/chute')).toMatchObject({ kind: 'external', work: 0, heat: 0, places: [] });
  });

  it('gives what a store holds at both ends', () => {
    expect(entryOf(both, 'gravity', 'upper')).toMatchObject({
      kind: 'stored',
      work: 24,
      stored: { from: 100, to: 76 },
    });
  });

  it('closes on the change of kinetic energy', () => {
    expect(both.kineticFrom).toBe(0);
    expect(both.kineticChange).toBeCloseTo(36, 12);
    expect(Math.abs(both.unbooked)).toBeLessThan(1e-13);
    expect(closes(both)).toBe(true);
  });

  it('takes half of all work as turnover where that is more than the motion', () => {
    const lower = bookLedger(run, { ...span, toRow: 1 }, ['lower']);
    expect(lower.kineticTo).toBeCloseTo(9, 12);
    expect(lower.turnover).toBe(0.5 * (12 + 2 + 5));
  });

  it('takes the greatest kinetic energy on the way as turnover where that is more', () => {
    const { writer, row } = startRun({ bodies: [{ id: 'bob', mass: 2, inertia: 0 }], accounts: [] });
    for (const [time, speed] of [0, 5, 1].entries()) row(time, [[writer.layout.bodies[0].columns.vx, speed]]);
    expect(bookLedger(writer.finish('reachedEnd'), span, ['bob']).turnover).toBe(25);
  });

  it('shows what no account explains as unbooked, and does not close', () => {
    const careless = twoCrates();
    careless.rows[2 * careless.layout.width + careless.layout.accounts[3].columns.work[0]] = 0;
    const ledger = bookLedger(careless, span, ['upper', 'lower']);
    expect(ledger.unbooked).toBeCloseTo(-10, 12);
    expect(closes(ledger)).toBe(false);
  });

  it('books another span of the same run', () => {
    const late = bookLedger(run, { ...span, fromRow: 1 }, ['upper', 'lower']);
    expect(entryOf(late, 'friction', 'lower/chute')).toMatchObject({ work: -5, heat: 5 });
    expect(late.kineticFrom).toBeCloseTo(18, 12);
  });

  it('books what a drive took in beside what it gave', () => {
    const { writer, row } = startRun({
      bodies: [{ id: 'crank', mass: 1, inertia: 1 }],
      accounts: [{ account: 'drive', of: 'motor', bodies: ['crank'], input: true }],
    });
    const { work, input } = writer.layout.accounts[0].columns;
    row(0);
    row(1, [
      [work[0], 8],
      [input!, 10],
    ]);
    const ledger = bookLedger(writer.finish('reachedEnd'), { ...span, toRow: 1 }, ['crank']);
    expect(ledger.entries[0]).toMatchObject({ work: 8, input: 10 });
  });

  it('refuses rows that are not there or not in order', () => {
    for (const rows of [
      [-1, 1],
      [0, 3],
      [2, 1],
      [NaN, 1],
    ]) {
      expect(() => bookLedger(run, { ...span, fromRow: rows[0], toRow: rows[1] }, ['upper'])).toThrow(RangeError);
    }
  });

  it('leaves out ids of the system that are no bodies of the run', () => {
    expect(bookLedger(run, span, ['upper', 'lower', 'nobody'])).toEqual(both);
  });
});

describe('bookLedger of a run with numbers that are not finite', () => {
  it.each([NaN, Infinity, -Infinity])('books %s as nil and names the account once', (bad) => {
    const run = twoCrates();
    const { columns } = run.layout.accounts[2];
    for (const column of [...columns.work, columns.heat!]) run.rows[2 * run.layout.width + column] = bad;
    const ledger = bookLedger(run, span, ['upper', 'lower']);
    expect(entryOf(ledger, 'friction', 'upper/lower')).toMatchObject({
      work: 0,
      byBody: { upper: 0, lower: 0 },
      heat: 0,
    });
    expect(ledger.findings).toMatchObject([{ severity: 'error', code: 'non-finite', of: ['upper', 'lower'], at: 2 }]);
    expect(numbersOf(ledger).filter((number) => !Number.isFinite(number))).toEqual([]);
  });

  it('names kinetic energy where a speed is not finite', () => {
    const run = twoCrates();
    run.rows[2 * run.layout.width + run.layout.bodies[0].columns.vy] = NaN;
    const ledger = bookLedger(run, span, ['upper', 'lower']);
    expect(ledger.findings.map(({ text }) => text)).toEqual([expect.stringContaining('kinetic energy')]);
    expect(numbersOf(ledger).filter((number) => !Number.isFinite(number))).toEqual([]);
  });

  it('lets no contact place that is not finite through', () => {
    const run = twoCrates();
    run.rows[2 * run.layout.width + run.layout.contacts[1].columns.x] = NaN;
    const ledger = bookLedger(run, span, ['lower']);
    expect(entryOf(ledger, 'friction', 'lower/chute').places.map(({ segment }) => segment)).toEqual([0]);
    expect(ledger.findings.map(({ text }) => text)).toEqual([expect.stringContaining('place of friction')]);
    expect(numbersOf(ledger).filter((number) => !Number.isFinite(number))).toEqual([]);
  });
});

function numbersOf(value: unknown): number[] {
  if (typeof value === 'number') return [value];
  return typeof value === 'object' && value !== null ? Object.values(value).flatMap(numbersOf) : [];
}
