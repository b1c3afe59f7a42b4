import { open, type FileHandle } from 'node:fs/promises';
import type { Problem } from '../../sim/core/problem.js';
import type { Terminal } from './terminal.js';

/** The text of a file as found, and its size [bytes]; or the problem why there is none. */
export type Input = { text: string; size: number } | { problem: Problem };

/** Not a byte is read beyond this size [bytes]. The reader of the document accepts less, and says how much. */
const most = 64 * 2 ** 20;

const reasons: Readonly<Record<string, string>> = {
  ENOENT: 'there is no such file',
  ENOTDIR: 'a part of its path is a file, not a folder',
  EISDIR: 'it is a folder, not a file',
  EACCES: 'permission is denied',
  EPERM: 'permission is denied',
  ENAMETOOLONG: 'its name is too long',
  ELOOP: 'its links lead in a circle',
  ENOSPC: 'the disk is full',
  EROFS: 'the disk is for reading only',
  EEXIST: 'there is a file of that name',
};

/** Reads a file, or standard input where `file` is `-`. */
export async function readInput(file: string, terminal: Terminal): Promise<Input> {
  if (file === '-') return collect('Standard input', terminal.stdin());
  let handle: FileHandle | undefined;
  try {
    handle = await open(file);
    if ((await handle.stat()).isDirectory()) return unreadable(`${file} cannot be read: ${reasons.EISDIR}.`);
    return await collect(file, handle.createReadStream({ autoClose: false }));
  } catch (error) {
    return unreadable(`${file} cannot be read: ${reasonOf(error)}.`);
  } finally {
    await handle?.close();
  }
}

/** What went wrong with a file, in words. */
export function reasonOf(error: unknown): string {
  const { code, message } = error as NodeJS.ErrnoException;
  return (code === undefined ? undefined : reasons[code]) ?? message;
}

async function collect(name: string, chunks: AsyncIterable<Uint8Array>): Promise<Input> {
  const parts: Uint8Array[] = [];
  let size = 0;
  for await (const chunk of chunks) {
    size += chunk.length;
    if (size > most) return unreadable(`${name} is larger than ${most / 2 ** 20} MiB, which no mechanism file is.`);
    parts.push(chunk);
  }
  try {
    return { text: new TextDecoder('utf-8', { fatal: true }).decode(Buffer.concat(parts)), size };
  } catch {
    return unreadable(`${name} is not text in UTF-8, so it is no mechanism file.`);
  }
}

function unreadable(text: string): Input {
  return { problem: { severity: 'error', code: 'file-unreadable', text, pointer: '', of: [] } };
}
