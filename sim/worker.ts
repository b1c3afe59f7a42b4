import { readMechanism } from './mechanism/index.js';
import {
  FrameCutter,
  serve,
  webPort,
  type Handlers,
  type Progress,
  type RunFrame,
  type SolverMethods,
} from './protocol/index.js';
import { startRun, unsupported } from './stepper/index.js';

/** Wall-clock time between two frames [ms]: the pen of the recorder moves some thirty times a second. */
const frameTime = 30;

/** What the solver's thread does; the same in a worker, in a Node thread and in process. */
export const solver: Handlers<SolverMethods> = {
  read: ({ text, fileSize }) => readMechanism(text, { fileSize }),

  run: async ({ mechanism, step }, progress) => {
    const findings = unsupported(mechanism);
    if (findings.some(({ severity }) => severity === 'error')) return { end: 'notSimulated', findings, counters: {} };
    const run = startRun(mechanism, step === undefined ? {} : { step });
    await sendLayout(run, progress);
    const cutter = new FrameCutter();
    do {
      run.advance(frameTime);
      const frame = cutter.next(run.recording());
      if (frame) await progress.send(frame, [frame.rows]);
      await turn();
    } while (!run.done);
    const { end, findings: found, counters } = run.recording();
    return { end, findings: [...findings, ...found], counters };
  },
};

async function sendLayout(run: ReturnType<typeof startRun>, progress: Progress<RunFrame>): Promise<void> {
  const { solver, layout, step } = run.recording();
  await progress.send({
    part: 'layout',
    solver,
    layout,
    duration: run.duration,
    ...(step === undefined ? {} : { step }),
  });
}

/** Lets messages in, so that a run can be halted. */
function turn(): Promise<void> {
  return new Promise((resolve) => setTimeout(resolve, 0));
}

if ('WorkerGlobalScope' in globalThis) serve(webPort(self), solver);
