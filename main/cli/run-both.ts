import { compareRuns, mayBeSensitive, sensitivityOf } from '../../sim/ledger/index.js';
import type { Mechanism } from '../../sim/mechanism/model.js';
import type { Finding, Recording } from '../../sim/recording/index.js';
import type { CheckInput } from '../../sim/report/index.js';
import type { StepperOptions } from '../../sim/stepper/index.js';
import { Progress } from './progress.js';
import type { Terminal } from './terminal.js';

/** A run that goes on piece by piece, as both solvers have it. */
export interface PieceByPiece {
  /** Reached, and at the most [s]. */
  readonly time: number;
  readonly duration: number;
  readonly done: boolean;
  advance(wallMs: number): void;
  recording(): Recording;
}

/** The solver that a check runs. */
export interface Engine {
  /** What it does not simulate; an error refuses the run. */
  unsupported(mechanism: Mechanism, options: StepperOptions): Finding[];
  startRun(mechanism: Mechanism, options: StepperOptions): PieceByPiece;
}

/** The solver that judges the first. */
export interface Auditor {
  /** What it does not integrate; anything refuses the audit. */
  unaudited(mechanism: Mechanism): Finding[];
  startAudit(mechanism: Mechanism): PieceByPiece;
}

export interface Solvers {
  stepper: Engine;
  /** null: nothing judges the stepper. */
  auditor: Auditor | null;
}

/** Between two lines of progress [ms]. */
const slice = 100;

/**
 * Runs a mechanism on both solvers and compares them, and where they part runs the audit once more from a start a hair
 * away. A solver that refuses the mechanism leaves its findings.
 */
export function runBoth(
  { stepper, auditor }: Solvers,
  mechanism: Mechanism,
  options: StepperOptions,
  terminal: Terminal,
): Pick<CheckInput, 'stepper' | 'audit' | 'findings'> {
  const findings = stepper.unsupported(mechanism, options);
  const isRefused = findings.some(({ severity }) => severity === 'error');
  const stepped = isRefused ? null : toEnd(stepper.startRun(mechanism, options), 'stepper', terminal);
  if (!auditor) return { findings, stepper: stepped };
  const refusals = auditor.unaudited(mechanism);
  if (refusals.length > 0) return { findings: [...findings, ...refusals], stepper: stepped };
  const audit = (of: Mechanism, label: string): Recording => toEnd(auditor.startAudit(of), label, terminal);
  const run = audit(mechanism, 'auditor');
  const comparison = stepped && compareRuns(mechanism, stepped, run);
  const sensitive =
    comparison && mayBeSensitive(comparison)
      ? sensitivityOf(mechanism, run, (nudged) => audit(nudged, 'auditor, from a start a hair away')).findings
      : [];
  return { findings: [...findings, ...sensitive], stepper: stepped, audit: { run, comparison } };
}

function toEnd(run: PieceByPiece, label: string, terminal: Terminal): Recording {
  const progress = new Progress(terminal, label);
  while (!run.done) {
    run.advance(slice);
    progress.show(run.time, run.duration);
  }
  progress.clear();
  return run.recording();
}
