import type { Problem } from '../../sim/core/problem.js';
import { readMechanism, type ReadResult } from '../../sim/mechanism/index.js';
import { readInput } from './read-input.js';
import type { Terminal } from './terminal.js';

/** Reads the mechanism in a file; a file that cannot be read is one problem, like any other. */
export async function readFile(file: string, terminal: Terminal): Promise<ReadResult> {
  const input = await readInput(file, terminal);
  if ('problem' in input) return { document: null, mechanism: null, problems: [input.problem], defaults: [] };
  return readMechanism(input.text, { fileSize: input.size });
}

/** One problem as a line for standard error: severity, place, sentence, code. */
export function problemLine({ severity, code, text, pointer }: Problem): string {
  return `${severity}: ${pointer === '' ? '' : `${pointer}: `}${text} [${code}]\n`;
}
