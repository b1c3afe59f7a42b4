import { describe, expect, it } from 'vitest';
import { ledgerFindings } from '../../../sim/ledger/index.js';
import { particle } from '../../support/parts.js';
import { run, type Run } from '../../support/run.js';

const pulled = (from: number, step?: number): Run =>
  run({
    gravity: [0, 0],
    bodies: [particle('weight', [from, 0], 1)],
    springs: [
      {
        id: 'spring',
        kind: 'linear',
        between: [
          { of: 'ground', at: [0, 0] },
          { of: 'weight', at: [from, 0] },
        ],
        rate: 100,
        freeLength: 0.2,
      },
    ],
    run: { until: 2, ...(step === undefined ? {} : { step }) },
  });

describe('a spring that is pulled through no length', () => {
  it('is named by a finding, and what that makes is told with the remedy of a smaller step', () => {
    const ran = pulled(1);
    expect(ran.recording.findings).toEqual([
      expect.objectContaining({ severity: 'warning', code: 'spring-through-zero', of: ['spring'] }),
    ]);
    const found = ledgerFindings(ran.recording, [ran.ledger()], ['weight']);
    expect(found.find(({ code }) => code === 'numerical-over-limit')?.text).toMatch(/smaller step/);
    expect(pulled(1, 1e-4).numericalShare()).toBeLessThan(0.1 * ran.numericalShare());
  });

  it('is not where it only swings', () => {
    expect(pulled(0.3).recording.findings).toEqual([]);
  });
});
