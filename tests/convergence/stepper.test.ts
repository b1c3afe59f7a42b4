import { describe, expect, it } from 'vitest';
import { box, disc, floor, particle, sliderCrank } from '../support/parts.js';
import { run, type Parts, type Run } from '../support/run.js';
import { convergence } from './slope.js';

const at = (parts: Parts, step: number): Run => run(parts, { step });

/** All errors of one sign: a method that converges monotonically, not by luck. */
const expectOneSign = (errors: readonly number[]): void =>
  expect(new Set(errors.map(Math.sign)).size, `signs of ${errors.join(', ')}`).toBe(1);

describe('order of the midpoint rule (Hairer, Lubich, Wanner, Geometric Numerical Integration, II.1)', () => {
  it('is 2 for a mass on a spring, whose period it shortens by (ωh)²/24', () => {
    // x(t) = x₀ cos ωt; after 2¼ periods the position is the phase that it is ahead, ωt (ωh)²/24, times −x₀.
    const parts = {
      gravity: [0, 0],
      bodies: [particle('mass', [1.1, 0], 1)],
      springs: [
        {
          id: 'spring',
          kind: 'linear',
          between: [
            { of: 'ground', at: [0, 0] },
            { of: 'mass', at: [1.1, 0] },
          ],
          rate: 100,
          freeLength: 1,
        },
      ],
      run: { until: (2.25 * 2 * Math.PI) / 10 },
    };
    const { slope, errors } = convergence(
      'spring: x at 2¼ periods',
      [8e-3, 4e-3, 2e-3, 1e-3],
      (h) => at(parts, h).motion('mass').x - 1,
    );
    expectOneSign(errors);
    expect(errors[3] / (-0.1 * 4.5 * Math.PI * (0.01 ** 2 / 24))).toBeCloseTo(1, 2);
    expect(slope).toBeGreaterThan(1.9);
    expect(slope).toBeLessThan(2.1);
  });

  it('is 2 for a pendulum on its pin', () => {
    // Released level, x at t = 1 s by Jacobi's elliptic functions.
    const parts = {
      gravity: [0, -9.81],
      bodies: [particle('mass', [1, 0], 1)],
      joints: [{ id: 'pin', kind: 'pin', between: ['mass', 'ground'], at: [0, 0] }],
      run: { until: 1 },
    };
    const { slope, errors } = convergence(
      'pendulum: x at 1 s',
      [1e-2, 5e-3, 2.5e-3, 1.25e-3],
      (h) => at(parts, h).motion('mass').x + 0.986291751131875,
    );
    expectOneSign(errors);
    expect(slope).toBeGreaterThan(1.8);
    expect(slope).toBeLessThan(2.2);
  });

  it('is 2 or better for the energy of a free slider-crank after one turn, which loses less than 0.2 % (need of the stepper)', () => {
    const parts = { ...sliderCrank(), run: { until: 0.7, atMost: 0.7 } };
    const energyOf = (ran: Run): number => {
      const { kineticFrom, kineticTo } = ran.ledger();
      return kineticTo / kineticFrom - 1;
    };
    const { slope, errors } = convergence('slider-crank: ΔE/E after a turn', [4e-3, 2e-3, 1e-3], (h) =>
      energyOf(at(parts, h)),
    );
    expect(slope).toBeGreaterThan(1.8);
    expect(Math.max(...errors.map(Math.abs))).toBeLessThan(2e-3);
    const usual = energyOf(run(parts));
    console.log(`slider-crank at the default step: ΔE/E ${usual.toExponential(1)}`);
    expect(Math.abs(usual)).toBeLessThan(2e-3);
  });

  it('is 2 for a double pendulum, 30°/30° from rest (40-digit extrapolation)', () => {
    const sin30 = 0.5;
    const cos30 = Math.sqrt(0.75);
    const parts = {
      gravity: [0, -9.81],
      bodies: [
        { id: 'upper', shape: { kind: 'none' }, mass: 1, inertia: 1e-12, at: [sin30, -cos30] },
        { id: 'lower', shape: { kind: 'none' }, mass: 1, inertia: 1e-12, at: [2 * sin30, -2 * cos30] },
      ],
      joints: [
        { id: 'hook', kind: 'pin', between: ['upper', 'ground'], at: [0, 0] },
        { id: 'knee', kind: 'pin', between: ['lower', 'upper'], at: [sin30, -cos30] },
      ],
      run: { until: 1 },
    };
    const { slope } = convergence('double pendulum: θ₁ at 1 s', [4e-3, 2e-3, 1e-3], (h) => {
      const { x, y } = at(parts, h).motion('upper');
      return Math.atan2(x, -y) + 0.254551122872993;
    });
    expect(slope).toBeGreaterThan(1.8);
    expect(slope).toBeLessThan(2.3);
  });
});

describe('motion under a constant force', () => {
  it('is exact at any step: ½ g t² and g t, to rounding', () => {
    const parts = { gravity: [0, -9.81], bodies: [disc('ball', [0, 0], 0.1, 1)], run: { until: 1 } };
    for (const step of [0.1, 1e-2, 1e-3]) {
      const { y, vy } = at(parts, step).motion('ball');
      expect(Math.abs(y + 4.905)).toBeLessThan(1e-12);
      expect(Math.abs(vy + 9.81)).toBeLessThan(1e-12);
    }
  });

  it('meets the floor at √(2 g h) whatever the step: the touch is found, not stepped over', () => {
    const parts = {
      gravity: [0, -9.81],
      bodies: [box('crate', [0, 1.05], [0.2, 0.1], 1)],
      tracks: [floor],
      contacts: [{ between: ['crate', 'floor'] }],
      run: { until: 0.6 },
    };
    for (const step of [0.1, 1e-2, 1e-3]) {
      const [{ approachSpeed, time }] = at(parts, step).events('touch');
      expect(Math.abs(approachSpeed / Math.sqrt(2 * 9.81) - 1)).toBeLessThan(1e-7);
      expect(Math.abs(time / Math.sqrt(2 / 9.81) - 1)).toBeLessThan(1e-7);
    }
  });
});
