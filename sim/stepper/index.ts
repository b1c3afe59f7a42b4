import type { Mechanism } from '../mechanism/model.js';
import type { Recording } from '../recording/recording.js';
import { buildLayout, RecordingWriter } from '../recording/index.js';
import { defaultStep } from './default-step.js';
import { Engine } from './engine.js';
import { unsupported } from './unsupported.js';

export { defaultStep } from './default-step.js';
export { MOST_STEPS } from './step-limits.js';
export { unsupported } from './unsupported.js';

export interface StepperOptions {
  /** Step [s]; chosen from the document when left out. */
  step?: number;
  /** About how many rows to record over the whole run (events have rows of their own besides). */
  rows?: number;
}

/** A run that is advanced piece by piece, so that a worker stays able to hear a cancel. */
export interface StepperRun {
  /** Simulated so far, and at the most [s]. */
  readonly time: number;
  readonly duration: number;
  readonly done: boolean;
  /** Steps for about so long [ms of wall clock, at least one step]. */
  advance(wallMs: number): void;
  /** What has been recorded so far. */
  recording(): Recording;
}

const DEFAULT_ROWS = 2000;

/** Wall clock [ms]; the language's own, so that the core stays free of any host. */
const clock = (): number => Date.now();

/**
 * Starts a run of the stepper. A mechanism with elements that it does not simulate, or a step that it cannot run with, ends
 * at once with its findings.
 */
export function startRun(mechanism: Mechanism, options: StepperOptions = {}): StepperRun {
  const refused = unsupported(mechanism, options);
  if (refused.length > 0) return refusedRun(mechanism, refused);
  const duration =
    'time' in mechanism.run.until ? Math.min(mechanism.run.until.time, mechanism.run.atMost) : mechanism.run.atMost;
  const step = options.step ?? mechanism.run.step ?? defaultStep(mechanism).step;
  const rowEvery = Math.max(1, Math.floor(duration / step / (options.rows ?? DEFAULT_ROWS)));
  const engine = new Engine(mechanism, { step, rowEvery });
  const began = clock();
  const budget = (mechanism.run.timeBudget ?? Infinity) * 1000;
  return {
    get time() {
      return Math.max(0, engine.recorder.writer.lastTime);
    },
    duration,
    get done() {
      return engine.end !== null;
    },
    advance(wallMs) {
      const from = clock();
      do engine.step();
      while (engine.end === null && clock() - from < wallMs);
      if (clock() - began > budget) engine.finish('timeBudget');
    },
    recording: () => engine.recorder.writer.view(),
  };
}

/** Runs a mechanism to its end. */
export function runStepper(mechanism: Mechanism, options: StepperOptions = {}): Recording {
  const run = startRun(mechanism, options);
  while (!run.done) run.advance(1000);
  return run.recording();
}

function refusedRun(mechanism: Mechanism, findings: Recording['findings']): StepperRun {
  const layout = buildLayout({ bodies: mechanism.bodies, accounts: [] });
  const writer = new RecordingWriter({ solver: 'stepper', layout });
  for (const finding of findings) writer.finding(finding);
  const recording = writer.finish('notSimulated');
  return { time: 0, duration: 0, done: true, advance: () => undefined, recording: () => recording };
}
