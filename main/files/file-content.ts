import { readFile, stat } from 'node:fs/promises';
import { basename } from 'node:path';
import type { FileContent } from '../ipc/contract.js';

/** Larger files are not read: no mechanism is that large, and the window would stand still [bytes]. */
export const largestFile = 64 * 1024 * 1024;

/**
 * Reads a mechanism file as it is; what is wrong in it is the reader's business.
 *
 * @throws Error with one sentence for people, where it cannot be read
 */
export async function readFileContent(path: string): Promise<FileContent> {
  const name = basename(path);
  const { size } = await stat(path).catch((error: unknown) => {
    throw new Error(`${name} cannot be read: ${reasonOf(error)}.`);
  });
  if (size > largestFile) throw new Error(`${name} has ${size} bytes; the most that is read is ${largestFile}.`);
  const text = await readFile(path, 'utf8').catch((error: unknown) => {
    throw new Error(`${name} cannot be read: ${reasonOf(error)}.`);
  });
  return { name, text, size };
}

function reasonOf(error: unknown): string {
  const code = error instanceof Error && 'code' in error ? String(error.code) : '';
  const reasons: Record<string, string> = {
    ENOENT: 'there is no such file',
    EACCES: 'it may not be read',
    EISDIR: 'it is a folder',
  };
  return reasons[code] ?? (error instanceof Error ? error.message : String(error));
}
