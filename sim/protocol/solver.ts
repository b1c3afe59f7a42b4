import type { ReadResult } from '../mechanism/index.js';
import type { Mechanism } from '../mechanism/model.js';
import type { RunClosing, RunFrame } from './frames.js';

/** What the window asks of a solver's thread. */
export type SolverMethods = {
  /** Reads a mechanism file: the document and mechanism, every problem, every default. */
  read: { payload: { text: string; fileSize: number }; progress: never; result: ReadResult };
  /** Runs a mechanism on the stepper to its end; the run comes along in frames. */
  run: { payload: { mechanism: Mechanism; step?: number }; progress: RunFrame; result: RunClosing };
  /** Runs it on the auditor, in the same way. */
  audit: { payload: { mechanism: Mechanism; tolerance?: number }; progress: RunFrame; result: RunClosing };
};
