import { describe, expect, it } from 'vitest';
import { runCommandLine } from '../../../main/cli/cli.js';
import type { Command, OptionValues } from '../../../main/cli/command.js';
import { recordedTerminal } from './recorded-terminal.js';

/** Runs `typed` with one command `weigh`, which takes `--fine` and `--by WORD`; `called` is what reached it. */
async function run(typed: string[], fails?: Error) {
  const called: { file?: string; options?: OptionValues } = {};
  const weigh: Command = {
    name: 'weigh',
    usage: '  joulewright weigh FILE [--fine] [--by WORD]',
    options: { fine: { type: 'boolean' }, by: { type: 'string' } },
    run: (file, options) => {
      if (fails !== undefined) return Promise.reject(fails);
      Object.assign(called, { file, options });
      return Promise.resolve(1);
    },
  };
  const terminal = recordedTerminal();
  const status = await runCommandLine(typed, [weigh], terminal);
  return { status, called, ...terminal.written };
}

describe('the command line', () => {
  it('hands a command its file and options, wherever they stand, and answers its status', async () => {
    const { status, called } = await run(['weigh', '--fine', 'a.json', '--by', 'hand']);
    expect({ status, ...called }).toEqual({ status: 1, file: 'a.json', options: { fine: true, by: 'hand' } });
  });

  it('takes - as a file', async () => {
    expect((await run(['weigh', '-'])).called.file).toBe('-');
  });

  it.each([['--help'], ['-h'], ['weigh', '--help'], []])('shows the help for %j, with status 0', async (...typed) => {
    const { status, out, err } = await run(typed);
    expect(out).toContain('joulewright weigh FILE');
    expect(out).toMatch(/3 {2}the file cannot be read/);
    expect({ status, err }).toEqual({ status: 0, err: '' });
  });

  it('prints the version of package.json', async () => {
    const { status, out } = await run(['--version']);
    expect(out).toMatch(/^\d+\.\d+\.\d+\n$/);
    expect(status).toBe(0);
  });

  it.each<[string[], RegExp]>([
    [['guess', 'a.json'], /There is no command 'guess'; there are: weigh\./],
    [['weigh'], /'weigh' needs the name of a mechanism file/],
    [['weigh', 'a.json', 'b.json'], /'weigh' takes one file; found also: b\.json\./],
    [['weigh', 'a.json', '--coarse'], /Unknown option '--coarse'/],
    [['weigh', 'a.json', '--by'], /'--by <value>' argument missing/],
    [['weigh', 'a.json', '--fine=no'], /'--fine' does not take an argument/],
  ])('refuses %j with a sentence on standard error and status 3', async (typed, sentence) => {
    const { status, out, err } = await run(typed);
    expect(err).toMatch(sentence);
    expect(err).toContain('See joulewright --help.');
    expect({ status, out }).toEqual({ status: 3, out: '' });
  });

  it('turns a defect into one line and status 4', async () => {
    const { status, out, err } = await run(['weigh', 'a.json'], new RangeError('no\nsuch row'));
    expect({ status, out, err }).toEqual({ status: 4, out: '', err: 'Internal error: RangeError: no such row\n' });
  });
});
