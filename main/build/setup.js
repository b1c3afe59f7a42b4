// Runs before anything is installed: Node's own modules only.
import { spawnSync } from 'node:child_process';
import { existsSync, readFileSync, realpathSync } from 'node:fs';
import { resolve } from 'node:path';
import { fileURLToPath } from 'node:url';

const root = resolve(import.meta.dirname, '../..');
const oldest = /** @type {const} */ ([20, 19]);

/**
 * @typedef {{ version?: string, optional?: boolean, link?: boolean }} Locked
 * @param {string} file
 * @returns {Record<string, Locked>}
 */
function lockedPackages(file) {
  return JSON.parse(readFileSync(file, 'utf8')).packages;
}

/** Whether every package of the lock file is installed in the locked version; optional ones may be missing. */
export function isInstalled(folder = root) {
  const installedList = resolve(folder, 'node_modules/.package-lock.json');
  if (!existsSync(installedList)) return false;
  const installed = lockedPackages(installedList);
  return Object.entries(lockedPackages(resolve(folder, 'package-lock.json'))).every(([path, wanted]) => {
    const found = installed[path];
    return path === '' || (found === undefined ? wanted.optional === true : found.version === wanted.version);
  });
}

/** Installs the locked packages where they are missing or stale; npm's output goes to standard error. */
export function setUp() {
  const [major = 0, minor = 0] = process.versions.node.split('.').map(Number);
  if (major < oldest[0] || (major === oldest[0] && minor < oldest[1]))
    throw new Error(`Joulewright needs Node ${oldest.join('.')} or newer; this is Node ${process.versions.node}.`);
  if (isInstalled()) return;
  process.stderr.write('Installing the packages of package-lock.json …\n');
  if (npmCi() !== 0) throw new Error('The packages could not be installed: `npm ci` failed (see above).');
}

/** Exit status of `npm ci`, run by the npm that runs this script where there is one. */
function npmCi() {
  const npm = process.env.npm_execpath;
  const args = ['ci', '--no-audit', '--no-fund', '--loglevel=error'];
  /** @type {import('node:child_process').SpawnSyncOptions} */
  const options = { cwd: root, stdio: ['ignore', 2, 2] };
  if (npm?.endsWith('.js')) return spawnSync(process.execPath, [npm, ...args], options).status;
  return spawnSync('npm', args, { ...options, shell: process.platform === 'win32' }).status;
}

if (realpathSync(process.argv[1] ?? '') === fileURLToPath(import.meta.url)) {
  try {
    setUp();
  } catch (error) {
    process.stderr.write(`${/** @type {Error} */ (error).message}\n`);
    process.exitCode = 1;
  }
}
