import { describe, expect, it } from 'vitest';
import { evenly, judged, reasonOf, runOf, stationAt, valueOf } from '../support.js';

const bodies = [{ id: 'upper', mass: 1, inertia: 0 }];

describe('travel', () => {
  it('is the length of the path: to and fro counts both ways', () => {
    // Thrown up at 10 m/s under 10 m/s² for two seconds: 5 m up and 5 m down, with five rows.
    const run = runOf({ bodies, accounts: [] }, evenly(4, 2), (time, { bodies: [{ columns }] }) => [
      [columns.y, 10 * time - 5 * time ** 2],
      [columns.vy, 10 - 10 * time],
    ]);
    const { result } = judged({ measure: 'travel', of: 'upper', atMost: 11 }, run);
    expect(result.value).toBeCloseTo(10, 12);
    expect(result.unit).toBe('m');
  });

  it('follows a curve between its rows with the fourth power of their distance', () => {
    const errors = [12, 24].map((count) => {
      const run = runOf({ bodies, accounts: [] }, evenly(count, Math.PI), (time, { bodies: [{ columns }] }) => [
        [columns.x, Math.cos(time)],
        [columns.y, Math.sin(time)],
        [columns.vx, -Math.sin(time)],
        [columns.vy, Math.cos(time)],
      ]);
      return Math.abs(valueOf({ measure: 'travel', of: 'upper', atMost: 4 }, run)! - Math.PI);
    });
    expect(errors[0]).toBeLessThan(5e-5);
    expect(Math.log2(errors[0] / errors[1])).toBeGreaterThan(3.7);
  });

  it('runs through the two rows of an impact, and between its stations', () => {
    const run = runOf(
      { bodies, accounts: [] },
      [0, 1, 1, 3],
      (time, { bodies: [{ columns }] }, row) => [
        [columns.x, [0, 2, 2, 0][row]],
        [columns.vx, [2, 2, -1, -1][row]],
      ],
      [stationAt('2', 1, 1)],
    );
    expect(valueOf({ measure: 'travel', of: 'upper', atMost: 9 }, run)).toBeCloseTo(4, 14);
    expect(valueOf({ measure: 'travel', of: 'upper', from: '2', atMost: 9 }, run)).toBeCloseTo(2, 14);
    expect(valueOf({ measure: 'travel', of: 'upper', to: '2', atMost: 9 }, run)).toBeCloseTo(2, 14);
  });
});

describe('stroke', () => {
  const ground = { of: 'ground', at: [0, 0] as const };
  const run = runOf(
    {
      bodies,
      accounts: [],
      joints: [{ id: 'guide' }],
      springs: [
        { id: 'coil', between: [ground, ground] },
        { id: 'wound', between: ['upper', 'ground'] },
      ],
      dampers: [{ id: 'oil', between: [ground, ground] }],
    },
    evenly(20, 2).map((time) => time + 0.02),
    (time, { springs: [coil], dampers: [oil], joints: [guide] }) => {
      const place = 0.3 + 0.1 * (time - 1) ** 2;
      return [
        [coil.columns.deflection, -place],
        [oil.columns.deflection, place],
        [guide.columns.position, place],
      ];
    },
  );

  it.each(['coil', 'oil', 'guide'])('of %s is from its one farthest place to the other, also between rows', (of) => {
    const { result } = judged({ measure: 'stroke', of, atMost: 1 }, run);
    expect(result.value).toBeCloseTo(0.1 * 1.02 ** 2, 12);
    expect(result.unit).toBe('m');
  });

  it('is none of a spring that turns', () => {
    expect(reasonOf({ measure: 'stroke', of: 'wound', atMost: 1 }, run)).toContain('wound turns');
  });

  it('is none of what the run does not record', () => {
    expect(reasonOf({ measure: 'stroke', of: 'other', atMost: 1 }, run)).toContain('no stroke of other');
  });
});
