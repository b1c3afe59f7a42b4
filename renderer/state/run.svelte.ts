import type { Mechanism } from '../../sim/mechanism/model.js';
import type { Finding, Recording } from '../../sim/recording/recording.js';
import {
  CancelledError,
  FrameJoiner,
  type Client,
  type RunClosing,
  type RunFrame,
  type SolverMethods,
} from '../../sim/protocol/index.js';

/** `refused`: the mechanism has what this solver does not take; `failed`: the solver broke down. */
export type RunStatus = 'none' | 'running' | 'ended' | 'halted' | 'refused' | 'failed';

const clock = new Intl.DateTimeFormat('en-GB', { hour: '2-digit', minute: '2-digit' });

/** One solver's run of the mechanism: recorded by its thread, row by row. */
export class Run {
  number = $state(0);
  status = $state<RunStatus>('none');
  recording = $state.raw<Recording | null>(null);
  /** Time of the last row [s], and when the run is to end [s]. */
  time = $state(0);
  duration = $state(0);
  startedAt = $state('');
  /** Why it was refused or failed. */
  failure = $state('');
  refusals = $state.raw<readonly Finding[]>([]);
  private halting: (() => void) | null = null;
  /** Changes with the document: what a run of an earlier one still sends is not shown. */
  private ticket = 0;

  constructor(private readonly solver: 'run' | 'audit' = 'run') {}

  /** Runs a mechanism; resolves when the run has ended in whichever way. */
  async start(client: Client<SolverMethods>, mechanism: Mechanism): Promise<void> {
    if (this.status === 'running') return;
    this.clear();
    this.number += 1;
    this.status = 'running';
    this.startedAt = clock.format(Date.now());
    const ticket = this.ticket;
    const isStale = () => ticket !== this.ticket;
    const joiner = new FrameJoiner();
    const task = client.request(this.solver, { mechanism }, (frame) => {
      joiner.add(frame);
      if (!isStale()) this.follow(joiner, frame);
    });
    this.halting = () => task.cancel();
    try {
      const closing = await task.result;
      joiner.close(closing);
      if (!isStale()) this.finish(joiner, closing);
    } catch (error) {
      if (!isStale()) this.fail(error);
    }
  }

  private follow(joiner: FrameJoiner, frame: RunFrame): void {
    this.duration = joiner.duration;
    if (frame.part === 'rows') this.time = frame.time;
    this.recording = joiner.recording();
  }

  private finish(joiner: FrameJoiner, { end, findings }: RunClosing): void {
    this.halting = null;
    this.recording = joiner.recording();
    this.refusals = end === 'notSimulated' ? findings : [];
    this.failure = this.refusals.map(({ text }) => text).join(' ');
    this.status = end === 'notSimulated' ? 'refused' : 'ended';
  }

  private fail(error: unknown): void {
    this.halting = null;
    this.status = error instanceof CancelledError ? 'halted' : 'failed';
    this.failure = error instanceof Error && !(error instanceof CancelledError) ? error.message : '';
  }

  halt(): void {
    this.halting?.();
  }

  clear(): void {
    this.recording = null;
    this.status = 'none';
    this.time = 0;
    this.duration = 0;
    this.failure = '';
    this.refusals = [];
  }

  /** Forgets the runs of another document. */
  reset(): void {
    this.halt();
    this.halting = null;
    this.ticket += 1;
    this.clear();
    this.number = 0;
  }
}
