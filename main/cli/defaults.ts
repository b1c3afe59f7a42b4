import type { Command } from './command.js';
import { problemLine, readFile } from './read-file.js';
import { status } from './status.js';

/** `joulewright defaults FILE`: every default that was applied to a document, with the reason. */
export const defaults: Command = {
  name: 'defaults',
  usage: `  joulewright defaults FILE
      lists every default applied to the file: its place, the value, and why`,
  options: {},
  async run(file, _options, terminal) {
    const read = await readFile(file, terminal);
    terminal.err(read.problems.map(problemLine).join(''));
    if (read.mechanism === null) return status.inputWrong;
    terminal.out(table(read.defaults.map((each) => [each.pointer, each.value, each.why])));
    return status.done;
  },
};

/** Rows of text in columns as wide as their widest cell. */
function table(rows: readonly string[][]): string {
  const widths = (rows[0] ?? []).map((_, column) => Math.max(...rows.map((row) => row[column].length)));
  const line = (row: string[]) => row.map((cell, column) => cell.padEnd(widths[column])).join('  ');
  return rows.map((row) => `${line(row).trimEnd()}\n`).join('');
}
