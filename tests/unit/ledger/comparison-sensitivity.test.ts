import { describe, expect, it } from 'vitest';
import { sensitivityOf } from '../../../sim/ledger/index.js';
import type { Recording } from '../../../sim/recording/index.js';
import { cratesMechanism } from '../report/crates.js';
import { twoCrates } from './two-crates.js';

/** The run with the speed of the upper crate at the end multiplied. */
function faster(share: number): Recording {
  const run = twoCrates();
  run.rows[2 * run.layout.width + run.layout.bodies[0].columns.vx] *= 1 + share;
  return run;
}

describe('sensitivityOf', () => {
  const of = (other: Recording) => sensitivityOf(cratesMechanism(), twoCrates(), () => other);

  it('runs the mechanism once more, nudged', () => {
    const asked: number[] = [];
    sensitivityOf(cratesMechanism(), twoCrates(), ({ bodies }) => {
      asked.push(bodies[0].at[0]);
      return twoCrates();
    });
    expect(asked).toHaveLength(1);
    expect(Math.abs(asked[0])).toBeGreaterThan(0);
    expect(Math.abs(asked[0])).toBeLessThanOrEqual(1e-9 * cratesMechanism().extent);
  });

  it('says nothing up to 1e-3 of the greatest speed, and names figure and station above', () => {
    expect(of(faster(0.9e-3))).toEqual({ sensitive: false, findings: [] });
    const { sensitive, findings } = of(faster(2e-3));
    expect(sensitive).toBe(true);
    expect(findings).toMatchObject([{ severity: 'warning', code: 'sensitive', of: ['2'], at: 2 }]);
    expect(findings[0].text).toContain('speed of upper at station 2 changes by 0.1996 %');
  });

  it('reports a station that only one of the two runs reaches', () => {
    const run = twoCrates();
    const { findings } = of({ ...run, events: run.events.slice(0, 1) });
    expect(findings).toMatchObject([{ code: 'sensitive', of: ['2'] }]);
    expect(findings[0].text).toContain('station 2 is reached by one run and not by the other');
  });
});
