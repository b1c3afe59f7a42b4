import { describe, expect, it } from 'vitest';
import type { Place } from '../../../sim/ledger/index.js';
import { bookLedger } from '../../../sim/ledger/index.js';
import type { AccountRequest, Recording } from '../../../sim/recording/index.js';
import { startRun } from '../recording/synthetic.js';
import { contactAt, twoCrates } from './two-crates.js';

function placesOf(run: Recording, account: number, system = ['upper', 'lower', 'ball', 'arm']): Place[] {
  const span = { from: '1', to: '2', fromRow: 0, toRow: run.rowCount - 1 };
  const { account: name, of } = run.layout.accounts[account];
  return bookLedger(run, span, system).entries.find((entry) => entry.account === name && entry.of === of)!.places;
}

describe('the places of friction', () => {
  it('are the segments of the track, an interval that passes from one to the next shared equally', () => {
    expect(placesOf(twoCrates(), 3)).toEqual([
      { on: 'chute', segment: 0, at: [(2 * 5 + 4 * 2.5) / 7.5, (0.5 * 5 + 0 * 2.5) / 7.5], work: -7.5, heat: 7.5 },
      { on: 'chute', segment: 1, at: [8, -1], work: -2.5, heat: 2.5 },
    ]);
  });

  it('are on the second body of a pair of bodies, with the work on the bodies inside', () => {
    expect(placesOf(twoCrates(), 2)).toMatchObject([{ on: 'upper', work: -2, heat: 2 }]);
    expect(placesOf(twoCrates(), 2, ['lower'])).toMatchObject([{ on: 'upper', work: 4, heat: 2 }]);
  });

  it('are where the contact is closed when it is apart at one end of an interval', () => {
    const run = twoCrates();
    const { columns } = run.layout.contacts[1];
    run.rows[run.layout.width + columns.points] = 0;
    run.rows[run.layout.width + columns.x] = 1e9;
    expect(placesOf(run, 3).map(({ segment, at }) => [segment, at])).toEqual([
      [0, [0, 1]],
      [1, [8, -1]],
    ]);
  });

  it('include heat where there is no work, as when a belt slides under a body that is held', () => {
    const run = twoCrates();
    const { work } = run.layout.accounts[3].columns;
    for (const row of [1, 2]) run.rows[row * run.layout.width + work[0]] = 0;
    expect(placesOf(run, 3).map(({ work, heat }) => [work, heat])).toEqual([
      [0, 7.5],
      [0, 2.5],
    ]);
  });

  it('are none for accounts that lose nothing', () => {
    expect(placesOf(twoCrates(), 0)).toEqual([]);
    expect(placesOf(twoCrates(), 4)).toEqual([]);
  });
});

describe('the places of impacts', () => {
  /** A ball that strikes a floor at each of the given points and loses the given heat there. */
  function bounces(losses: readonly [x: number, loss: number][]): Recording {
    const { writer, row } = startRun({
      bodies: [{ id: 'ball', mass: 1, inertia: 0 }],
      accounts: [{ account: 'impact', of: ['ball', 'floor'], bodies: ['ball'], heat: true }],
      contacts: [{ between: ['ball', 'floor'] }],
    });
    const { work, heat } = writer.layout.accounts[0].columns;
    const contact = contactAt(writer.layout.contacts[0].columns, -99, -99, 3);
    let lost = 0;
    row(0);
    losses.forEach(([x, loss], i) => {
      const before = row(i + 1, [[work[0], -lost], [heat!, lost], ...contact]);
      lost += loss;
      row(i + 1, [[work[0], -lost], [heat!, lost], ...contact]);
      const touch = { pair: ['floor', 'ball'] as [string, string], approachSpeed: 1, effectiveMass: 1 };
      writer.event({ kind: 'touch', time: i + 1, row: before, at: [x, 0], ...touch });
    });
    return writer.finish('reachedEnd');
  }

  it('are where each impact says it was', () => {
    expect(
      placesOf(
        bounces([
          [1, 4],
          [2, 1],
        ]),
        0,
      ),
    ).toEqual([
      { on: 'floor', segment: 3, at: [1, 0], work: -4, heat: 4 },
      { on: 'floor', segment: 3, at: [2, 0], work: -1, heat: 1 },
    ]);
  });

  it('put very small impacts of one segment together', () => {
    const places = placesOf(
      bounces([
        [1, 4],
        [2, 0.001],
        [4, 0.001],
      ]),
      0,
    );
    expect(places.map(({ at }) => at)).toEqual([
      [1, 0],
      [3, 0],
    ]);
    expect(places.reduce((sum, { heat }) => sum + heat, 0)).toBeCloseTo(4.002, 12);
  });
});

describe('the places of joints and dampers', () => {
  function armRun(account: AccountRequest): Recording {
    const { writer, row } = startRun({
      bodies: [{ id: 'arm', mass: 1, inertia: 1 }],
      accounts: [account],
      joints: [{ id: 'pin' }],
      dampers: [
        {
          id: 'strut',
          between: [
            { of: 'ground', at: [0, 2] },
            { of: 'arm', at: [2, 0] },
          ],
        },
      ],
    });
    const { columns } = writer.layout.accounts[0];
    const { x, y } = writer.layout.joints[0].columns;
    row(0, [
      [x, 4],
      [y, 6],
    ]);
    row(1, [
      [x, 4],
      [y, 6],
      [columns.work[0], -1],
      [columns.heat!, 1],
    ]);
    return writer.finish('reachedEnd');
  }

  it('are at the joint', () => {
    const run = armRun({ account: 'joint-friction', of: 'pin', bodies: ['arm'], heat: true });
    expect(placesOf(run, 0)).toEqual([{ on: 'pin', at: [4, 6], work: -1, heat: 1 }]);
  });

  it('are at the middle of the damper', () => {
    const run = armRun({ account: 'damper', of: 'strut', bodies: ['arm'], heat: true });
    expect(placesOf(run, 0)).toEqual([{ on: 'strut', at: [1, 1], work: -1, heat: 1 }]);
  });

  it('are none where an account belongs to nothing that has a place', () => {
    expect(placesOf(armRun({ account: 'damper', of: 'elsewhere', bodies: ['arm'], heat: true }), 0)).toEqual([]);
  });
});
