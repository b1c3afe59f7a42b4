import { expect, it } from 'vitest';
import { runCommandLine } from '../../../main/cli/cli.js';
import { defaults } from '../../../main/cli/defaults.js';
import { fallingDocument } from './falling.js';
import { recordedTerminal } from './recorded-terminal.js';

async function listed(document: unknown) {
  const terminal = recordedTerminal(JSON.stringify(document));
  const status = await runCommandLine(['defaults', '-'], [defaults], terminal);
  return { status, ...terminal.written };
}

it('lists each default with its place, its value and the reason', async () => {
  const { status, out, err } = await listed(fallingDocument);
  expect(out).toMatch(/^\/gravity +\S.*9\.80665.* {2}\S/m);
  expect({ status, err }).toEqual({ status: 0, err: '' });
});

it('does not list what the file says', async () => {
  expect((await listed({ ...fallingDocument, gravity: [0, -1.62] })).out).not.toContain('/gravity');
});

it('lists the problems of a wrong file instead, and answers 3', async () => {
  const { status, out, err } = await listed({ format: 'joulewright/9' });
  expect(err).toMatch(/\[wrong-format\]/);
  expect({ status, out }).toEqual({ status: 3, out: '' });
});
