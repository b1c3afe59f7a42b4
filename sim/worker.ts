import { startAudit, unaudited } from './auditor/index.js';
import { readMechanism } from './mechanism/index.js';
import {
  FrameCutter,
  serve,
  webPort,
  type Handlers,
  type Progress,
  type RunClosing,
  type RunFrame,
  type SolverMethods,
} from './protocol/index.js';
import type { Finding, Recording } from './recording/index.js';
import { startRun, unsupported } from './stepper/index.js';

/** Wall-clock time between two frames [ms]: the pen of the recorder moves some thirty times a second. */
const frameTime = 30;

/** What a solver's thread does; the same in a worker, in a Node thread and in process. */
export const solver: Handlers<SolverMethods> = {
  read: ({ text, fileSize }) => readMechanism(text, { fileSize }),

  run: async ({ mechanism, step }, progress) => {
    const findings = unsupported(mechanism, { step });
    if (findings.some(({ severity }) => severity === 'error')) return refused(findings);
    const closing = await sendRun(startRun(mechanism, step === undefined ? {} : { step }), progress);
    return { ...closing, findings: [...findings, ...closing.findings] };
  },

  audit: async ({ mechanism, tolerance }, progress) => {
    const findings = unaudited(mechanism);
    if (findings.length > 0) return refused(findings);
    return sendRun(startAudit(mechanism, tolerance === undefined ? {} : { tolerance }), progress);
  },
};

function refused(findings: Finding[]): RunClosing {
  return { end: 'notSimulated', findings, counters: {} };
}

/** A run that goes on piece by piece, as both solvers have it. */
interface PieceByPiece {
  readonly duration: number;
  readonly done: boolean;
  advance(wallMs: number): void;
  recording(): Recording;
}

/** Takes a run to its end, and sends what is recorded as it comes. */
async function sendRun(run: PieceByPiece, progress: Progress<RunFrame>): Promise<RunClosing> {
  await sendLayout(run, progress);
  const cutter = new FrameCutter();
  do {
    run.advance(frameTime);
    const frame = cutter.next(run.recording());
    if (frame) await progress.send(frame, [frame.rows]);
    await turn();
  } while (!run.done);
  const { end, findings, counters } = run.recording();
  return { end, findings, counters };
}

async function sendLayout(run: PieceByPiece, progress: Progress<RunFrame>): Promise<void> {
  const { solver: name, layout, step } = run.recording();
  await progress.send({
    part: 'layout',
    solver: name,
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
