import { build, type BuildOptions } from 'esbuild';
import { realpathSync } from 'node:fs';
import { rm } from 'node:fs/promises';
import { resolve } from 'node:path';
import { fileURLToPath } from 'node:url';
import { root } from './run.js';

const shared = {
  absWorkingDir: root,
  bundle: true,
  platform: 'node',
  sourcemap: true,
  logLevel: 'warning',
  legalComments: 'linked',
} satisfies BuildOptions;

/** An ES module for Node. Bundled CommonJS packages ask for `require`, which such a module has not of itself. */
export const bundle = {
  ...shared,
  format: 'esm',
  banner: {
    js: "import { createRequire as __createRequire } from 'node:module'; const require = __createRequire(import.meta.url);",
  },
} satisfies BuildOptions;

const commandLine: BuildOptions = {
  ...bundle,
  target: 'node20',
  entryPoints: ['main/cli/main.ts'],
  outfile: 'dist/cli/main.js',
};
const processes: BuildOptions = {
  ...bundle,
  target: 'node22',
  external: ['electron'],
  entryPoints: { 'main/main': 'main/main.ts' },
  outdir: 'dist',
};
const server: BuildOptions = {
  ...bundle,
  target: 'node20',
  entryPoints: { 'serve/serve': 'main/serve/serve.ts' },
  outdir: 'dist',
};
const preload: BuildOptions = {
  ...shared,
  format: 'cjs',
  target: 'node22',
  external: ['electron'],
  entryPoints: ['main/preload.ts'],
  outfile: 'dist/main/preload.cjs',
};

/** Builds the command line alone (what `joulewright` does when its sources are newer than its bundle). */
export async function buildCommandLine(): Promise<void> {
  await build(commandLine);
}

/** Builds everything that runs: command line, Electron's main process and preload, loopback server, window. */
export async function buildAll(): Promise<void> {
  await Promise.all(
    ['cli', 'main', 'serve'].map((each) => rm(resolve(root, 'dist', each), { recursive: true, force: true })),
  );
  await Promise.all([commandLine, processes, server, preload].map((options) => build(options)));
  const { build: buildWindow } = await import('vite');
  await buildWindow({ configFile: resolve(root, '.config/vite.config.ts'), logLevel: 'warn' });
}

if (realpathSync(process.argv[1] ?? '') === fileURLToPath(import.meta.url)) {
  try {
    await (process.argv[2] === 'cli' ? buildCommandLine() : buildAll());
  } catch (error) {
    // The bundlers have shown where; a stack of theirs would bury it.
    console.error((error as Error).message);
    process.exitCode = 1;
  }
}
