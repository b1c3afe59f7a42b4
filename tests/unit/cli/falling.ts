import type { Auditor, Engine } from '../../../main/cli/run-both.js';
import { buildLayout, RecordingWriter, type Recording } from '../../../sim/recording/index.js';

/** A particle of 2 kg let go: after 1 s it has fallen g/2 and moves at g, and gravity has done m g²/2. */
export const fallingDocument = {
  format: 'joulewright/1',
  title: 'Drop',
  bodies: [{ id: 'weight', shape: { kind: 'particle' }, mass: '2 kg', at: [0, 0] }],
  stations: [
    { id: '1', when: { start: true } },
    { id: '2', when: { end: true } },
  ],
  run: { until: '1 s' },
};

const mass = 2;
const gravity = 9.80665;
const layout = buildLayout({
  bodies: [{ id: 'weight', mass, inertia: 0 }],
  accounts: [{ account: 'gravity', of: 'weight', bodies: ['weight'], stored: true }],
});

function fallen(share: number, step: number | undefined, lasts = 1): Recording {
  const solver = step === undefined ? 'auditor' : 'stepper';
  const writer = new RecordingWriter({ solver, layout, ...(step === undefined ? {} : { step }) });
  const [body] = layout.bodies;
  const [account] = layout.accounts;
  [0, 1].forEach((time) => {
    const row = writer.offset(writer.addRow(time));
    const work = 0.5 * mass * (gravity * lasts * time) ** 2;
    writer.buffer[row + body.columns.y] = -0.5 * gravity * (lasts * time) ** 2;
    writer.buffer[row + body.columns.vy] = -gravity * lasts * time;
    writer.buffer[row + account.columns.work[0]] = share * work;
    writer.buffer[row + account.columns.stored!] = -share * work;
    writer.event({ kind: 'station', station: String(time + 1), time, row: time });
  });
  return writer.finish('reachedEnd');
}

/**
 * An engine that gives the drop in ten slices. `booked`: the share of gravity's work in its account (1: it closes);
 * `steps` are the steps it was asked for.
 */
export function fallingEngine(booked = 1): Engine & { steps: (number | undefined)[] } {
  const steps: (number | undefined)[] = [];
  return {
    steps,
    unsupported: () => [],
    startRun: (_mechanism, { step }) => {
      steps.push(step);
      return inTenSlices(() => fallen(booked, step ?? 1e-3));
    },
  };
}

/** An auditor that lets the weight fall too, for a share of the time; `starts` are the places it was given. */
export function fallingAuditor(lasts = 1): Auditor & { starts: number[] } {
  const starts: number[] = [];
  return {
    starts,
    unaudited: () => [],
    startAudit: ({ bodies }) => {
      starts.push(bodies[0].at[0]);
      return inTenSlices(() => fallen(1, undefined, lasts));
    },
  };
}

function inTenSlices(recording: () => Recording) {
  const run = { time: 0, duration: 1, done: false, advance: () => forth(run), recording };
  return run;
}

function forth(run: { time: number; done: boolean }): void {
  run.time = Math.min(1, run.time + 0.1);
  run.done = run.time > 0.999;
}
