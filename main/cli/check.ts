import type { Mechanism } from '../../sim/mechanism/model.js';
import type { Finding, Recording } from '../../sim/recording/index.js';
import { checkResult, checkText, exitStatus, type CheckInput } from '../../sim/report/index.js';
import type { StepperOptions, StepperRun } from '../../sim/stepper/index.js';
import type { Command, OptionValues } from './command.js';
import { Progress } from './progress.js';
import { problemLine, readFile } from './read-file.js';
import { status } from './status.js';
import { checkStep, readStep } from './step.js';
import type { Terminal } from './terminal.js';
import { writeFiles } from './write-files.js';

/** The solver that a check runs. */
export interface Engine {
  unsupported(mechanism: Mechanism): Finding[];
  startRun(mechanism: Mechanism, options: StepperOptions): StepperRun;
}

/** Between two lines of progress [ms]. */
const slice = 100;

/** `joulewright check FILE`: runs a mechanism and gives its account. */
export function checkCommand(engine: Engine): Command {
  return {
    name: 'check',
    usage: `  joulewright check FILE [--json] [--step S] [--stepper-only] [--out DIR]
      runs the mechanism and prints its stations, the account between them, the same by hand, its criteria
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
    run: (file, options, terminal) => check(engine, file, options, terminal),
  };
}

async function check(engine: Engine, file: string, options: OptionValues, terminal: Terminal) {
  const step = typeof options.step === 'string' ? readStep(options.step) : undefined;
  const { document, mechanism, problems } = await readFile(file, terminal);
  const title = typeof document?.title === 'string' ? document.title : '';
  const given = { file, title, mechanism, problems };
  const result = checkResult({ ...given, ...runWhereSimulated(engine, mechanism, { step }, terminal) });
  const text = checkText(result, { width: terminal.width });
  if (mechanism === null) terminal.err(problems.map(problemLine).join(''));
  const json = `${JSON.stringify(result, null, 2)}\n`;
  if (options.json === true) terminal.out(json);
  else if (mechanism !== null) terminal.out(text);
  if (typeof options.out === 'string') {
    const failure = await writeFiles(options.out, { 'result.json': json, 'report.txt': text });
    if (failure !== null) return notWritten(failure, terminal);
  }
  return exitStatus(result, { stepperOnly: options['stepper-only'] === true });
}

function notWritten(failure: string, terminal: Terminal) {
  terminal.err(`${failure}\n`);
  return status.internalError;
}

/** The stepper's run, or the findings that name what it does not simulate. */
function runWhereSimulated(
  engine: Engine,
  mechanism: Mechanism | null,
  options: StepperOptions,
  terminal: Terminal,
): Pick<CheckInput, 'stepper' | 'findings'> {
  if (mechanism === null) return { stepper: null };
  if (options.step !== undefined) checkStep(options.step, mechanism.run.atMost);
  const findings = engine.unsupported(mechanism);
  const isRefused = findings.some((finding) => finding.severity === 'error');
  return { findings, stepper: isRefused ? null : runToEnd(engine.startRun(mechanism, options), terminal) };
}

function runToEnd(run: StepperRun, terminal: Terminal): Recording {
  const progress = new Progress(terminal);
  while (!run.done) {
    run.advance(slice);
    progress.show(run.time, run.duration);
  }
  progress.clear();
  return run.recording();
}
