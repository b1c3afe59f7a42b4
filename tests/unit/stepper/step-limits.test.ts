import { describe, expect, it } from 'vitest';
import { runStepper, startRun, unsupported } from '../../../sim/stepper/index.js';
import { disc, floor, particle } from '../../support/parts.js';
import { mechanismOf, run, type Parts } from '../../support/run.js';

/** A particle on a spring of ω = 1000 s⁻¹: steps up to 2 ms are stable. */
const stiff = (step: number | string | undefined, more: Parts = {}): Parts => ({
  gravity: [0, 0],
  bodies: [particle('weight', [1, 0], 1)],
  springs: [
    {
      id: 'spring',
      kind: 'linear',
      between: [
        { of: 'ground', at: [0, 0] },
        { of: 'weight', at: [1, 0] },
      ],
      rate: 1e6,
      freeLength: 0.99,
    },
  ],
  run: { until: 10, ...(step === undefined ? {} : { step }) },
  ...more,
});

describe('a step beyond the stability of a stiff spring', () => {
  it('is refused before the run, with the largest stable step', () => {
    const [finding, ...others] = unsupported(mechanismOf(stiff(0.01)));
    expect(others).toEqual([]);
    expect(finding).toMatchObject({ severity: 'error', code: 'step-unstable' });
    expect(finding.text).toMatch(/largest stable step is 0\.00(2|199) s/);
  });

  it('is refused too where the caller fixes it, and not where the caller has a better one than the document', () => {
    expect(unsupported(mechanismOf(stiff(undefined)), { step: 0.0021 })).toHaveLength(1);
    expect(unsupported(mechanismOf(stiff(0.01)), { step: 0.0019 })).toEqual([]);
    expect(unsupported(mechanismOf(stiff(0.0019)))).toEqual([]);
    expect(unsupported(mechanismOf(stiff(undefined)))).toEqual([]);
  });

  it('ends a run that is started all the same at once, in no rows', () => {
    const recording = runStepper(mechanismOf(stiff(0.01)));
    expect(recording).toMatchObject({ end: 'notSimulated', rowCount: 0 });
    expect(recording.findings.map(({ code }) => code)).toEqual(['step-unstable']);
  });

  it('is told through the joints: a stiff spring on a crank close to its pin swings slowly', () => {
    const crank = (step: number): Parts => ({
      gravity: [0, 0],
      bodies: [{ id: 'crank', shape: { kind: 'bar', length: 1, width: 0.02 }, mass: 1, at: [0.5, 0] }],
      joints: [{ id: 'shaft', kind: 'pin', between: ['crank', 'ground'], at: [0, 0] }],
      springs: [
        {
          id: 'spring',
          kind: 'linear',
          between: [
            { of: 'ground', at: [0.01, -0.1] },
            { of: 'crank', at: [0.01, 0] },
          ],
          rate: 1e6,
          freeLength: 0.1,
        },
      ],
      run: { until: 1, step },
    });
    // ω² = k a²/I = 1e6 × 1e-4/(1/3) s⁻²; free, the bar would swing with ω ≈ 2000 s⁻¹ there.
    const greatest = 2 / Math.sqrt(300);
    expect(unsupported(mechanismOf(crank(0.98 * greatest)))).toEqual([]);
    expect(unsupported(mechanismOf(crank(1.02 * greatest)))).toHaveLength(1);
  });

  it('counts compliant contacts', () => {
    const soft = (step: number): Parts => ({
      bodies: [disc('ball', [0, 0.5], 0.1, 1)],
      tracks: [floor],
      contacts: [{ between: ['ball', 'floor'], stiffness: 1e6 }],
      run: { until: 1, step },
    });
    expect(unsupported(mechanismOf(soft(0.0021)))).toHaveLength(1);
    expect(unsupported(mechanismOf(soft(0.0019)))).toEqual([]);
  });
});

describe('a step too small to come to an end with', () => {
  it.each([1e-8, 1e-30])('of %d s in the document is refused', (step) => {
    const findings = unsupported(mechanismOf(stiff(step)));
    expect(findings.map(({ code }) => code)).toEqual(['step-too-small']);
    expect(startRun(mechanismOf(stiff(step))).done).toBe(true);
  });
});

describe('a motion that grows without bound', () => {
  it('ends the run before anything is not finite, and says so', () => {
    const ran = run({
      bodies: [disc('shell', [0, 0], 0.1, 1)],
      loads: [{ id: 'blast', on: { of: 'shell', at: [0, 0] }, force: [1e300, 0] }],
      run: { until: 1e5 },
    });
    const { recording } = ran;
    expect(recording.end).toBe('nonFinite');
    expect(recording.rows.subarray(0, recording.rowCount * recording.layout.width).every(Number.isFinite)).toBe(true);
    expect(recording.findings).toEqual([
      expect.objectContaining({ severity: 'error', code: 'not-finite', at: ran.endTime }),
    ]);
  });
});
