import { mkdtempSync, readdirSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { checkCommand } from '../../../main/cli/check.js';
import type { Auditor } from '../../../main/cli/run-both.js';
import { runCommandLine } from '../../../main/cli/cli.js';
import type { CheckResult } from '../../../sim/report/index.js';
import { fallingAuditor, fallingDocument, fallingEngine } from './falling.js';
import { recordedTerminal } from './recorded-terminal.js';

describe('joulewright check', () => {
  let folder = '';
  beforeAll(() => (folder = mkdtempSync(join(tmpdir(), 'check-'))));
  afterAll(() => rmSync(folder, { recursive: true }));

  async function check(
    document: unknown,
    options: string[],
    engine = fallingEngine(),
    { watched = false, auditor = null as Auditor | null } = {},
  ) {
    const text = typeof document === 'string' ? document : JSON.stringify(document);
    const terminal = recordedTerminal(text, watched);
    const status = await runCommandLine(
      ['check', '-', ...options],
      [checkCommand({ stepper: engine, auditor })],
      terminal,
    );
    return { status, engine, ...terminal.written };
  }
  const asked = {
    ...fallingDocument,
    criteria: [{ id: 'fast', measure: 'speed', of: 'weight', at: '2', atLeast: '5 m/s' }],
  };

  it('prints the account for a person, and answers 2 because nothing has audited it', async () => {
    const { status, out, err } = await check(fallingDocument, []);
    expect(out).toMatch(/gravity/i);
    expect(out).toContain('unaudited');
    expect({ status, err }).toEqual({ status: 2, err: '' });
  });

  it('prints one JSON object and nothing else with --json', async () => {
    const { out, err } = await check(fallingDocument, ['--json']);
    const result = JSON.parse(out) as CheckResult;
    expect(result).toMatchObject({ format: 'joulewright-result/1', file: '-', title: 'Drop', verdict: 'unaudited' });
    expect(result.stepper?.ledgers[0]?.entries[0]?.work).toBeCloseTo(9.80665 ** 2, 9);
    expect(err).toBe('');
  });

  it('answers 0 with --stepper-only where the ledger closes and there is no criterion', async () => {
    expect((await check(fallingDocument, ['--stepper-only'])).status).toBe(0);
  });

  it('answers 0 with --stepper-only where every criterion passes', async () => {
    const { status, out } = await check(asked, ['--stepper-only', '--json']);
    expect((JSON.parse(out) as CheckResult).criteria).toMatchObject([
      { id: 'fast', value: 9.80665, atLeast: 5, passes: true, by: 'stepper' },
    ]);
    expect(status).toBe(0);
  });

  it.each([
    ['fails', { at: '2', atLeast: '10 m/s' }, false],
    ['could not be evaluated', { at: '3', atLeast: '5 m/s' }, null],
  ])('answers 1 with --stepper-only where a criterion %s, and 2 without', async (_, changes, passes) => {
    const stations = [...fallingDocument.stations, { id: '3', when: { time: '0.5 s' } }];
    const document = { ...asked, stations, criteria: [{ ...asked.criteria[0], ...changes }] };
    const result = await check(document, ['--stepper-only', '--json']);
    expect((JSON.parse(result.out) as CheckResult).criteria).toMatchObject([{ id: 'fast', passes }]);
    expect([result.status, (await check(document, [])).status]).toEqual([1, 2]);
  });

  it('answers 2 where the ledger does not close, also with --stepper-only', async () => {
    const { status, out } = await check(fallingDocument, ['--stepper-only', '--json'], fallingEngine(0.99));
    expect((JSON.parse(out) as CheckResult).findings.map(({ code }) => code)).toContain('ledger-open');
    expect(status).toBe(2);
  });

  it('refuses to run what the engine does not simulate, by its finding, with 2', async () => {
    const finding = {
      severity: 'error',
      code: 'not-simulated',
      text: 'Gears are not simulated yet.',
      of: ['g'],
    } as const;
    const engine = { ...fallingEngine(), unsupported: () => [{ ...finding, of: ['g'] }] };
    const { status, out } = await check(fallingDocument, ['--stepper-only', '--json'], engine);
    expect(JSON.parse(out)).toMatchObject({ stepper: null, findings: expect.arrayContaining([finding]) as unknown });
    expect({ status, steps: engine.steps }).toEqual({ status: 2, steps: [] });
  });

  it('lists every problem of a wrong file on standard error, with its place, and answers 3', async () => {
    const wrong = { ...fallingDocument, bodies: [{ ...fallingDocument.bodies[0], mass: '3 mm' }], run: {} };
    const { status, out, err, engine } = await check(wrong, []);
    expect(err).toMatch(/^error: \/bodies\/0\/mass: .*3 mm.*\[wrong-dimension\]$/m);
    expect(err).toMatch(/^error: \/run.*\[missing-key\]$/m);
    expect({ status, out, steps: engine.steps }).toEqual({ status: 3, out: '', steps: [] });
  });

  it('still prints one JSON object for a wrong file with --json: the problems as findings, no run', async () => {
    const { status, out, err } = await check('{"format": "joulewright/1",', ['--json']);
    const result = JSON.parse(out) as CheckResult;
    expect(result).toMatchObject({
      verdict: 'unaudited',
      stepper: null,
      findings: [{ code: 'json-syntax', severity: 'error' }],
    });
    expect(err).toMatch(/\[json-syntax\]\n$/);
    expect(status).toBe(3);
  });

  it('keeps a note about the file among the findings and runs it', async () => {
    const { out, err } = await check({ ...fallingDocument, colour: 'red' }, ['--json']);
    expect((JSON.parse(out) as CheckResult).findings).toMatchObject([{ code: 'unknown-key', pointer: '/colour' }, {}]);
    expect(err).toBe('');
  });

  it.each([
    ['0.25 ms', 0.00025],
    ['0.002', 0.002],
    ['1/1000 s', 0.001],
  ])('steps with --step "%s"', async (typed, step) => {
    expect((await check(fallingDocument, ['--step', typed])).engine.steps).toEqual([step]);
  });

  it.each(['0', '0 s', 'soon', '3 mm', '30 deg', '', 'NaN'])('refuses --step "%s" with 3', async (typed) => {
    const { status, err } = await check(fallingDocument, ['--step', typed]);
    expect(err).toContain(`--step: found "${typed}"; accepted is a time above 0`);
    expect(status).toBe(3);
  });

  it.each(['2 s', '1e-9 s', '1e-300'])('refuses --step "%s" for a run of one second with 3', async (typed) => {
    const { status, err, engine } = await check(fallingDocument, ['--step', typed]);
    expect(err).toContain('accepted, for a run of 1 s, is 1e-8 s to 1 s.');
    expect({ status, steps: engine.steps }).toEqual({ status: 3, steps: [] });
  });

  it('writes result.json and report.txt with --out, into a folder it makes', async () => {
    const out = join(folder, 'new', 'drop');
    const printed = await check(fallingDocument, ['--json', '--out', out]);
    expect(readdirSync(out).sort()).toEqual(['report.txt', 'result.json']);
    expect(readFileSync(join(out, 'result.json'), 'utf8')).toBe(printed.out);
    expect(readFileSync(join(out, 'report.txt'), 'utf8')).toBe((await check(fallingDocument, [])).out);
  });

  it('says why it could not write with --out, and answers 4', async () => {
    const taken = join(folder, 'taken');
    writeFileSync(taken, '');
    const { status, err } = await check(fallingDocument, ['--out', taken]);
    expect(err).toBe(`${taken} cannot be written to: there is a file of that name.\n`);
    expect(status).toBe(4);
  });

  it('shows progress on a watched standard error only, for each of the solvers', async () => {
    const { err } = await check(fallingDocument, [], fallingEngine(), { watched: true, auditor: fallingAuditor() });
    expect(err).toContain('\r 50 %  0.500 s of 1.000 s  stepper\r');
    expect(err).toContain('\r 50 %  0.500 s of 1.000 s  auditor\r');
    expect(err.endsWith('\r\u001b[K')).toBe(true);
  });

  it('answers 0 where stepper and auditor agree, and has both of them beside each other', async () => {
    const audited = { auditor: fallingAuditor() };
    const { status, out } = await check(fallingDocument, [], fallingEngine(), audited);
    expect(out).toMatch(/speed weight, m\/s +9\.8066 +9\.8066 +9\.8066/);
    expect(out).toContain('Agrees, stepper and auditor');
    const { out: json } = await check(fallingDocument, ['--json'], fallingEngine(), audited);
    const result = JSON.parse(json) as CheckResult;
    expect(result).toMatchObject({ verdict: 'agrees', comparison: { parting: null } });
    expect(result.auditor?.stations).toEqual(result.stepper?.stations);
    expect({ status, starts: audited.auditor.starts }).toEqual({ status: 0, starts: [0, 0] });
  });

  it('answers 2 where they differ, names the station and the account, and tries a start a hair away', async () => {
    const auditor = fallingAuditor(0.98);
    const { status, out } = await check(fallingDocument, ['--json'], fallingEngine(), { auditor });
    const { verdict, comparison, findings } = JSON.parse(out) as CheckResult;
    expect({ status, verdict }).toEqual({ status: 2, verdict: 'differs' });
    expect(comparison?.parting).toMatchObject({ station: '2', account: { account: 'gravity', of: 'weight' } });
    expect(findings.map(({ code }) => code)).toEqual(['runs-part', 'account-parts', 'try-smaller-step']);
    expect(auditor.starts).toHaveLength(2);
    expect(auditor.starts[1]).not.toBe(0);
  });

  it('leaves the auditor out with --stepper-only', async () => {
    const auditor = fallingAuditor();
    const { status, out } = await check(fallingDocument, ['--stepper-only', '--json'], fallingEngine(), { auditor });
    expect(JSON.parse(out)).toMatchObject({ verdict: 'unaudited', auditor: null, comparison: null });
    expect({ status, starts: auditor.starts }).toEqual({ status: 0, starts: [] });
  });

  it('is unaudited, with 2, where the auditor refuses the mechanism, and says why', async () => {
    const finding = { severity: 'warning', code: 'not-audited', text: 'The cam is not audited.', of: ['c'] } as const;
    const auditor = { ...fallingAuditor(), unaudited: () => [{ ...finding, of: ['c'] }] };
    const { status, out } = await check(fallingDocument, ['--json'], fallingEngine(), { auditor });
    const result = JSON.parse(out) as CheckResult;
    expect(result).toMatchObject({ verdict: 'unaudited', auditor: null, findings: [finding, { code: 'unaudited' }] });
    expect({ status, starts: auditor.starts }).toEqual({ status: 2, starts: [] });
  });

  it('still audits what the stepper refuses, with nothing to compare it with', async () => {
    const refusal = { severity: 'error' as const, code: 'not-simulated', text: 'No ropes.', of: ['r'] };
    const engine = { ...fallingEngine(), unsupported: () => [refusal] };
    const { status, out } = await check(fallingDocument, ['--json'], engine, { auditor: fallingAuditor() });
    expect(JSON.parse(out)).toMatchObject({ verdict: 'unaudited', stepper: null, comparison: null, auditor: {} });
    expect(status).toBe(2);
  });
});
