import { describe, expect, it } from 'vitest';
import { defaultStep } from '../../sim/stepper/index.js';
import { machines } from '../support/machines.js';
import { mechanismOf, run } from '../support/run.js';

describe('a shorter step', () => {
  const name = 'rounded bars that roll and topple';
  const parts = { ...machines[name], run: { until: 0.5 } };
  const usual = defaultStep(mechanismOf(parts)).step;

  it('makes the method better, not worse: sliding stays known as sliding however small its impulses', () => {
    const [coarse, fine] = [run(parts, { step: usual }), run(parts, { step: usual / 10 })];
    console.log(`numerical ${coarse.numericalShare().toExponential(1)}, ${fine.numericalShare().toExponential(1)}`);
    expect(fine.numericalShare()).toBeLessThan(1e-6);
    const heat = coarse.total('friction', 'heat');
    expect(Math.abs(fine.total('friction', 'heat') / heat - 1)).toBeLessThan(1e-3);
  });
});
