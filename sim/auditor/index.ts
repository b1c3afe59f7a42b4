import type { Mechanism } from '../mechanism/model.js';
import { buildLayout, RecordingWriter } from '../recording/index.js';
import type { Finding, Recording } from '../recording/recording.js';
import { auditedJoints, auditedSprings } from './assembly.js';
import { Engine } from './engine.js';
import { COARSER, estimateErrors } from './estimate.js';

export interface AuditorOptions {
  /** Relative tolerance; 1e-11 when left out. */
  tolerance?: number;
  /** About how many rows to record over the whole run (events have rows of their own besides). */
  rows?: number;
}

/** A run that is advanced piece by piece. */
export interface AuditorRun {
  readonly time: number;
  readonly duration: number;
  readonly done: boolean;
  advance(wallMs: number): void;
  recording(): Recording;
}

const DEFAULT_TOLERANCE = 1e-11;
const DEFAULT_ROWS = 2000;

/** What a document asks of the auditor that it does not integrate: one finding for each element. */
export function unaudited(mechanism: Mechanism): Finding[] {
  const findings: Finding[] = [];
  const refuse = (id: string, what: string): void => {
    const text = `${what} "${id}" is not audited yet, so that the run as a whole cannot be.`;
    findings.push({ severity: 'warning', code: 'not-audited', text, of: [id] });
  };
  for (const { id, shape } of mechanism.bodies) if (shape.kind === 'cam') refuse(id, 'The cam');
  for (const { id, kind } of mechanism.joints) if (!auditedJoints[kind]) refuse(id, `The ${kind}`);
  for (const { id, kind } of mechanism.springs) if (!auditedSprings[kind]) refuse(id, `The ${kind} spring`);
  for (const { id, law } of mechanism.drives) {
    if (law.kind === 'speed' && law.limit !== undefined) refuse(id, 'The limit of the held speed of drive');
  }
  return findings;
}

/** Starts an audit. A mechanism with elements that are not audited ends at once with their findings. */
export function startAudit(mechanism: Mechanism, options: AuditorOptions = {}): AuditorRun {
  const refused = unaudited(mechanism);
  if (refused.length > 0) return refusedRun(mechanism, refused);
  const { until, atMost, timeBudget } = mechanism.run;
  const tolerance = options.tolerance ?? mechanism.run.tolerance ?? DEFAULT_TOLERANCE;
  const engine = new Engine(mechanism, { tolerance, rows: options.rows ?? DEFAULT_ROWS });
  let second: Engine | null = null;
  let errors: Recording['errors'];
  const began = Date.now();
  const budget = (timeBudget ?? Infinity) * 1000;
  const step = (): void => {
    if (engine.end === null) engine.step();
    else if (second?.end === null) second.step();
    if (engine.end === 'reachedEnd' && second === null) {
      second = new Engine(mechanism, { tolerance: tolerance * COARSER, rows: 1 });
    }
    if (second && second.end !== null)
      errors ??= estimateErrors(engine.recorder.writer.view(), second.recorder.writer.view());
  };
  const isDone = (): boolean => engine.end !== null && (engine.end !== 'reachedEnd' || errors !== undefined);
  return {
    get time() {
      return Math.max(0, engine.recorder.writer.lastTime);
    },
    duration: 'time' in until ? Math.min(until.time, atMost) : atMost,
    get done() {
      return isDone();
    },
    advance(wallMs) {
      const from = Date.now();
      do step();
      while (!isDone() && Date.now() - from < wallMs);
      if (Date.now() - began <= budget) return;
      engine.finish('timeBudget');
      second?.finish('timeBudget');
    },
    recording: () => ({ ...engine.recorder.writer.view(), ...(errors ? { errors } : {}) }),
  };
}

/** Audits a mechanism to its end. */
export function runAuditor(mechanism: Mechanism, options: AuditorOptions = {}): Recording {
  const run = startAudit(mechanism, options);
  while (!run.done) run.advance(1000);
  return run.recording();
}

function refusedRun(mechanism: Mechanism, findings: readonly Finding[]): AuditorRun {
  const layout = buildLayout({ bodies: mechanism.bodies, accounts: [] });
  const writer = new RecordingWriter({ solver: 'auditor', layout });
  for (const finding of findings) writer.finding(finding);
  const recording = writer.finish('notSimulated');
  return { time: 0, duration: 0, done: true, advance: () => undefined, recording: () => recording };
}
