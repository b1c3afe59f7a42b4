import { readdirSync } from 'node:fs';
import { resolve } from 'node:path';
import * as v from 'valibot';
import { beforeAll, describe, expect, it } from 'vitest';
import { resultSchema, type CheckResult } from '../../sim/report/result.js';
import { joulewright, root, type Outcome } from './joulewright.js';

const folder = 'assets/examples';
const examples = readdirSync(resolve(root, folder)).filter((name) => name.endsWith('.json'));

/** What none of the examples may be found to be. */
const faults = ['ledger-open', 'numerical-over-limit', 'station-not-reached', 'no-account'];

describe.each(examples)('joulewright check %s', (name) => {
  const file = `${folder}/${name}`;
  let first: Outcome;
  let second: Outcome;
  let read: Outcome;
  let result: CheckResult;
  beforeAll(async () => {
    [first, read] = await Promise.all([joulewright(['check', file, '--json']), joulewright(['check', file])]);
    second = await joulewright(['check', file, '--json', '--stepper-only']);
    result = JSON.parse(first.out) as CheckResult;
  });

  it('prints with --json a result as the contract has it, and nothing else', () => {
    expect(v.safeParse(resultSchema, result).issues).toBeUndefined();
    expect(result).toMatchObject({ file, verdict: 'agrees' });
    expect({ status: first.status, err: first.err }).toEqual({ status: 0, err: '' });
  });

  it('reaches every station, closes every ledger, and keeps `numerical` below its limit', () => {
    const bad = result.findings.filter(({ severity, code }) => severity === 'error' || faults.includes(code));
    expect(bad).toEqual([]);
    expect(result.stepper?.ledgers.length).toBeGreaterThan(0);
  });

  it('answers --stepper-only by its criteria alone, with the same figures to the byte', () => {
    expect(result.criteria.map(({ passes }) => passes)).toEqual(result.criteria.map(() => true));
    expect(second.status).toBe(0);
    const alone = JSON.parse(second.out) as CheckResult;
    expect(alone).toMatchObject({ verdict: 'unaudited', auditor: null, comparison: null });
    expect(JSON.stringify(alone.stepper)).toBe(JSON.stringify(result.stepper));
  });

  it('prints for a person the title, every station and the verdict', () => {
    for (const { id } of result.stepper!.stations) expect(read.out).toMatch(new RegExp(`^${id}\\s`, 'm'));
    expect(read.out).toContain('Agrees, stepper and auditor');
    expect(read.out.split('\n')[1]).toBe(result.title);
    expect(read.err).toBe('');
  });
});

it('has at least six mechanisms to show', () => {
  expect(examples.length).toBeGreaterThanOrEqual(6);
});
