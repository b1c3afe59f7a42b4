import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import type { AccountPage, Entry, Ledger, PageLine } from '../../../sim/ledger/index.js';
import { accountPage, asStored, asWork, scaleOf } from '../../../sim/ledger/index.js';

function entry(partial: Partial<Entry> & Pick<Entry, 'account' | 'work'>): Entry {
  return { of: 'x', kind: 'external', byBody: {}, heat: 0, places: [], ...partial };
}

function ledgerOf(kineticFrom: number, entries: Entry[], unbooked = 0): Ledger {
  const work = entries.reduce((sum, { work }) => sum + work, 0);
  const kineticTo = kineticFrom + work + unbooked;
  const rest = { turnover: 1, resolution: 0, findings: [] };
  return {
    from: '1',
    to: '2',
    entries,
    kineticFrom,
    kineticTo,
    kineticChange: kineticTo - kineticFrom,
    unbooked,
    ...rest,
  };
}

const show = ({ role, account, of, segment, printed }: PageLine): string =>
  [role === 'entry' ? account : role, role === 'entry' ? '' : account, [of].flat().join('/'), segment, printed]
    .filter((part) => part !== '' && part !== null && part !== undefined)
    .join(' ');
const sides = ({ received, paidOut, total }: AccountPage): unknown => [received.map(show), paidOut.map(show), total];

describe('an account page', () => {
  const chute = { on: 'chute', at: [0, 0] as const, heat: 0 };
  const feed = ledgerOf(0, [
    entry({ account: 'gravity', of: 'crate', kind: 'stored', work: 17.3052, stored: { from: 41, to: 23.6948 } }),
    entry({
      account: 'friction',
      of: ['crate', 'chute'],
      work: -9.0642,
      places: [
        { ...chute, segment: 0, work: -4.8541 },
        { ...chute, segment: 1, work: -4.2101 },
      ],
    }),
    entry({ account: 'spring', of: 'stop', kind: 'stored', work: 0, stored: { from: 1, to: 1 } }),
    entry({ account: 'numerical', of: null, cause: 'clamp', kind: 'numerical', work: 0 }),
  ]);

  it('sets out receipts and payments with the unbooked always listed', () => {
    expect(sides(accountPage(feed))).toEqual([
      ['brought 0.000', 'gravity crate 17.305', 'spring stop 0.000'],
      ['friction crate/chute 9.064', 'numerical 0.000', 'unbooked 0.000', 'carried 8.241'],
      '17.305',
    ]);
  });

  it('splits an entry by track segment on request', () => {
    const { paidOut } = accountPage(feed, { split: true });
    expect(paidOut.map(show).slice(0, 2)).toEqual(['friction crate/chute 0 4.854', 'friction crate/chute 1 4.210']);
  });

  it('shows what gravity and springs hold in place of their work, height from the lower station', () => {
    expect(sides(accountPage(feed, { view: 'stored' }))).toEqual([
      ['brought 0.000', 'brought gravity crate 17.305', 'brought spring stop 1.000'],
      [
        'friction crate/chute 9.064',
        'numerical 0.000',
        'unbooked 0.000',
        'carried gravity crate 0.000',
        'carried spring stop 1.000',
        'carried 8.241',
      ],
      '18.305',
    ]);
  });

  it('lists a gain that no account explains under received, and a loss under paid out', () => {
    expect(accountPage(ledgerOf(1, [], 0.25)).received.map(show)).toEqual(['brought 1.000', 'unbooked 0.250']);
    expect(accountPage(ledgerOf(1, [], -0.25)).paidOut.map(show)).toEqual(['unbooked 0.250', 'carried 0.750']);
  });

  it('lists what is unbooked under paid out where it does not show in print', () => {
    expect(accountPage(ledgerOf(1, [], 1e-12)).paidOut.map(show)).toEqual(['unbooked 0.000', 'carried 1.000']);
  });

  it('shows a rounding line where the digits cannot be made to add up', () => {
    const scale = { unit: 'J', joules: 1, decimals: 0 };
    const page = accountPage(ledgerOf(1.4, [], 1.4), { scale });
    expect(sides(page)).toEqual([['brought 1', 'unbooked 1', 'rounding 1'], ['carried 3'], '3']);
  });

  it('adds up also where every amount falls on a half or a quarter of the last digit', () => {
    const quarter = fc.integer({ min: -40, max: 40 }).map((n) => n / 4);
    const scale = { unit: 'J', joules: 1, decimals: 0 };
    fc.assert(
      fc.property(fc.array(quarter, { maxLength: 6 }), quarter, (works, start) => {
        const needed = Math.max(0, -works.reduce((sum, work) => sum + work, 0));
        const ledger = ledgerOf(
          Math.abs(start) + needed,
          works.map((work) => entry({ account: 'load', work })),
        );
        const page = accountPage(ledger, { scale });
        for (const side of [page.received, page.paidOut]) {
          expect(side.map(({ role }) => role)).not.toContain('rounding');
          expect(side.reduce((sum, { printed }) => sum + Number(printed), 0)).toBe(Number(page.total));
        }
      }),
      { numRuns: 1000 },
    );
  });
});

describe('the lines of an account', () => {
  it('add up to nil in either view', () => {
    const ledger = ledgerOf(3, [
      entry({ account: 'gravity', kind: 'stored', work: -2, stored: { from: 5, to: 7 } }),
      entry({ account: 'spring', kind: 'stored', work: 1.5, stored: { from: 2, to: 0.5 } }),
      entry({ account: 'load', work: 0.25 }),
    ]);
    for (const lines of [asWork(ledger), asStored(ledger)]) {
      expect(lines.reduce((sum, { amount }) => sum + amount, 0)).toBeCloseTo(0, 12);
    }
  });

  it('keep no store below nil, even for a spring whose energy is counted from elsewhere', () => {
    const ledger = ledgerOf(3, [entry({ account: 'spring', kind: 'stored', work: 1, stored: { from: -1, to: -2 } })]);
    const stores = asStored(ledger).filter(({ account }) => account === 'spring');
    expect(stores.map(({ role, amount }) => [role, Math.abs(amount)])).toEqual([
      ['brought', 1],
      ['carried', 0],
    ]);
  });
});

describe('scaleOf', () => {
  const unitFor = (joules: number): string => scaleOf([ledgerOf(joules, [])]).unit;

  it('chooses the unit from the greatest total of all pages', () => {
    expect([5e4, 9999, 1, 0.5, 2e-5, 3e-8, 0].map(unitFor)).toEqual(['kJ', 'J', 'J', 'mJ', 'µJ', 'nJ', 'J']);
    expect(scaleOf([ledgerOf(0.001, []), ledgerOf(20, [])]).unit).toBe('J');
  });
});
