import { describe, expect, it } from 'vitest';
import { expectSound } from '../../support/expect.js';
import { box, floor } from '../../support/parts.js';
import { G, run, type Run } from '../../support/run.js';

const pile = (light: number, mass: number, drop: number, runs: { until: number; step?: number }): Run =>
  run({
    bodies: [
      ...Array.from({ length: light }, (_, i) => box(`light-${i}`, [0, 0.05 + 0.1 * i], [0.2, 0.1], 1)),
      box('heavy', [0, 0.05 + 0.1 * light + drop], [0.2, 0.1], mass),
    ],
    tracks: [floor],
    contacts: [{ between: ['*', '*'], friction: 0.3 }],
    run: runs,
  });

describe('a heavy box that falls on a light one', () => {
  it.each([1e2, 1e3, 1e4, 1e6])('of %d times its mass comes to rest on it, and neither gives way', (ratio) => {
    const ran = pile(1, ratio, 0.01, { until: 0.5 });
    expectSound(ran);
    expect(ran.recording.findings).toEqual([]);
    expect(ran.motion('light-0').y).toBeCloseTo(0.05, 6);
    expect(ran.motion('heavy').y).toBeCloseTo(0.15, 6);
    expect(ran.contact('light-0', 'floor', 'normal') / ((ratio + 1) * G)).toBeCloseTo(1, 5);
    expect(ran.numericalShare()).toBeLessThan(1e-5);
  });

  it('does so on three of a millionth of its mass', () => {
    const ran = pile(3, 1e6, 0.01, { until: 0.1 });
    expect(ran.motion('light-0').y).toBeCloseTo(0.05, 6);
    expect(ran.motion('heavy').y).toBeCloseTo(0.35, 6);
  });
});

describe('a pile that the solver does not solve', () => {
  it('is an error of the run, that names the bodies that went into each other', () => {
    const { recording } = pile(20, 1e8, 0, { until: 0.03, step: 5e-3 });
    const finding = recording.findings.find(({ code }) => code === 'not-converged');
    expect(finding).toMatchObject({ severity: 'error', of: [expect.any(String), expect.any(String)] });
  });
});
