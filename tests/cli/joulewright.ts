import { spawn } from 'node:child_process';
import { resolve } from 'node:path';

export const root = resolve(import.meta.dirname, '../..');
const launcher = resolve(root, 'main/cli/joulewright.js');

export interface Outcome {
  status: number | null;
  out: string;
  err: string;
  /** Wall-clock time [ms]. */
  took: number;
}

export interface HowToRun {
  cwd?: string;
  input?: string | Uint8Array;
  /** Close its standard output after the first bytes, as `| head` does. */
  readOnlyFirst?: boolean;
}

/** Runs the built command line as a user does, in a process of its own. */
export function joulewright(
  args: readonly string[],
  { cwd = root, input, readOnlyFirst }: HowToRun = {},
): Promise<Outcome> {
  const started = performance.now();
  const child = spawn(process.execPath, [launcher, ...args], { cwd });
  const text = { out: '', err: '' };
  child.stdout.setEncoding('utf8').on('data', (part: string) => {
    text.out += part;
    if (readOnlyFirst) child.stdout.destroy();
  });
  child.stderr.setEncoding('utf8').on('data', (part: string) => (text.err += part));
  child.stdin.on('error', () => undefined);
  child.stdin.end(input);
  return new Promise((done, failed) => {
    child.on('error', failed);
    child.on('close', (status) => done({ status, ...text, took: performance.now() - started }));
  });
}
