import { spawnSync } from 'node:child_process';
import { createRequire } from 'node:module';
import { resolve } from 'node:path';
import { buildAll } from './build.js';
import { node, root } from './run.js';

/** Opened when `npm start` is given no file. */
const demo = 'assets/examples/gravity-feed.json';

/** Path of Electron's program, fetched at its first use; null where it cannot be had. */
function electronProgram(): string | null {
  const fetched = spawnSync(process.execPath, ['-e', "require('electron')"], {
    cwd: root,
    stdio: 'ignore',
    timeout: 300_000,
  });
  return fetched.status === 0 ? (createRequire(import.meta.url)('electron') as string) : null;
}

const file = resolve(process.argv[2] ?? resolve(root, demo));
await buildAll();
const electron = electronProgram();
if (electron !== null) process.exitCode = spawnSync(electron, [root, file], { stdio: 'inherit' }).status ?? 1;
else {
  console.error('Electron’s runtime cannot be had here, so the window opens in the browser.');
  process.exitCode = node(['dist/serve/serve.js', file]);
}
