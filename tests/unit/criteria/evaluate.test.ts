import { describe, expect, it } from 'vitest';
import { evaluateCriteria } from '../../../sim/criteria/index.js';
import { twoCrates } from '../ledger/two-crates.js';
import { cratesMechanism } from '../report/crates.js';
import { evenly, judged, reasonOf, runOf, stationAt } from './support.js';

const speed = { measure: 'speed', of: 'upper', at: '2' } as const;
/** The upper crate's speed at station 2: √(24 − 6) m/s. */
const atTwo = Math.sqrt(18);

describe('a criterion', () => {
  it('carries its measure, unit, limit, margin, verdict and whose run it was judged on', () => {
    const { result, findings } = judged({ ...speed, name: 'Fast', atMost: 5 }, twoCrates());
    expect(result).toEqual({
      ...{ id: 'q', name: 'Fast', measure: 'speed', unit: 'm/s', value: atTwo, atMost: 5, passes: true, by: 'stepper' },
      ...{ margin: 5 - atTwo, marginShare: (5 - atTwo) / 5 },
    });
    expect(findings).toEqual([]);
  });

  it('fails outside its limit without a finding: the table says it', () => {
    const { result, findings } = judged({ ...speed, atMost: 4 }, { ...twoCrates(), solver: 'auditor' });
    expect(result).toMatchObject({ passes: false, by: 'auditor' });
    expect(result.margin).toBeCloseTo(4 - atTwo, 12);
    expect(findings).toEqual([]);
  });

  it('whose station was not reached is not evaluated, and says why', () => {
    const { result, findings } = judged({ ...speed, at: '3', between: [1, 2] }, twoCrates());
    expect(result).toEqual({
      ...{ id: 'q', measure: 'speed', unit: 'm/s', value: null, between: [1, 2], passes: null, by: 'stepper' },
    });
    const text = 'Criterion q was not evaluated, and counts as failed: station 3 was not reached.';
    expect(findings).toEqual([{ severity: 'warning', code: 'criterion-not-evaluated', text, of: ['q'] }]);
  });

  it('says that the run stopped where that may be why a station is missing', () => {
    const run = { ...twoCrates(), end: 'stepTooSmall' as const };
    expect(reasonOf({ ...speed, at: '3', atMost: 1 }, run)).toContain(
      'station 3 was not reached before the run stopped',
    );
    expect(reasonOf({ measure: 'travel', of: 'upper', atMost: 1 }, run)).toContain('the run stopped before its end');
    expect(judged({ measure: 'speed', of: 'upper', at: '2', atMost: 5 }, run).result.passes).toBe(true);
  });

  it('is not evaluated between stations reached in the other order', () => {
    const asked = { measure: 'heat', of: ['upper', 'lower'], from: '2', to: '1', atMost: 1 } as const;
    expect(reasonOf({ ...asked, of: ['upper', 'lower'] }, twoCrates())).toContain(
      'station 1 was reached before station 2',
    );
  });

  it('is not evaluated where nothing ran, and is by nobody then', () => {
    expect(judged({ ...speed, atMost: 5 }, null)).toMatchObject({
      result: { value: null, passes: null, by: null },
      findings: [{ text: expect.stringContaining('the mechanism was not run') as unknown }],
    });
    expect(judged({ ...speed, atMost: 5 }, { ...twoCrates(), rowCount: 0 }).result.passes).toBeNull();
  });

  it('never passes on a number that is not finite', () => {
    const run = twoCrates();
    run.rows[2 * run.layout.width + run.layout.bodies[0].columns.vx] = NaN;
    expect(reasonOf({ ...speed, atMost: 5 }, run)).toContain('not finite');
  });

  it('that passes by less than the rows leave open is a warning', () => {
    // A triangle of force: its top is somewhere between the rows beside the highest one.
    const run = runOf(
      {
        bodies: [],
        accounts: [],
        springs: [
          {
            id: 's',
            between: [
              { of: 'ground', at: [0, 0] },
              { of: 'ground', at: [1, 0] },
            ],
          },
        ],
      },
      evenly(6, 6),
      (time, { springs }) => [[springs[0].columns.force, 10 - 3 * Math.abs(time - 3)]],
    );
    const close = judged({ measure: 'peakForce', of: 's', atMost: 11 }, run);
    expect(close.result).toMatchObject({ value: 10, passes: true, resolution: 3, at: 3 });
    expect(close.findings).toMatchObject([{ severity: 'warning', code: 'criterion-unresolved' }]);
    expect(judged({ measure: 'peakForce', of: 's', atMost: 14 }, run).findings).toEqual([]);
  });
});

it('judges the criteria of a mechanism in their order, and nothing where there are none', () => {
  const mechanism = cratesMechanism();
  expect(evaluateCriteria(mechanism, twoCrates())).toEqual({ criteria: [], findings: [] });
  mechanism.criteria = [
    { id: 'b', measure: 'reached', at: '2' },
    { id: 'a', measure: 'duration', from: '1', to: '2', atMost: 3 },
  ];
  expect(evaluateCriteria(mechanism, twoCrates()).criteria).toMatchObject([
    { id: 'b', value: 2, passes: true },
    { id: 'a', value: 2, passes: true },
  ]);
});

it('leaves a station that was reached at the last row in the span of what ends there', () => {
  const run = runOf(
    { bodies: [{ id: 'upper', mass: 1, inertia: 0 }], accounts: [] },
    [0, 1],
    (time, { bodies }) => [
      [bodies[0].columns.x, time],
      [bodies[0].columns.vx, 1],
    ],
    [stationAt('2', 1, 1)],
  );
  expect(judged({ measure: 'travel', of: 'upper', to: '2', atMost: 1 }, run).result.value).toBeCloseTo(1, 14);
});
