import { describe, expect, it } from 'vitest';
import type { CheckResult } from '../../../sim/report/index.js';
import { exitStatus } from '../../../sim/report/index.js';

function result(changes: Partial<CheckResult>): CheckResult {
  const empty = { findings: [], stepper: null, auditor: null, comparison: null, handCheck: [], criteria: [] };
  return { format: 'joulewright-result/1', file: '', title: '', verdict: 'agrees', ...empty, ...changes };
}
const criterion = (passes: boolean | null): CheckResult['criteria'][0] => ({
  ...{ id: 'q', measure: 'speed', unit: 'm/s', value: 1, by: null },
  passes,
});
const error = { severity: 'error' as const, code: 'ledger-open', text: '', of: [] };

describe('exitStatus', () => {
  it('is 0 where the runs agree and all criteria pass', () => {
    expect(exitStatus(result({ criteria: [criterion(true)] }))).toBe(0);
    expect(exitStatus(result({}))).toBe(0);
  });

  it('is 1 where a criterion fails or was not evaluated', () => {
    expect(exitStatus(result({ criteria: [criterion(true), criterion(false)] }))).toBe(1);
    expect(exitStatus(result({ criteria: [criterion(null)] }))).toBe(1);
  });

  it('is 2 where the runs differ or nothing audited the run, also when a criterion fails', () => {
    expect(exitStatus(result({ verdict: 'differs' }))).toBe(2);
    expect(exitStatus(result({ verdict: 'unaudited', criteria: [criterion(false)] }))).toBe(2);
  });

  it('does not mind that nothing audited the run where only the stepper was asked for', () => {
    const options = { stepperOnly: true };
    expect(exitStatus(result({ verdict: 'unaudited' }), options)).toBe(0);
    expect(exitStatus(result({ verdict: 'unaudited', criteria: [criterion(null)] }), options)).toBe(1);
  });

  it('is 2 for any error of the run, such as a ledger that does not close, whatever was asked for', () => {
    expect(exitStatus(result({ findings: [error] }))).toBe(2);
    expect(exitStatus(result({ findings: [error], verdict: 'unaudited' }), { stepperOnly: true })).toBe(2);
    expect(exitStatus(result({ findings: [{ ...error, severity: 'warning' }] }))).toBe(0);
  });

  it('is 3 where an error is in the file, but not for its warnings', () => {
    expect(exitStatus(result({ findings: [error, { ...error, pointer: '' }] }))).toBe(3);
    expect(exitStatus(result({ findings: [{ ...error, severity: 'warning', pointer: '/a' }] }))).toBe(0);
  });
});
