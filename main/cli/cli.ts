import { parseArgs } from 'node:util';
import { UsageError, type Command, type OptionValues } from './command.js';
import { help } from './help.js';
import { status, type Status } from './status.js';
import type { Terminal } from './terminal.js';
import { version } from './version.js';

const general = { help: { type: 'boolean', short: 'h' }, version: { type: 'boolean' } } as const;

/** Runs what was typed after `joulewright`; answers the exit status and throws nothing. */
export async function runCommandLine(
  typed: readonly string[],
  commands: readonly Command[],
  terminal: Terminal,
): Promise<Status> {
  try {
    return await dispatch(typed, commands, terminal);
  } catch (error) {
    if (error instanceof UsageError) {
      terminal.err(`${error.message}\nSee joulewright --help.\n`);
      return status.inputWrong;
    }
    terminal.err(`Internal error: ${oneLine(error)}\n`);
    return status.internalError;
  }
}

async function dispatch(typed: readonly string[], commands: readonly Command[], terminal: Terminal): Promise<Status> {
  const command = commands.find((each) => each.name === typed[0]);
  const { values, positionals } = parse(command === undefined ? typed : typed.slice(1), command);
  if (values.help === true || typed.length === 0) return print(help(commands), terminal);
  if (values.version === true) return print(`${version()}\n`, terminal);
  const names = commands.map((each) => each.name).join(', ');
  if (command === undefined) throw new UsageError(`There is no command '${typed[0]}'; there are: ${names}.`);
  const [file, ...rest] = positionals;
  if (file === undefined)
    throw new UsageError(`'${command.name}' needs the name of a mechanism file, or - for standard input.`);
  if (rest.length > 0) throw new UsageError(`'${command.name}' takes one file; found also: ${rest.join(', ')}.`);
  return command.run(file, values, terminal);
}

function parse(args: readonly string[], command: Command | undefined): { values: OptionValues; positionals: string[] } {
  try {
    const config = { args: [...args], options: { ...general, ...command?.options }, allowPositionals: true };
    const { values, positionals } = parseArgs(config);
    return { values: values, positionals };
  } catch (error) {
    throw new UsageError((error as Error).message.replace(/\.? To specify a positional.*$/s, '.'));
  }
}

function print(text: string, terminal: Terminal): Status {
  terminal.out(text);
  return status.done;
}

function oneLine(error: unknown): string {
  const message = error instanceof Error ? `${error.name}: ${error.message}` : String(error);
  return message.replace(/\s+/g, ' ');
}
