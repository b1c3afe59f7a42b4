import { describe, expect, it } from 'vitest';
import { judged, pairOf, reasonOf, runOf, stationAt, touchAt, valueOf } from '../support.js';

const pair: [string, string] = ['upper', 'lower'];

/** Station 2 is a touch of upper and lower at 1 s; station 3, by a time, is at 2 s, where upper strikes the wall. */
const run = runOf(
  {
    bodies: [
      { id: 'upper', mass: 2, inertia: 3 },
      { id: 'lower', mass: 4, inertia: 0 },
    ],
    accounts: [
      { account: 'gravity', of: 'upper', bodies: ['upper'], stored: true },
      { account: 'spring', of: 'coil', bodies: ['upper'], stored: true },
      { account: 'spring', of: ['lower', 'pad'], bodies: ['lower'], stored: true },
    ],
    contacts: [{ between: pair }],
  },
  [0, 1, 2],
  (time, { bodies: [upper, lower], accounts, contacts: [{ columns }] }) => [
    [upper.columns.vx, 3 * time],
    [upper.columns.vy, -4 * time],
    [upper.columns.spin, time],
    [upper.columns.angle, 7 * time],
    [lower.columns.vx, 1],
    [columns.points, time === 2 ? 1 : 0],
    [columns.slip, -0.25 * time],
    ...accounts.map(({ columns: { stored } }, i) => [stored!, 10 * (i + 1) * time - 5] as const),
  ],
  [
    stationAt('1', 0, 0),
    touchAt(pair, 1, 1, 0.5),
    stationAt('2', 1, 1, { approachSpeed: 0.5, effectiveMass: 2 }),
    touchAt(['upper', 'wall'], 2, 2, 0.7),
    touchAt(['wall', 'upper'], 2, 2, 0.9),
    stationAt('3', 2, 2),
  ],
);
const stations = [
  { id: '1', when: { kind: 'start' } },
  { id: '2', when: { kind: 'touch', pair, count: 1 } },
  { id: '3', when: { kind: 'time', time: 2 } },
] as const;
const at2 = { at: '2', atMost: 100 };

describe('approach speed and effective mass', () => {
  it('are those of the station on the touch, the pair named in either order', () => {
    expect(
      valueOf({ measure: 'approachSpeed', of: ['lower', 'upper'], ...at2 }, run, { stations: [...stations] }),
    ).toBe(0.5);
    expect(valueOf({ measure: 'effectiveMass', of: pair, ...at2 }, run, { stations: [...stations] })).toBe(2);
  });

  it('are those of the pair that is asked for, where another strikes at the same instant: the fastest of its points', () => {
    const asked = { measure: 'approachSpeed', of: ['upper', 'wall'] as [string, string], atMost: 1 } as const;
    expect(valueOf({ ...asked, at: '3' }, run, { stations: [...stations] })).toBe(0.9);
    expect(reasonOf({ ...asked, at: '2' }, run, { stations: [...stations] })).toContain(
      'upper and wall do not strike each other at station 2',
    );
  });

  it('say their units', () => {
    expect(judged({ measure: 'approachSpeed', of: pair, ...at2 }, run).result.unit).toBe('m/s');
    expect(judged({ measure: 'effectiveMass', of: pair, ...at2 }, run).result.unit).toBe('kg');
  });
});

describe('a body at a station', () => {
  it('has the speed of its centre of mass', () => {
    expect(valueOf({ measure: 'speed', of: 'upper', ...at2 }, run)).toBe(5);
  });

  it('has its angle with turns counted', () => {
    expect(judged({ measure: 'angle', of: 'upper', at: '3', atLeast: 14 }, run).result).toMatchObject({
      ...{ value: 14, unit: 'rad', passes: true, margin: 0 },
    });
  });

  it('has kinetic energy of translation and spin; "all" are those inside the boundary', () => {
    const own = 0.5 * 2 * 25 + 0.5 * 3;
    expect(valueOf({ measure: 'kineticEnergy', of: 'upper', ...at2 }, run)).toBe(own);
    expect(valueOf({ measure: 'kineticEnergy', of: 'all', ...at2 }, run)).toBe(own + 2);
    expect(valueOf({ measure: 'kineticEnergy', of: 'all', ...at2 }, run, { system: ['lower'] })).toBe(2);
  });

  it('is not measured where the run has no such body', () => {
    expect(reasonOf({ measure: 'speed', of: 'nobody', ...at2 }, run)).toContain('the run has no body nobody');
  });
});

describe('slip speed', () => {
  it('has no sign', () => {
    expect(valueOf({ measure: 'slipSpeed', of: pair, at: '3', atMost: 1 }, run)).toBe(0.5);
  });

  it('is not measured where the pair is apart, or never met', () => {
    expect(reasonOf({ measure: 'slipSpeed', of: pair, ...at2 }, run)).toContain(
      'upper and lower are apart at station 2',
    );
    expect(reasonOf({ measure: 'slipSpeed', of: ['lower', 'wall'], at: '3', atMost: 1 }, run)).toContain('apart');
  });
});

describe('stored energy', () => {
  it('is that of a spring, of a compliant pair in either order, or of a weight above the origin of the sheet', () => {
    expect(valueOf({ measure: 'storedEnergy', of: 'coil', ...at2 }, run)).toBe(15);
    expect(valueOf({ measure: 'storedEnergy', of: ['pad', 'lower'], ...at2 }, run)).toBe(25);
    const weight = judged({ measure: 'storedEnergy', of: 'upper', ...at2 }, run);
    expect(weight.result).toMatchObject({ value: 5, unit: 'J' });
    expect(weight.findings).toMatchObject([{ severity: 'note', code: 'criterion-note' }]);
    expect(weight.findings[0].text).toContain('height is counted from the origin of the sheet');
  });

  it('is nil in a compliant pair that never met, and not measured in a rigid one', () => {
    const of: [string, string] = ['upper', 'pad'];
    expect(valueOf({ measure: 'storedEnergy', of, ...at2 }, run, { contacts: [pairOf(of, 100)] })).toBe(0);
    expect(reasonOf({ measure: 'storedEnergy', of, ...at2 }, run, { contacts: [pairOf(of)] })).toContain('rigid');
    expect(reasonOf({ measure: 'storedEnergy', of: 'lower', ...at2 }, run)).toContain('no account that stores');
  });
});
