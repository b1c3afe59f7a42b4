import { describe, expect, it } from 'vitest';
import type { CheckInput, TextOptions } from '../../../sim/report/index.js';
import { checkResult, checkText } from '../../../sim/report/index.js';
import { twoCrates } from '../ledger/two-crates.js';
import { cratesMechanism } from './crates.js';

function textOf(changes: Partial<CheckInput> = {}, options: TextOptions = {}): string {
  const stepper = { ...twoCrates(), step: 2.5e-4 };
  stepper.events.push({
    kind: 'station',
    station: '3',
    time: 2,
    row: 2,
    touch: { approachSpeed: 0.2, effectiveMass: 0.05 },
  });
  const mechanism = cratesMechanism();
  mechanism.stations[2].when = { kind: 'touch', pair: ['lower', 'chute'], count: 1 };
  mechanism.criteria = [
    { id: 'impact', name: 'Speed at the foot', measure: 'approachSpeed', of: ['lower', 'chute'], at: '3', atMost: 0.8 },
    { id: 'pace', measure: 'speed', of: 'upper', at: '2', between: [1, 4] },
    { id: 'lean', measure: 'angle', of: 'upper', at: '2', atMost: 0.25 },
    { id: 'brake', measure: 'efficiency', useful: ['friction'], input: ['gravity'], from: '1', to: '2', atLeast: 0.2 },
    { id: 'press', measure: 'stroke', of: 'spring', atMost: 0.07 },
    { id: 'down', measure: 'reached', at: '2' },
  ];
  return checkText(
    checkResult({ file: 'crates.json', title: mechanism.title, mechanism, stepper, ...changes }),
    options,
  );
}

describe('checkText', () => {
  it('sets out a result for a terminal', async () => {
    await expect(textOf()).toMatchFileSnapshot('crates.txt');
  });

  it('can show what gravity and springs hold in place of their work', () => {
    const text = textOf({}, { view: 'stored' });
    expect(text).toMatch(/Height upper b\/f +24\.000 │/);
    expect(text).not.toMatch(/Gravity upper +24\.000 │/);
  });

  it.each([40, 80, 97, 300])('keeps within the terminal of %d columns, between 72 and 100', (width) => {
    const widths = textOf({}, { width })
      .split('\n')
      .map((line) => line.length);
    expect(Math.max(...widths)).toBe(Math.min(100, Math.max(72, width)));
  });

  it('repeats the station beside bodies that do not fit its line', () => {
    const run = twoCrates();
    const many = Array.from({ length: 12 }, (_, i) => ({ ...run.layout.bodies[0], id: `body-${i}` }));
    const text = textOf({ stepper: { ...run, layout: { ...run.layout, bodies: [...run.layout.bodies, ...many] } } });
    expect(text.match(/^Station {2}Time, s/gm)).toHaveLength(3);
    for (const { id } of many) expect(text).toContain(`${id}, m/s`);
  });

  it('names what did nothing under the account, so that a frictionless reaction is seen to do none', () => {
    expect(textOf()).toContain('Nil: Reaction lower/chute.');
  });

  it('shows a numerical cause by name where it can be seen in print', () => {
    const run = twoCrates();
    run.rows[2 * run.layout.width + run.layout.accounts[5].columns.work[0]] = -0.5;
    const text = textOf({ stepper: run });
    expect(text).toMatch(/Numerical, clamped motion +0\.500/);
    expect(text).toMatch(/Unbooked +0\.500 │/);
    expect(text).toContain('Error    The stepper’s account from station 1 to 2 does not close');
  });

  it('gives the spin of a body that only turns', () => {
    const run = twoCrates();
    for (const row of [0, 1, 2]) {
      run.rows[row * run.layout.width + run.layout.bodies[0].columns.vx] = 0;
      run.rows[row * run.layout.width + run.layout.bodies[0].columns.spin] = 10;
    }
    expect(textOf({ stepper: run })).toMatch(/upper, rad\/s {2}lower, m\/s\n─+\n1 +0\.0000 +10\.000 +0\.0000\n/);
  });

  it('puts several impacts on one segment on one line', () => {
    const run = twoCrates();
    const account = { ...run.layout.accounts[3], account: 'impact' as const };
    const layout = { ...run.layout, accounts: [account] };
    expect(textOf({ stepper: { ...run, layout } })).toMatch(
      /Impact lower\/chute {2}chute, slope, 2 times +2666\.7 +333\.3 +7\.500/,
    );
  });

  it('marks an unaudited run with a dashed box', () => {
    expect(textOf()).toContain('┌╌╌╌┐\n╎   ╎  Unaudited');
  });

  it('marks runs that agree and runs that differ', () => {
    const result = checkResult({ file: '', title: '', mechanism: cratesMechanism(), stepper: twoCrates() });
    expect(checkText({ ...result, verdict: 'agrees' })).toContain('│ = │  Agrees');
    expect(checkText({ ...result, verdict: 'differs' })).toContain('│ ≠ │  Differs');
  });

  it('prints the problems of a file that cannot be run, with their places', () => {
    const problem = {
      severity: 'error' as const,
      code: 'wrong-dimension',
      text: 'Found "3 kg".',
      pointer: '/springs/0/rate',
      of: [],
    };
    const text = textOf({ mechanism: null, stepper: null, problems: [problem] });
    expect(text).toContain('Error    Found "3 kg". (wrong-dimension, /springs/0/rate)');
    expect(text).toContain('Unaudited, not run');
    expect(text).not.toContain('Account');
  });
});
