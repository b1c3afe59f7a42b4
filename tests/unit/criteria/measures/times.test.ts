import { describe, expect, it } from 'vitest';
import type { Recording, RunEvent } from '../../../../sim/recording/index.js';
import { judged, pairOf, reasonOf, runOf, stationAt, touchAt, valueOf } from '../support.js';

const pair: [string, string] = ['upper', 'lower'];
const partsAt = (row: number, time: number): RunEvent => ({ kind: 'parts', pair, row, time, at: [0, 0] });

/** A run by its times and the number of closed points at each. */
function contact(times: readonly number[], points: readonly number[], events: readonly RunEvent[] = []): Recording {
  return runOf(
    { bodies: [], accounts: [], contacts: [{ between: pair }] },
    times,
    (_, { contacts: [{ columns }] }, row) => [
      [columns.points, points[row]],
      [columns.normal, row === 0 ? 0 : points[row]],
    ],
    events,
  );
}
const apart = { measure: 'liftOff', of: pair, atMost: 10 } as const;

describe('duration', () => {
  const run = contact([0, 1, 3], [0, 0, 0], [stationAt('1', 1, 1), stationAt('2', 2, 3)]);

  it('is the time from one station to the other', () => {
    expect(judged({ measure: 'duration', from: '1', to: '2', atMost: 1 }, run).result).toMatchObject({
      ...{ value: 2, unit: 's', margin: -1, passes: false },
    });
  });

  it('is none backwards', () => {
    expect(reasonOf({ measure: 'duration', from: '2', to: '1', atMost: 1 }, run)).toContain('before station 2');
  });
});

describe('a station to be reached', () => {
  const run = contact([0, 1], [0, 0], [stationAt('2', 1, 1)]);

  it('passes with the time it was reached', () => {
    expect(judged({ measure: 'reached', at: '2' }, run)).toEqual({
      result: { id: 'q', measure: 'reached', unit: 's', value: 1, passes: true, by: 'stepper' },
      findings: [],
    });
  });

  it('fails where the run came to its end without it', () => {
    const { result, findings } = judged({ measure: 'reached', at: '3' }, run);
    expect(result).toMatchObject({ value: null, passes: false });
    expect(findings).toMatchObject([{ severity: 'note' }]);
  });

  it('is not evaluated where the run stopped before', () => {
    expect(reasonOf({ measure: 'reached', at: '3' }, { ...run, end: 'timeBudget' })).toContain(
      'before the run stopped',
    );
  });
});

describe('lift-off', () => {
  it('is the longest time from the parting to the touch', () => {
    // Apart from 1 s to 2 s, and from 3 s to 5 s.
    const events = [partsAt(1, 1), touchAt(pair, 2, 2), partsAt(5, 3), touchAt(pair, 7, 5)];
    const run = contact([0, 1, 2, 2, 2.5, 3, 4, 5, 5, 6], [1, 0, 0, 0, 1, 0, 0, 0, 0, 1], events);
    expect(judged(apart, run)).toMatchObject({ result: { value: 2, unit: 's' }, findings: [] });
  });

  it('does not count before the first touch, and none of a pair that never touched', () => {
    const run = contact([0, 4, 4, 5], [0, 0, 0, 1], [touchAt(pair, 1, 4)]);
    expect(valueOf(apart, run)).toBe(0);
    expect(reasonOf(apart, contact([0, 1], [0, 0]))).toContain('upper and lower never touched');
    expect(reasonOf({ ...apart, of: ['upper', 'wall'] }, run)).toContain('never touched');
  });

  it('is from touch to touch where the pair bounces, also without a row between', () => {
    const run = contact(
      [0, 1, 1, 1.6, 1.6, 1.9, 1.9],
      [0, 0, 0, 0, 0, 0, 0],
      [touchAt(pair, 1, 1), touchAt(pair, 3, 1.6), touchAt(pair, 5, 1.9)],
    );
    expect(valueOf(apart, run)).toBeCloseTo(0.6, 14);
  });

  it('does not take a second point that closes for a bounce', () => {
    expect(valueOf(apart, contact([0, 1, 1, 2, 2, 3], [1, 1, 1, 1, 2, 2], [touchAt(pair, 1, 1)]))).toBe(0);
  });

  it('counts to the end where the two do not meet again, and says so', () => {
    const { result } = judged(apart, contact([0, 1, 4], [1, 0, 0], [partsAt(1, 1)]));
    expect(result).toMatchObject({ value: 3, note: 'the two are still apart at the end of the span.' });
  });

  it('is cut at the stations of its span', () => {
    const events = [partsAt(1, 1), stationAt('2', 2, 2), stationAt('3', 3, 4), touchAt(pair, 4, 9)];
    const run = contact([0, 1, 2, 4, 9], [1, 0, 0, 0, 0], events);
    expect(valueOf({ ...apart, from: '2', to: '3' }, run)).toBe(2);
    expect(valueOf({ ...apart, from: '2' }, run)).toBe(7);
  });

  it('of a compliant pair takes an overlap without a force for apart', () => {
    const run = contact([0, 1, 2], [1, 0, 1]);
    expect(valueOf(apart, run)).toBe(1);
    expect(valueOf(apart, run, { contacts: [pairOf(pair, 100)] })).toBe(0);
  });
});
