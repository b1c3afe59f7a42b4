import { describe, expect, it } from 'vitest';
import { defaultStep, runStepper, startRun, unsupported } from '../../../sim/stepper/index.js';
import { box, disc, floor, particle } from '../../support/parts.js';
import { G, mechanismOf, type Parts } from '../../support/run.js';

const falling: Parts = { bodies: [disc('ball', [0, 5], 0.1, 1)], run: { until: 1 } };

describe('a run that is advanced piece by piece', () => {
  it('shows what is recorded so far, and knows its time and its end', () => {
    const run = startRun(mechanismOf(falling));
    expect([run.done, run.time, run.duration]).toEqual([false, 0, 1]);
    run.advance(0);
    const early = run.recording();
    expect(early.rowCount).toBeGreaterThan(0);
    while (!run.done) run.advance(5);
    expect(run.time).toBeCloseTo(1, 12);
    expect(run.recording().end).toBe('reachedEnd');
    expect(run.recording().rowCount).toBeGreaterThan(early.rowCount);
  });

  it('ends with "timeBudget" where its document allows no more, with what it has', () => {
    const mechanism = mechanismOf({ ...falling, run: { until: 1000, step: 1e-5, timeBudget: 0.05 } });
    const began = Date.now();
    const recording = runStepper(mechanism);
    expect(recording.end).toBe('timeBudget');
    expect(recording.rowCount).toBeGreaterThan(1);
    expect(Date.now() - began).toBeLessThan(3000);
  });

  it('records about as many rows as it is asked for', () => {
    const mechanism = mechanismOf({ ...falling, run: { until: 1, step: 1e-4 } });
    for (const rows of [10, 100, 1000]) {
      const { rowCount } = runStepper(mechanism, { rows });
      expect(rowCount).toBeGreaterThanOrEqual(rows);
      expect(rowCount).toBeLessThan(1.2 * rows + 5);
    }
  });

  it('ends at the station it runs until, or at the most', () => {
    const stations = [
      {
        id: 'low',
        when: {
          crosses: {
            point: { of: 'ball', at: [0, 5] },
            line: [
              [-1, 4],
              [1, 4],
            ],
          },
        },
      },
    ];
    const at = (atMost: number): number => {
      const { rows, rowCount, layout } = runStepper(
        mechanismOf({ ...falling, stations, run: { until: { station: 'low' }, atMost } }),
      );
      return rows[(rowCount - 1) * layout.width];
    };
    expect(at(3)).toBeCloseTo(Math.sqrt(2 / G), 6);
    expect(at(0.1)).toBeCloseTo(0.1, 12);
  });
});

describe('the default step', () => {
  const stepOf = (parts: Parts): { step: number; why: string } => defaultStep(mechanismOf(parts));

  it('says what decided it: size under gravity, speed, spin, stiffness, or the length of the run', () => {
    const whole = { gravity: [0, 0], run: { until: 1 } };
    const spring = {
      id: 'spring',
      kind: 'linear',
      between: [
        { of: 'ground', at: [0, 0] },
        { of: 'mass', at: [1, 0] },
      ],
      rate: 1e6,
    };
    expect(stepOf(falling).why).toMatch(/size under gravity/);
    expect(stepOf({ ...whole, bodies: [particle('a', [0, 0], 1, { velocity: [500, 0] })] }).why).toMatch(/speed/);
    expect(stepOf({ ...whole, bodies: [disc('a', [0, 0], 1e-3, 1, { spin: 900 })] }).why).toMatch(/sp(in|eed)/);
    expect(stepOf({ ...whole, bodies: [particle('mass', [1, 0], 1)], springs: [spring] }).why).toMatch(/spring/);
    expect(stepOf({ ...whole, bodies: [particle('a', [0, 0], 1)] }).why).toMatch(/length of the run/);
  });

  it('takes 200 steps in the period of the stiffest spring, 2π √(m/k)', () => {
    const { step } = stepOf({
      gravity: [0, 0],
      bodies: [particle('mass', [1, 0], 4)],
      springs: [
        {
          id: 'spring',
          kind: 'linear',
          between: [
            { of: 'ground', at: [0, 0] },
            { of: 'mass', at: [1, 0] },
          ],
          rate: 1e4,
        },
      ],
      run: { until: 1 },
    });
    expect(step).toBeCloseTo((2 * Math.PI * Math.sqrt(4 / 1e4)) / 200, 12);
  });
});

describe('a mechanism with a kind that the stepper does not simulate', () => {
  it('is refused with a finding that names it, and nothing is run', () => {
    const mechanism = mechanismOf({
      bodies: [box('block', [0, 0.05], [0.1, 0.1], 1)],
      tracks: [floor],
      joints: [
        {
          id: 'hoist',
          kind: 'rope',
          through: [
            { of: 'ground', at: [0, 2] },
            { of: 'block', at: [0, 0.05] },
          ],
        },
      ],
      run: { until: 1 },
    });
    const refused = unsupported(mechanism);
    expect(refused).toHaveLength(1);
    expect(refused[0]).toMatchObject({ severity: 'error', of: ['hoist'] });
    const recording = runStepper(mechanism);
    expect(recording).toMatchObject({ end: 'notSimulated', rowCount: 0 });
    expect(recording.findings).toEqual(refused);
  });
});
