import { build } from 'esbuild';
import { readdirSync } from 'node:fs';
import { basename, resolve } from 'node:path';
import { bundle } from './build.js';
import { node, root } from './run.js';

/**
 * Runs `tests/bench/*.bench.ts`, each compiled and in a process of its own; words on the command line
 * choose those whose name contains one. Each prints its own table; one that misses its bound ends with a status other than 0.
 */
const folder = resolve(root, 'tests/bench');
const words = process.argv.slice(2);
const chosen = readdirSync(folder)
  .filter((name) => name.endsWith('.bench.ts'))
  .filter((name) => words.length === 0 || words.some((word) => name.includes(word)));

await build({
  ...bundle,
  target: 'node20',
  packages: 'external',
  entryPoints: chosen.map((name) => resolve(folder, name)),
  outdir: 'dist/bench',
});

const missed = chosen.filter((name) => {
  console.log(`\n── ${basename(name, '.bench.ts')}`);
  return node(['--enable-source-maps', `dist/bench/${basename(name, '.ts')}.js`]) !== 0;
});

if (chosen.length === 0) console.error(`No benchmark is named like ${words.join(', ')}.`);
if (missed.length > 0) console.error(`\nMissed: ${missed.join(', ')}`);
process.exitCode = missed.length > 0 || chosen.length === 0 ? 1 : 0;
