#!/usr/bin/env node
// The `bin` of package.json. In a checkout it bundles the command line at first use and whenever a source is newer than
// the bundle, so that `npx joulewright` needs no command before it; in a packed program only the bundle is there.
import { spawnSync } from 'node:child_process';
import { existsSync, readdirSync, statSync } from 'node:fs';
import { resolve } from 'node:path';
import { pathToFileURL } from 'node:url';

const root = resolve(import.meta.dirname, '../..');
const bundle = resolve(root, 'dist/cli/main.js');

/** Whether a source that goes into the bundle was changed after `time` [ms]. @param {number} time */
function changedSince(time) {
  const isNewer = (/** @type {string} */ path) => statSync(path).mtimeMs > time;
  return ['sim', 'main/cli', 'package-lock.json'].some((part) => {
    const path = resolve(root, part);
    if (!existsSync(path)) return false;
    if (statSync(path).isFile()) return isNewer(path);
    return readdirSync(path, { recursive: true, withFileTypes: true })
      .filter((entry) => entry.name.endsWith('.ts') || entry.isDirectory())
      .some((entry) => isNewer(resolve(entry.parentPath, entry.name)));
  });
}

/** Installs what is missing and bundles the command line; standard output stays the command's own. */
async function bringUpToDate() {
  const { setUp } = await import('../build/setup.js');
  try {
    setUp();
  } catch (error) {
    return fail(/** @type {Error} */ (error).message);
  }
  const tsx = resolve(root, 'node_modules/tsx/dist/cli.mjs');
  const built = spawnSync(process.execPath, [tsx, 'main/build/build.ts', 'cli'], {
    cwd: root,
    stdio: ['ignore', 2, 2],
  });
  if (built.status !== 0) fail('The command line could not be built (see above).');
}

/** An internal error, as the file contract has it. @param {string} sentence */
function fail(sentence) {
  process.stderr.write(`${sentence}\n`);
  process.exit(4);
}

if (!existsSync(bundle) || changedSince(statSync(bundle).mtimeMs)) await bringUpToDate();
await import(pathToFileURL(bundle).href);
