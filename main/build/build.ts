import { build, type BuildOptions } from 'esbuild';
import { realpathSync } from 'node:fs';
import { rm } from 'node:fs/promises';
import { resolve } from 'node:path';
import { fileURLToPath } from 'node:url';

export const root = resolve(import.meta.dirname, '../..');

const shared: BuildOptions = {
  absWorkingDir: root,
  bundle: true,
  platform: 'node',
  sourcemap: true,
  logLevel: 'warning',
  legalComments: 'linked',
};
const esm = { ...shared, format: 'esm', banner: { js: requireForBundledCommonJs() } } satisfies BuildOptions;

/** Bundled CommonJS packages ask for `require`, which an ES module has not. */
function requireForBundledCommonJs(): string {
  return "import { createRequire as __createRequire } from 'node:module'; const require = __createRequire(import.meta.url);";
}

const targets = {
  cli: { ...esm, target: 'node20', entryPoints: ['main/cli/main.ts'], outfile: 'dist/cli/main.js' },
  main: {
    ...esm,
    target: 'node22',
    external: ['electron'],
    entryPoints: { 'main/main': 'main/main.ts', 'serve/serve': 'main/serve/serve.ts' },
    outdir: 'dist',
  },
  preload: {
    ...shared,
    format: 'cjs',
    target: 'node22',
    external: ['electron'],
    entryPoints: ['main/preload.ts'],
    outfile: 'dist/main/preload.cjs',
  },
} satisfies Record<string, BuildOptions>;

/** Builds the command line alone (what `joulewright` does when its sources are newer than its bundle). */
export async function buildCommandLine(): Promise<void> {
  await build(targets.cli);
}

/** Builds everything that runs: command line, Electron's main process and preload, loopback server, window. */
export async function buildAll(): Promise<void> {
  await Promise.all(
    ['cli', 'main', 'serve', 'renderer'].map((each) =>
      rm(resolve(root, 'dist', each), { recursive: true, force: true }),
    ),
  );
  await Promise.all([build(targets.cli), build(targets.main), build(targets.preload)]);
  const { build: buildWindow } = await import('vite');
  await buildWindow({ configFile: resolve(root, '.config/vite.config.ts'), logLevel: 'warn' });
}

if (realpathSync(process.argv[1] ?? '') === fileURLToPath(import.meta.url))
  await (process.argv[2] === 'cli' ? buildCommandLine() : buildAll());
