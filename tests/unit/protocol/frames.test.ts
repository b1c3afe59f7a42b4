import { describe, expect, it } from 'vitest';
import { connect, FrameCutter, FrameJoiner, portPair, serve, type SolverMethods } from '../../../sim/protocol/index.js';
import { hashRecording } from '../../../sim/recording/index.js';
import { runStepper, startRun } from '../../../sim/stepper/index.js';
import { solver } from '../../../sim/worker.js';
import { disc, floor } from '../../support/parts.js';
import { mechanismOf } from '../../support/run.js';

const parts = {
  bodies: [disc('ball', [0, 1], 0.1, 1)],
  tracks: [floor],
  contacts: [{ between: ['ball', 'floor'], restitution: 0.7 }],
  run: { until: 1.5 },
};
const mechanism = mechanismOf(parts);

describe('frames', () => {
  it('put a run together again as it was, every bit of it', () => {
    const run = startRun(mechanism);
    const { solver: by, layout, step } = run.recording();
    const [cutter, joiner] = [new FrameCutter(), new FrameJoiner()];
    joiner.add({ part: 'layout', solver: by, layout, duration: run.duration, ...(step === undefined ? {} : { step }) });
    let frames = 0;
    while (!run.done) {
      run.advance(1);
      const frame = cutter.next(run.recording());
      if (frame) joiner.add(frame);
      frames += 1;
    }
    const whole = run.recording();
    joiner.close({ end: whole.end, findings: whole.findings, counters: whole.counters });
    expect(frames).toBeGreaterThan(1);
    expect(hashRecording(joiner.recording()!)).toBe(hashRecording(whole));
    expect(cutter.next(whole)).toBeNull();
  });

  it('leave views taken before as they were', () => {
    const run = runStepper(mechanism);
    const [cutter, joiner] = [new FrameCutter(), new FrameJoiner()];
    expect(joiner.recording()).toBeNull();
    joiner.add({ part: 'layout', solver: 'stepper', layout: run.layout, duration: 1.5 });
    const half = { ...run, rowCount: Math.floor(run.rowCount / 2), events: [] };
    joiner.add(cutter.next(half)!);
    const early = joiner.recording()!;
    const rows = [...early.rows];
    joiner.add(cutter.next(run)!);
    expect(joiner.recording()!.rowCount).toBe(run.rowCount);
    expect([...early.rows]).toEqual(rows);
    expect(early.events).toEqual([]);
  });
});

describe('the solver’s thread, in process', () => {
  function client() {
    const [near, far] = portPair();
    serve<SolverMethods>(far, solver);
    return connect<SolverMethods>(near);
  }

  it('runs to the same bits as a run without a protocol', async () => {
    const joiner = new FrameJoiner();
    const closing = await client().request('run', { mechanism }, (frame) => joiner.add(frame)).result; // prettier-ignore
    joiner.close(closing);
    expect(closing.end).toBe('reachedEnd');
    expect(hashRecording(joiner.recording()!)).toBe(hashRecording(runStepper(mechanism)));
  });

  it('reads a file, with its problems', async () => {
    const { problems, mechanism: read } = await client().request('read', { text: '{', fileSize: 1 }).result;
    expect(read).toBeNull();
    expect(problems.length).toBeGreaterThan(0);
  });

  it('stops a run that is cancelled, and keeps what came before', async () => {
    const joiner = new FrameJoiner();
    const long = mechanismOf({ ...parts, run: { until: 500, step: 1e-4 } });
    const task = client().request('run', { mechanism: long }, (frame) => {
      joiner.add(frame);
      if (frame.part === 'rows') task.cancel();
    });
    await expect(task.result).rejects.toMatchObject({ name: 'CancelledError' });
    expect(joiner.recording()!.rowCount).toBeGreaterThan(0);
  });
});
