import { spawnSync } from 'node:child_process';
import { existsSync } from 'node:fs';
import { createRequire } from 'node:module';
import { resolve } from 'node:path';
import { buildAll } from './build.js';
import { node, root } from './run.js';

/** Opened when `npm start` is given no file. */
const demo = resolve(root, 'assets/examples/gravity-feed.json');

/** Electron that ends this soon with an error [ms] never showed a window: no display, or no rights. */
const tooSoon = 10_000;

/** Path of Electron's program, fetched at its first use; null where it cannot be had. */
function electronProgram(): string | null {
  const isThere = existsSync(resolve(root, 'node_modules/electron/path.txt'));
  if (!isThere) console.error('Fetching Electron’s runtime, this once …');
  const fetched = spawnSync(process.execPath, ['-e', "require('electron')"], { cwd: root, stdio: 'ignore' });
  return fetched.status === 0 ? (createRequire(import.meta.url)('electron') as string) : null;
}

/** Shows a file in Electron; why that was not possible, or null once its window was closed. */
function showInElectron(file: string): string | null {
  const program = electronProgram();
  if (program === null) return 'Electron’s runtime cannot be had here';
  const started = Date.now();
  const { status } = spawnSync(program, [root, file], { stdio: 'inherit' });
  return status !== 0 && Date.now() - started < tooSoon ? 'Electron cannot open a window here' : null;
}

const [asked] = process.argv.slice(2);
const file = asked === undefined ? demo : resolve(process.env.INIT_CWD ?? root, asked);
await buildAll();
const obstacle = showInElectron(file);
if (obstacle !== null) {
  console.error(`${obstacle}, so the same window opens in the browser.`);
  process.exitCode = node(['dist/serve/serve.js', file]);
}
