import type { Command } from './command.js';

const statuses = `Exit status
  0  all criteria pass and the runs agree
  1  a criterion fails, or could not be evaluated
  2  the runs differ, a ledger does not close, or the run is unaudited
     (0 or 1 with --stepper-only)
  3  the file cannot be read or is wrong, or the command line is
  4  internal error`;

/** The help of the whole command line. */
export function help(commands: readonly Command[]): string {
  return `joulewright — every joule of a planar mechanism between two marked instants, by cause

${commands.map((command) => command.usage).join('\n\n')}

  joulewright --help | --version

FILE is a mechanism file (assets/schema/README.md describes it); - reads standard input.

${statuses}
`;
}
