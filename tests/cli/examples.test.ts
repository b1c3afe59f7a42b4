import { readdirSync } from 'node:fs';
import { resolve } from 'node:path';
import * as v from 'valibot';
import { describe, expect, it } from 'vitest';
import { resultSchema } from '../../sim/report/result.js';
import { joulewright, root } from './joulewright.js';

const folder = 'assets/examples';
const examples = readdirSync(resolve(root, folder)).filter((name) => name.endsWith('.json'));

describe.each(examples)('joulewright check %s', (name) => {
  const file = `${folder}/${name}`;

  it('prints a result as the contract has it, whose ledgers close, with `numerical` below its limit', async () => {
    const { status, out, err } = await joulewright(['check', file, '--json']);
    const result = v.parse(resultSchema, JSON.parse(out));
    const codes = result.findings.map(({ code }) => code);
    expect(codes).not.toEqual(expect.arrayContaining(['ledger-open']));
    expect(codes).not.toEqual(expect.arrayContaining(['numerical-over-limit']));
    expect(result.findings.filter(({ severity }) => severity === 'error')).toEqual([]);
    expect(result.stepper?.ledgers.length).toBeGreaterThan(0);
    expect({ status, err }).toEqual({ status: 2, err: '' });
  });

  it('prints an account for a person that names every station reached', async () => {
    const { out, err } = await joulewright(['check', file, '--stepper-only']);
    const { out: json } = await joulewright(['check', file, '--json']);
    const { stepper, title } = v.parse(resultSchema, JSON.parse(json));
    expect(out).toContain(title);
    for (const { id } of stepper!.stations) expect(out).toContain(id);
    expect(err).toBe('');
  });

  it('gives the same bytes twice', async () => {
    const [first, second] = await Promise.all([
      joulewright(['check', file, '--json']),
      joulewright(['check', file, '--json']),
    ]);
    expect(second.out).toBe(first.out);
  });
});

it('has at least six mechanisms to show', () => {
  expect(examples.length).toBeGreaterThanOrEqual(6);
});
