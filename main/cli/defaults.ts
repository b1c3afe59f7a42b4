import { readMechanism } from '../../sim/mechanism/index.js';
import type { Command } from './command.js';
import { problemLine } from './problems.js';
import { readInput } from './read-input.js';
import { status } from './status.js';

/** `joulewright defaults FILE`: every default that was applied to a document, with the reason. */
export const defaults: Command = {
  name: 'defaults',
  usage: `  joulewright defaults FILE
      lists every default applied to the file: its place, the value, and why`,
  options: {},
  async run(file, _options, terminal) {
    const input = await readInput(file, terminal);
    if ('reason' in input) {
      terminal.err(`error: ${input.reason}\n`);
      return status.inputWrong;
    }
    const read = readMechanism(input.text, { fileSize: input.size });
    terminal.err(read.problems.map(problemLine).join(''));
    if (read.mechanism === null) return status.inputWrong;
    terminal.out(table(read.defaults.map((each) => [each.pointer, each.value, each.why])));
    return status.passes;
  },
};

/** Rows of text in columns as wide as their widest cell. */
function table(rows: readonly string[][]): string {
  const widths = (rows[0] ?? []).map((_, column) => Math.max(...rows.map((row) => row[column].length)));
  const line = (row: string[]) =>
    row
      .map((cell, column) => cell.padEnd(widths[column]))
      .join('  ')
      .trimEnd();
  return rows.map((row) => `${line(row)}\n`).join('');
}
