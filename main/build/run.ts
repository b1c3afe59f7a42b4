import { spawnSync, type SpawnSyncOptions } from 'node:child_process';
import { resolve } from 'node:path';

export const root = resolve(import.meta.dirname, '../..');

/** Runs a program of Node's in the repository's folder, on this terminal; its exit status, 1 where a signal ended it. */
export function node(args: readonly string[], options: SpawnSyncOptions = {}): number {
  return spawnSync(process.execPath, args, { cwd: root, stdio: 'inherit', ...options }).status ?? 1;
}

/** Runs a script of package.json; its exit status. */
export function npmRun(script: string, env: NodeJS.ProcessEnv = {}): number {
  const npm = process.env.npm_execpath;
  const options: SpawnSyncOptions = { cwd: root, stdio: 'inherit', env: { ...process.env, ...env } };
  const args = ['run', '--silent', script];
  if (npm?.endsWith('.js')) return node([npm, ...args], options);
  return spawnSync('npm', args, { ...options, shell: process.platform === 'win32' }).status ?? 1;
}
