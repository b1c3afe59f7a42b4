import type { ParseArgsConfig } from 'node:util';
import type { Status } from './status.js';
import type { Terminal } from './terminal.js';

/** Values of the options a command declares, as `parseArgs` gives them. */
export type OptionValues = Readonly<Record<string, string | boolean | undefined>>;

/** One command of the command line. */
export interface Command {
  name: string;
  /** Its line and the lines of its options in the help. */
  usage: string;
  options: NonNullable<ParseArgsConfig['options']>;
  run(file: string, options: OptionValues, terminal: Terminal): Promise<Status>;
}

/** The command line itself is wrong: what was typed cannot be meant. */
export class UsageError extends Error {
  override name = 'UsageError';
}
