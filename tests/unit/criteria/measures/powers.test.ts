import { describe, expect, it } from 'vitest';
import type { Recording } from '../../../../sim/recording/index.js';
import { evenly, judged, reasonOf, runOf, stationAt, valueOf } from '../support.js';

/** A run of a drive by its work on two bodies: all that `work` says, half on each. */
function driven(times: readonly number[], work: (time: number, row: number) => number): Recording {
  return runOf(
    {
      bodies: [
        { id: 'upper', mass: 1, inertia: 0 },
        { id: 'lower', mass: 1, inertia: 0 },
      ],
      accounts: [{ account: 'drive', of: 'motor', bodies: ['upper', 'lower'], input: true }],
    },
    times,
    (time, { accounts: [{ columns }] }, row) => columns.work.map((column) => [column, work(time, row) / 2] as const),
    [stationAt('1', 0, times[0]), stationAt('2', times.length - 1, times[times.length - 1])],
  );
}
const peak = { measure: 'peakPower', of: 'motor', from: '1', to: '2', atMost: 1e9 } as const;
const mean = { measure: 'meanPower', of: 'motor', from: '1', to: '2', atMost: 1e9 } as const;

describe('mean power', () => {
  it('is the work at the output over the time, on all bodies whatever the boundary', () => {
    const { result } = judged(
      mean,
      driven([0, 2], (time) => 7 * time),
      { system: ['upper'] },
    );
    expect(result).toMatchObject({ value: 7, unit: 'W' });
  });

  it('is none where no time passes, and none of a drive that is not there', () => {
    expect(
      reasonOf(
        mean,
        driven([1, 1], (_, row) => row),
      ),
    ).toContain('no time passes');
    expect(
      reasonOf(
        { ...mean, of: 'crank' },
        driven([0, 1], () => 0),
      ),
    ).toContain('the run has no drive crank');
  });
});

describe('peak power', () => {
  it('of a steady drive is steady, whatever rows there are', () => {
    const { result } = judged(
      peak,
      driven([0, 0.1, 0.1 + 1e-12, 0.3, 0.65, 1], (time) => 12 * time),
    );
    expect(result.value).toBeCloseTo(12, 9);
  });

  it('of one that goes on rising is that at the end: torque² t / I of a disc run up by a constant torque', () => {
    // 2 N m on 0.5 kg m²: 8 t W, so 8 W at 1 s, from a work of 4 t².
    expect(
      valueOf(
        peak,
        driven(evenly(10, 1), (time) => 4 * time ** 2),
      ),
    ).toBeCloseTo(8, 10);
  });

  it('between rows is found from the works around it', () => {
    // P = 100 − 40 (t − 1)² W
    const work = (time: number): number => 100 * time - (40 / 3) * (time - 1) ** 3;
    const { result } = judged(
      peak,
      driven(
        evenly(19, 1.9).map((time) => time + 0.03),
        work,
      ),
    );
    // The mean of a parabola over a row's time h is 40 h²/12 W below its middle.
    expect(Math.abs(result.value! - (100 - (40 * 0.01) / 12))).toBeLessThan(1e-6);
    expect(result.at).toBeCloseTo(1, 6);
  });

  it('does not overshoot where a drive is switched on', () => {
    const work = (time: number): number => 50 * Math.max(0, time - 0.5);
    expect(valueOf(peak, driven(evenly(20, 1), work))).toBeCloseTo(50, 9);
  });

  it('leaves out work in an impact, which takes no time', () => {
    expect(
      valueOf(
        peak,
        driven([0, 1, 1, 2], (time, row) => 3 * time + (row > 1 ? 100 : 0)),
      ),
    ).toBeCloseTo(3, 12);
  });

  it('is the power delivered: braking harder than driving is a note', () => {
    const { result } = judged(
      peak,
      driven([0, 1, 2, 3], (_, row) => [0, 5, 5, -25][row]),
    );
    expect(result).toMatchObject({ value: 5, note: 'it brakes with up to 30 W.' });
  });

  it('is none where no time passes', () => {
    expect(
      reasonOf(
        peak,
        driven([1, 1], (_, row) => row),
      ),
    ).toContain('no time passes');
  });
});
