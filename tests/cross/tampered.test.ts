import { describe, expect, it } from 'vitest';
import { compareRuns, stationRows, type Comparison } from '../../sim/ledger/index.js';
import type { Mechanism } from '../../sim/mechanism/model.js';
import { valueAt, type Recording } from '../../sim/recording/index.js';
import { runStepper } from '../../sim/stepper/index.js';
import type { Parts } from '../support/run.js';
import { brakedBlock, referenceOf, rollingDisc, sprungCarriage, tamperedRun } from './machines.js';

const codes = ({ findings }: Comparison): string[] => findings.map(({ code }) => code);

/** A run of a changed mechanism beside the reference, in both parts. */
function tampered(parts: Parts, change: (copy: Mechanism) => void): Comparison[] {
  const { mechanism, reference } = referenceOf(parts);
  const other = tamperedRun(mechanism, change);
  return [compareRuns(mechanism, other, reference), compareRuns(mechanism, reference, other)];
}

describe('a run that is not of this document', () => {
  it('is flagged where gravity has the wrong sign across, by gravity, whichever run it is', () => {
    // Across: turned round up and down, the disc would leave the ramp.
    const comparisons = tampered({ ...rollingDisc, gravity: [3, -9] }, (copy) => (copy.gravity = [-3, -9]));
    for (const [i, by] of (['stepper', 'auditor'] as const).entries()) {
      const { verdict, off, findings, parting } = comparisons[i];
      expect({ verdict, station: parting?.station }).toEqual({ verdict: 'differs', station: 'half' });
      expect(off).toMatchObject([{ by, what: 'gravity', of: 'disc', from: 'start', to: 'half' }]);
      expect(findings).toContainEqual(expect.objectContaining({ code: 'off-document', of: ['disc'] }));
    }
  });

  it('is flagged where gravity is turned round and everything flies off', () => {
    const [{ verdict, off, parting }] = tampered(brakedBlock, (copy) => (copy.gravity = [0, 9.80665]));
    expect({ verdict, what: off.map(({ what, of, by }) => [what, of, by]) }).toEqual({
      verdict: 'differs',
      what: [['gravity', 'block', 'stepper']],
    });
    expect(parting?.account).toMatchObject({ from: 'start', to: 'half' });
  });

  it('is flagged where an inertia is 1 % off, by that inertia, though gravity and the ramp are the same', () => {
    const [{ verdict, off, remedies }] = tampered(rollingDisc, (copy) => (copy.bodies[0].inertia *= 1.01));
    expect(verdict).toBe('differs');
    // ½ m r² of 3 kg and 0.1 m, and a hundredth more.
    expect(off).toEqual([
      {
        by: 'stepper',
        what: 'inertia',
        of: 'disc',
        found: expect.closeTo(0.01515, 12) as number,
        expected: expect.closeTo(0.015, 12) as number,
      },
    ]);
    expect(remedies).toEqual([]);
  });

  it('is flagged where an inertia is 1 % off in the motion alone, by an account that does not close', () => {
    const { mechanism, reference } = referenceOf(rollingDisc);
    const other = tamperedRun(mechanism, (copy) => (copy.bodies[0].inertia *= 1.01));
    other.layout.bodies[0].inertia = mechanism.bodies[0].inertia;
    const { verdict, closed } = compareRuns(mechanism, other, reference);
    expect({ verdict, closed }).toEqual({ verdict: 'differs', closed: { stepper: false, auditor: true } });
  });

  it('is flagged where a spring rate is 2 % off, by that spring', () => {
    const [first, second] = tampered(sprungCarriage, (copy) => {
      const [spring] = copy.springs;
      if (spring.kind === 'linear') spring.rate *= 1.02;
    });
    expect([first.verdict, second.verdict]).toEqual(['differs', 'differs']);
    expect(first.off).toMatchObject([{ by: 'stepper', what: 'spring', of: 'stop', from: 'start', to: 'turned' }]);
    expect(first.off[0].found / first.off[0].expected).toBeCloseTo(1.02, 6);
    expect(second.off).toMatchObject([{ by: 'auditor', what: 'spring', of: 'stop' }]);
    expect(first.findings.find(({ code }) => code === 'off-document')?.text).toContain('spring stop');
  });

  it('is flagged where a restitution is off, by the impact of that pair', () => {
    const [{ verdict, parting }] = tampered(sprungCarriage, (copy) => {
      for (const pair of copy.contacts) if (pair.between.includes('wall')) pair.restitution = 0.48;
    });
    expect(verdict).toBe('differs');
    expect(parting?.account).toMatchObject({ account: 'impact', from: 'struck', to: 'end' });
    expect([parting?.account?.of].flat().sort()).toEqual(['carriage', 'wall']);
  });

  it('is flagged where a friction is 2 % off, by that friction and not by gravity, which only follows', () => {
    const [{ verdict, parting }] = tampered(brakedBlock, (copy) => (copy.contacts[0].kineticFriction *= 1.02));
    expect(verdict).toBe('differs');
    expect(parting?.account).toMatchObject({ account: 'friction', of: ['block', 'ramp'] });
  });
});

describe('a run whose record is altered', () => {
  const { mechanism, reference } = referenceOf(sprungCarriage);
  const run = runStepper(mechanism, { step: 2e-4 });

  /** The run with columns changed from a row on. */
  function altered(change: (cells: Float64Array, copy: Recording, row: number) => void): Comparison {
    const copy = { ...run, rows: run.rows.slice() };
    const { row } = stationRows(run).find(({ id }) => id === 'struck')!;
    change(copy.rows, copy, row);
    return compareRuns(mechanism, copy, reference);
  }
  const impact = run.layout.accounts.find(({ account, of }) => account === 'impact' && of?.includes('wall'))!;

  it('agrees while nothing is altered', () => {
    const { verdict, parting, findings } = altered(() => undefined);
    expect({ verdict, parting, findings }).toEqual({ verdict: 'agrees', parting: null, findings: [] });
  });

  it('is flagged where an impulse is not booked, by the impact that is missing and an account that does not close', () => {
    const { verdict, closed, parting } = altered((cells, { layout, rowCount }) => {
      for (let row = 0; row < rowCount; row++)
        for (const column of impact.columns.work) cells[row * layout.width + column] = 0;
    });
    expect({ verdict, closed }).toEqual({ verdict: 'differs', closed: { stepper: false, auditor: true } });
    expect(parting).toMatchObject({ account: { account: 'impact', stepper: 0, from: 'struck', to: 'end' } });
  });

  it('is flagged where an impulse is left out of the motion too, by the speed after it and the impact', () => {
    const before = stationRows(run).find(({ id }) => id === 'struck')!.row;
    const { columns } = run.layout.bodies[0];
    const { verdict, parting } = altered((cells, { layout, rowCount }) => {
      // As if the wall were not there: on at the speed of arrival, with the impact's work never done.
      for (let row = before + 1; row < rowCount; row++) {
        const at = row * layout.width;
        cells[at + columns.vx] = valueAt(run, before, columns.vx);
        cells[at + columns.x] =
          valueAt(run, before, columns.x) + cells[at + columns.vx] * (cells[at] - cells[before * layout.width]);
        for (const column of impact.columns.work) cells[at + column] = 0;
      }
    });
    expect(verdict).toBe('differs');
    expect(parting).toMatchObject({ station: 'end', account: { account: 'impact' } });
    expect(parting?.figure?.of).toBe('carriage');
  });

  it('is flagged where a speed at the end is a tenth too great', () => {
    const { vx } = run.layout.bodies[0].columns;
    const { verdict, parting } = altered((cells, { layout, rowCount }) => {
      cells[(rowCount - 1) * layout.width + vx] *= 1.1;
    });
    expect(verdict).toBe('differs');
    expect(parting).toMatchObject({ station: 'end', figure: { quantity: 'speed', of: 'carriage' }, account: null });
  });
});

describe('a coarse step', () => {
  const { mechanism, reference } = referenceOf(sprungCarriage);
  const at = (step: number): Comparison => compareRuns(mechanism, runStepper(mechanism, { step }), reference);

  it('is flagged, and the flag names the station and the account that parted', () => {
    const coarse = at(0.05);
    console.log(coarse.findings.map(({ text }) => text).join('\n'));
    expect(coarse).toMatchObject({ verdict: 'differs', closed: { stepper: true, auditor: true }, off: [] });
    expect(coarse.parting).toMatchObject({
      station: 'turned',
      account: { account: 'friction', of: ['carriage', 'floor'], from: 'start', to: 'turned' },
    });
    expect(codes(coarse)).toEqual(['runs-part', 'account-parts', 'try-smaller-step']);
    expect(coarse.findings[1]).toMatchObject({ severity: 'error', of: ['carriage', 'floor'] });
  });

  it('is told a smaller step, and steps as told lead to agreement', () => {
    let step = 0.05;
    for (let tries = 0; tries < 3; tries += 1) {
      const [remedy] = at(step).remedies;
      if (remedy?.do !== 'smaller-step') break;
      expect(remedy.now).toBe(step);
      expect(remedy.step).toBeLessThanOrEqual(step / 2);
      step = remedy.step;
    }
    console.log(`agrees at ${step} s`);
    expect(at(step).verdict).toBe('agrees');
  });

  it('is flagged for what its method makes or loses alone, though all figures agree, and told a smaller step', () => {
    const comparison = at(0.02);
    expect(comparison).toMatchObject({
      verdict: 'differs',
      parting: null,
      remedies: [{ do: 'smaller-step', now: 0.02 }],
    });
    expect(comparison.numerical.stepper).toBeGreaterThan(5e-3);
  });
});

describe('two fine runs', () => {
  it.each([
    ['a disc that rolls', rollingDisc],
    ['a carriage against a spring and a wall', sprungCarriage],
    ['a block that friction brakes', brakedBlock],
  ])('of %s agree, with nothing found', (_, parts) => {
    const { mechanism, reference } = referenceOf(parts);
    const { verdict, findings, parting } = compareRuns(mechanism, runStepper(mechanism, { step: 5e-4 }), reference);
    expect({ verdict, findings, parting }).toEqual({ verdict: 'agrees', findings: [], parting: null });
  });
});
