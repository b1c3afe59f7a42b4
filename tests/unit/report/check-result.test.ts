import * as v from 'valibot';
import { describe, expect, it } from 'vitest';
import type { CheckInput } from '../../../sim/report/index.js';
import { checkResult } from '../../../sim/report/index.js';
import { resultSchema } from '../../../sim/report/result.js';
import { startRun } from '../recording/synthetic.js';
import { twoCrates } from '../ledger/two-crates.js';
import { cratesMechanism } from './crates.js';

function input(changes: Partial<CheckInput> = {}): CheckInput {
  return { file: 'crates.json', title: 'Crates', mechanism: cratesMechanism(), stepper: twoCrates(), ...changes };
}

describe('checkResult', () => {
  const result = checkResult(input({ stepper: { ...twoCrates(), step: 1e-3 } }));
  const codes = (changes: Partial<CheckInput>): string[] =>
    checkResult(input(changes)).findings.map(({ code }) => code);

  it('is what the schema of the result says, before and after JSON', () => {
    expect(v.parse(resultSchema, result)).toEqual(result);
    expect(JSON.parse(JSON.stringify(result))).toEqual(result);
  });

  it('gives the stations reached by time, and then those that were not', () => {
    expect(result.stepper?.stations.map(({ id, reached }) => [id, reached])).toEqual([
      ['1', true],
      ['2', true],
      ['3', false],
    ]);
    expect(result.findings).toContainEqual(expect.objectContaining({ code: 'station-not-reached', of: ['3'] }));
  });

  it('gives the motion of every body at a station', () => {
    const station = result.stepper?.stations[1];
    const speed = Math.sqrt(18);
    expect(station).toMatchObject({
      time: 2,
      bodies: { lower: { x: 0, y: 0, angle: 0, vx: speed, vy: 0, spin: 0, speed } },
    });
  });

  it('carries the touch of a station that falls on an impact', () => {
    const run = twoCrates();
    const touch = { approachSpeed: 2, effectiveMass: 1 };
    run.events.push({ kind: 'station', station: '3', time: 2, row: 2, touch });
    expect(checkResult(input({ stepper: run })).stepper?.stations[2]).toMatchObject({ id: '3', touch });
  });

  it('books a ledger between the stations and names the segments of its places', () => {
    const [ledger] = result.stepper?.ledgers ?? [];
    expect(ledger).toMatchObject({ from: '1', to: '2', kineticFrom: 0 });
    const friction = ledger.entries.find(({ of }) => of?.[1] === 'chute');
    expect(friction?.places.map(({ segment, name }) => [segment, name])).toEqual([
      [0, 'slope'],
      [1, undefined],
    ]);
  });

  it('gives the step of the run', () => {
    expect(result.stepper?.step).toBe(1e-3);
  });

  it('has a hand check of each body between each two stations', () => {
    const found = result.handCheck.map(({ of, from, to }) => `${of} ${from} ${to}`);
    expect(found).toEqual(['upper 1 2', 'lower 1 2']);
  });

  it('is unaudited, and says so', () => {
    expect(result).toMatchObject({ verdict: 'unaudited', auditor: null });
    expect(result.findings.at(-1)).toMatchObject({ code: 'unaudited' });
  });

  it('judges every criterion on the run, in the order of the document', () => {
    const mechanism = cratesMechanism();
    mechanism.criteria = [
      { id: 'q1', measure: 'speed', of: 'upper', at: '2', atMost: 2 },
      { id: 'q2', measure: 'angle', of: 'upper', at: '2', between: [0, 1] },
      { id: 'q3', measure: 'reached', at: '2' },
    ];
    const { criteria, findings } = checkResult(input({ mechanism }));
    expect(criteria).toMatchObject([
      { id: 'q1', measure: 'speed', unit: 'm/s', atMost: 2, value: Math.sqrt(18), passes: false, by: 'stepper' },
      { id: 'q2', between: [0, 1], value: 0, margin: 0, passes: true, by: 'stepper' },
      { id: 'q3', value: 2, passes: true, by: 'stepper' },
    ]);
    expect(findings.map(({ code }) => code)).not.toContain('criterion-not-evaluated');
  });

  it('has a finding for a criterion that could not be evaluated, and for all of them where nothing ran', () => {
    const mechanism = cratesMechanism();
    mechanism.criteria = [{ id: 'q1', measure: 'speed', of: 'upper', at: '3', atMost: 2 }];
    const { criteria, findings } = checkResult(input({ mechanism }));
    expect(criteria).toEqual([
      { id: 'q1', measure: 'speed', unit: 'm/s', atMost: 2, value: null, passes: null, by: 'stepper' },
    ]);
    expect(findings).toContainEqual({
      severity: 'warning',
      code: 'criterion-not-evaluated',
      text: 'Criterion q1 was not evaluated, and counts as failed: station 3 was not reached.',
      of: ['q1'],
    });
    const idle = checkResult(input({ mechanism, stepper: null }));
    expect(idle.criteria).toMatchObject([{ passes: null, by: null }]);
    expect(idle.findings.map(({ text }) => text).join()).toContain('the mechanism was not run');
  });

  it('keeps to its schema with all that a criterion may carry', () => {
    const mechanism = cratesMechanism();
    const spanned = { from: '1', to: '2' };
    mechanism.criteria = [
      {
        id: 'q1',
        name: 'Brake',
        measure: 'efficiency',
        useful: ['friction'],
        input: ['gravity'],
        ...spanned,
        atLeast: 0,
      },
      { id: 'q2', measure: 'heat', of: ['upper', 'wall'], atMost: 1 },
      { id: 'q3', measure: 'claimedEfficiency', of: 'motor', value: 1.1 },
    ];
    const { criteria, ...rest } = checkResult(input({ mechanism }));
    expect(criteria[0].parts).toHaveLength(3 + 1);
    expect(v.safeParse(resultSchema, { criteria, ...rest }).issues).toBeUndefined();
  });

  it('says where a run stopped before its end', () => {
    const { findings } = checkResult(input({ stepper: { ...twoCrates(), end: 'stepTooSmall' } }));
    expect(findings).toContainEqual(expect.objectContaining({ severity: 'error', code: 'run-stopped', at: 2 }));
  });

  it('says that there is no account where fewer than two stations were reached', () => {
    expect(codes({ stepper: { ...twoCrates(), events: [] } })).toContain('no-account');
    expect(codes({})).not.toContain('no-account');
  });

  it('passes on what was found in the file, with its place, and what was found before the run', () => {
    const problem = { severity: 'error' as const, code: 'p', text: 'p', pointer: '/bodies/0', of: ['x'], found: 'y' };
    const finding = { severity: 'note' as const, code: 'f', text: 'f', of: [] };
    const { findings, ...rest } = checkResult(
      input({ mechanism: null, stepper: null, problems: [problem], findings: [finding] }),
    );
    expect(findings).toEqual([{ severity: 'error', code: 'p', text: 'p', pointer: '/bodies/0', of: ['x'] }, finding]);
    expect(rest).toMatchObject({ stepper: null, verdict: 'unaudited' });
  });

  it('gives a number that is not finite as 0, with an error', () => {
    const run = twoCrates();
    run.rows[2 * run.layout.width + run.layout.bodies[0].columns.x] = Infinity;
    const { findings, ...rest } = checkResult(input({ stepper: run }));
    expect(rest.stepper?.stations[1]).toMatchObject({ bodies: { upper: { x: 0 } } });
    const found = findings.filter(({ code }) => code === 'non-finite');
    expect(found).toMatchObject([{ severity: 'error' }]);
    expect(found[0].text).toContain('/stepper/stations/1/bodies/upper/x and 2 more');
    expect(v.is(resultSchema, { findings, ...rest })).toBe(true);
  });
});

describe('the energy of a station', () => {
  const { writer, row } = startRun({
    bodies: [
      { id: 'upper', mass: 2, inertia: 0 },
      { id: 'lower', mass: 3, inertia: 4 },
    ],
    accounts: [
      { account: 'spring', of: 'inner', bodies: ['upper', 'lower'], stored: true },
      { account: 'spring', of: 'stop', bodies: ['upper'], stored: true },
    ],
  });
  const [upper, lower] = writer.layout.bodies.map(({ columns }) => columns);
  const [inner, stop] = writer.layout.accounts.map(({ columns }) => columns.stored!);
  row(0, [
    [upper.y, 5],
    [upper.vx, 3],
    [lower.y, -1],
    [lower.spin, 2],
    [inner, 10],
    [stop, 0.5],
  ]);
  writer.event({ kind: 'station', station: '1', time: 0, row: 0 });
  const run = writer.finish('reachedEnd');
  const energyOf = (system: string[], gravity: [number, number] = [0, -10]): unknown => {
    const mechanism = { ...cratesMechanism(), system, gravity };
    const [station] = checkResult(input({ mechanism, stepper: run })).stepper?.stations ?? [];
    return station.reached ? station.energy : undefined;
  };

  it('counts height from the origin of the sheet', () => {
    expect(energyOf(['upper', 'lower'])).toEqual({ kinetic: 17, gravity: 70, spring: 10.5, total: 97.5 });
  });

  it('counts the bodies inside, and springs that act on them alone', () => {
    expect(energyOf(['upper'])).toEqual({ kinetic: 9, gravity: 100, spring: 0.5, total: 109.5 });
    expect(energyOf(['lower'])).toEqual({ kinetic: 8, gravity: -30, spring: 0, total: -22 });
  });

  it('is plain nil for height where there is no gravity', () => {
    expect(energyOf(['lower'], [0, 0])).toEqual({ kinetic: 8, gravity: 0, spring: 0, total: 8 });
  });
});
