import { readdirSync, readFileSync } from 'node:fs';
import { resolve } from 'node:path';
import { expect, it } from 'vitest';
import { joulewright, root } from './joulewright.js';

const [first] = readdirSync(resolve(root, 'assets/examples')).filter((name) => name.endsWith('.json'));
const example = `assets/examples/${first}`;

it('starts in under half a second', async () => {
  const times: number[] = [];
  for (let i = 0; i < 5; i++) times.push((await joulewright(['--version'])).took);
  expect(Math.min(...times), `starts: ${times.map((time) => time.toFixed()).join(', ')} ms`).toBeLessThan(500);
});

it('reads standard input for -, from any folder, with the same account as from the file', async () => {
  const input = readFileSync(resolve(root, example));
  const piped = await joulewright(['check', '-', '--json'], { cwd: resolve(root, 'tests'), input });
  const named = await joulewright(['check', example, '--json']);
  const account = ({ out }: { out: string }) => ({ ...(JSON.parse(out) as object), file: null });
  expect(account(piped)).toEqual(account(named));
});

it.each([['check', example], ['check', example, '--json'], ['--help']])(
  'ends quietly when the reader has seen enough: %j',
  async (...args) => {
    const { err } = await joulewright(args, { readOnlyFirst: true });
    expect(err).toBe('');
  },
);

it('lists the defaults of an example', async () => {
  const { status, out, err } = await joulewright(['defaults', example]);
  expect(out).toMatch(/^\/\S+ {2}/m);
  expect({ status, err }).toEqual({ status: 0, err: '' });
});
