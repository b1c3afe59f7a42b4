import { checkResult, checkText, exitStatus } from '../../sim/report/index.js';
import type { Command, OptionValues } from './command.js';
import { problemLine, readFile } from './read-file.js';
import { runBoth, type Solvers } from './run-both.js';
import { status } from './status.js';
import { checkStep, readStep } from './step.js';
import type { Terminal } from './terminal.js';
import { writeFiles } from './write-files.js';

/** `joulewright check FILE`: runs a mechanism and gives its account. */
export function checkCommand(solvers: Solvers): Command {
  return {
    name: 'check',
    usage: `  joulewright check FILE [--json] [--step S] [--stepper-only] [--out DIR]
      runs the mechanism on both solvers and prints its stations, the account between them, the same by hand, its criteria
      with their margins, and what was found
      --json          one JSON object on standard output instead, numbers in SI
      --step S        the stepper's step: "0.25 ms", or seconds; default: chosen from the file
      --stepper-only  leaves the audit out, and does not count its absence
      --out DIR       also writes result.json and report.txt into that folder`,
    options: {
      json: { type: 'boolean' },
      step: { type: 'string' },
      'stepper-only': { type: 'boolean' },
      out: { type: 'string' },
    },
    run: (file, options, terminal) => check(solvers, file, options, terminal),
  };
}

async function check(solvers: Solvers, file: string, options: OptionValues, terminal: Terminal) {
  const step = typeof options.step === 'string' ? readStep(options.step) : undefined;
  const { document, mechanism, problems } = await readFile(file, terminal);
  const title = typeof document?.title === 'string' ? document.title : '';
  const given = { file, title, mechanism, problems };
  const stepperOnly = options['stepper-only'] === true;
  if (mechanism !== null && step !== undefined) checkStep(step, mechanism.run.atMost);
  const asked = stepperOnly ? { ...solvers, auditor: null } : solvers;
  const ran = mechanism === null ? { stepper: null } : runBoth(asked, mechanism, { step }, terminal);
  const result = checkResult({ ...given, ...ran });
  const text = checkText(result, { width: terminal.width });
  if (mechanism === null) terminal.err(problems.map(problemLine).join(''));
  const json = `${JSON.stringify(result, null, 2)}\n`;
  if (options.json === true) terminal.out(json);
  else if (mechanism !== null) terminal.out(text);
  if (typeof options.out === 'string') {
    const failure = await writeFiles(options.out, { 'result.json': json, 'report.txt': text });
    if (failure !== null) return notWritten(failure, terminal);
  }
  return exitStatus(result, { stepperOnly });
}

function notWritten(failure: string, terminal: Terminal) {
  terminal.err(`${failure}\n`);
  return status.internalError;
}
