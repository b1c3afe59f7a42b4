import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { peakOf } from '../../sim/criteria/peak.js';
import type { AccountName } from '../../sim/recording/index.js';
import { judged, valueOf } from '../unit/criteria/support.js';
import { BODIES, closedRun, increments } from './synthetic-run.js';

const names: AccountName[] = ['gravity', 'spring', 'friction', 'reaction', 'impact', 'drive'];
const someNames = fc.subarray(names, { minLength: 1 });
const runs = increments.map((steps) => {
  const run = closedRun(steps);
  run.rows.forEach((_, i) => {
    // The motor takes in what it puts out at 80 %, and nothing while it brakes.
    const { columns } = run.layout.accounts[9];
    const at = i % run.layout.width;
    if (at === columns.input) run.rows[i] = Math.max(0, run.rows[i - at + columns.work[0]]) / 0.8;
  });
  return run;
});
const inside = { system: [...BODIES] };

describe('any efficiency of a run whose motion is explained', () => {
  it('is at most 1, or there is none and a reason, whatever is called useful and input', () => {
    fc.assert(
      fc.property(runs, someNames, someNames, (run, useful, input) => {
        const { result, findings } = judged({ measure: 'efficiency', useful, input, atLeast: 0 }, run, inside);
        if (result.value === null) {
          expect(result.passes).toBeNull();
          expect(findings).toMatchObject([{ code: 'criterion-not-evaluated' }]);
        } else expect(result.value).toBeLessThanOrEqual(1);
      }),
    );
  });

  it('that is claimed is allowed between 0 and 1, and refuted above what is allowed, never below', () => {
    fc.assert(
      fc.property(runs, fc.double({ min: 0.01, max: 3, noNaN: true }), (run, claimed) => {
        const { result, findings } = judged({ measure: 'claimedEfficiency', of: 'motor', value: claimed }, run, inside);
        if (result.value === null) return;
        expect(result.value).toBeGreaterThanOrEqual(0);
        expect(result.value).toBeLessThanOrEqual(1);
        expect(result.passes).toBe(claimed <= result.value * (1 + 1e-12));
        expect(findings.some(({ code }) => code === 'claim-refuted')).toBe(claimed > result.value + 1e-9);
      }),
    );
  });
});

it('the work of an account adds up over bodies that are each a boundary of their own', () => {
  fc.assert(
    fc.property(runs, fc.constantFrom(...names), (run, account) => {
      const work = (system: readonly string[]): number =>
        valueOf({ measure: 'work', account, atLeast: 0 }, run, { system: [...system] }) ?? 0;
      const apart = BODIES.reduce((sum, body) => sum + work([body]), 0);
      expect(Math.abs(work(BODIES) - apart)).toBeLessThanOrEqual(1e-9);
    }),
  );
});

it('a value passes exactly where its margin is not below nil, and fails at a limit moved past it', () => {
  const limits = fc.double({ min: -1e3, max: 1e3, noNaN: true });
  fc.assert(
    fc.property(runs, limits, fc.boolean(), (run, limit, isUpper) => {
      const bound = isUpper ? { atMost: limit } : { atLeast: limit };
      const { result } = judged({ measure: 'work', account: 'gravity', ...bound }, run, inside);
      const exact = result.value ?? NaN;
      expect(result.margin).toBe(isUpper ? limit - exact : exact - limit);
      expect(result.passes).toBe((result.margin ?? NaN) >= -1e-12 * Math.max(Math.abs(limit), Math.abs(exact)));
    }),
  );
});

it('a peak is no lower than any sample, and no higher than a smooth curve through them would be', () => {
  const values = fc.array(fc.double({ min: 0, max: 100, noNaN: true }), { minLength: 1, maxLength: 30 });
  fc.assert(
    fc.property(values, (heights) => {
      const greatest = Math.max(...heights);
      const { value, resolution } = peakOf([heights.map((height, time) => ({ time, value: height }))]);
      expect(value).toBeGreaterThanOrEqual(greatest);
      // A parabola through three samples, the middle one highest, rises above it by an eighth of its fall at the most.
      expect(value).toBeLessThanOrEqual(greatest + greatest / 8);
      expect(resolution).toBeGreaterThanOrEqual(0);
    }),
  );
});
