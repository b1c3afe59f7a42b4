import { mkdir, writeFile } from 'node:fs/promises';
import { join } from 'node:path';
import { reasonOf } from './read-input.js';

/** Writes files by name into a folder, which is made where there is none; a sentence on what went wrong, or null. */
export async function writeFiles(folder: string, files: Readonly<Record<string, string>>): Promise<string | null> {
  try {
    await mkdir(folder, { recursive: true });
    for (const [name, content] of Object.entries(files)) await writeFile(join(folder, name), content);
    return null;
  } catch (error) {
    return `${folder} cannot be written to: ${reasonOf(error)}.`;
  }
}
