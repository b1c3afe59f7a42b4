import { readdirSync, readFileSync } from 'node:fs';
import { resolve } from 'node:path';
import { describe, expect, it } from 'vitest';
import { readMechanism } from '../../sim/mechanism/index.js';
import { checkResult, type CheckResult } from '../../sim/report/index.js';
import { runStepper } from '../../sim/stepper/index.js';
import { joulewright, root } from './joulewright.js';

const folder = 'assets/examples';
const names = readdirSync(resolve(root, folder)).filter((name) => name.endsWith('.json'));

describe.each(names)('the built command line on %s', (name) => {
  it('prints the very figures that the sources give, to the last digit', async () => {
    const file = `${folder}/${name}`;
    const { mechanism, problems } = readMechanism(readFileSync(resolve(root, file), 'utf8'));
    if (!mechanism) throw new Error(`${name} is not read`);
    const here = checkResult({ file, title: mechanism.title, mechanism, stepper: runStepper(mechanism), problems });
    const { out } = await joulewright(['check', file, '--json', '--stepper-only']);
    const there = JSON.parse(out) as CheckResult;
    expect(there.stepper).toEqual(JSON.parse(JSON.stringify(here.stepper)));
  });
});
