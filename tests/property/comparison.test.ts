import fc from 'fast-check';
import { describe, expect, it } from 'vitest';
import { AGREEMENT, compareRuns, type Comparison, type Figure } from '../../sim/ledger/index.js';
import type { Mechanism } from '../../sim/mechanism/model.js';
import type { Recording } from '../../sim/recording/index.js';
import { cratesMechanism } from '../unit/report/crates.js';
import { BODIES, closedRun, increments, type Increments } from './synthetic-run.js';

const MASSES = [1, 2.5, 0.3];

/** The document that the drawn runs are of, without gravity, so that the accounts of gravity are free to do as drawn. */
function mechanism(changes: Partial<Mechanism> = {}): Mechanism {
  const crates = cratesMechanism();
  const bodies = BODIES.map((id, i) => ({ ...crates.bodies[0], id, mass: MASSES[i], inertia: 0 }));
  return { ...crates, bodies, system: [...BODIES], ...changes };
}

/** A drawn run with stations at its first, middle and last row; its gravity is a load, which follows no law. */
function run(steps: Increments): Recording {
  const drawn = closedRun(steps);
  for (const account of drawn.layout.accounts) {
    if (account.account === 'gravity') account.account = 'load';
    if (account.account === 'numerical') account.account = 'rope';
    delete account.cause;
  }
  drawn.layout.accounts.at(-1)!.of = 'line';
  const rows = new Set([0, Math.floor(steps.length / 2), steps.length]);
  const events = [...rows].map((row, i) => ({ kind: 'station' as const, station: String(i + 1), time: row, row }));
  return { ...drawn, events };
}

const figures = ({ stations, spans }: Comparison): Figure[] => [
  ...stations.flatMap(({ figures }) => figures),
  ...spans.flatMap(({ accounts }) => accounts),
];

/** The same run in other units: lengths, times and masses multiplied. */
function scaled(recording: Recording, length: number, time: number, mass: number): Recording {
  const { layout, rowCount } = recording;
  const bodies = layout.bodies.map((body) => ({ ...body, mass: body.mass * mass }));
  const factors = new Float64Array(layout.width).fill(1);
  factors[0] = time;
  for (const { columns } of bodies) {
    for (const column of [columns.x, columns.y]) factors[column] = length;
    for (const column of [columns.vx, columns.vy]) factors[column] = length / time;
    factors[columns.spin] = 1 / time;
  }
  const energy = mass * (length / time) ** 2;
  for (const { columns } of layout.accounts) for (const column of columns.work) factors[column] = energy;
  const rows = recording.rows.map((value, i) => value * factors[i % layout.width]);
  const events = recording.events.map((event) => ({ ...event, time: event.time * time }));
  return { ...recording, layout: { ...layout, bodies }, rows: rows.subarray(0, rowCount * layout.width), events };
}

/** A run that nearly follows another: every work a little other. */
const pairs = fc.tuple(increments, fc.double({ min: -0.02, max: 0.02, noNaN: true })).map(([steps, share]) => {
  const near = steps.map((row, i) => row.map((works) => works.map((work, j) => work * (1 + share * Math.sin(i + j)))));
  return [run(steps), run(near)] as const;
});

describe('a comparison', () => {
  it('finds that a run agrees with itself', () => {
    fc.assert(
      fc.property(increments, (steps) => {
        const { verdict, findings, ...all } = compareRuns(mechanism(), run(steps), run(steps));
        expect({ verdict, findings }).toEqual({ verdict: 'agrees', findings: [] });
        expect(
          figures({ verdict, findings, ...all }).every(({ difference, share }) => difference === 0 && share === 0),
        ).toBe(true);
      }),
    );
  });

  it('is the same with the runs exchanged, but for the sign of the differences', () => {
    fc.assert(
      fc.property(pairs, ([a, b]) => {
        const [one, other] = [compareRuns(mechanism(), a, b), compareRuns(mechanism(), b, a)];
        expect(other.verdict).toBe(one.verdict);
        expect(other.parting?.station).toBe(one.parting?.station);
        expect(other.parting?.account?.account).toBe(one.parting?.account?.account);
        const turned = figures(other).map(({ stepper, auditor, difference, ...rest }) => {
          return { ...rest, stepper: auditor, auditor: stepper, difference: 0 - difference };
        });
        expect(turned).toEqual(figures(one).map((figure) => ({ ...figure, difference: figure.difference + 0 })));
      }),
    );
  });

  it('is the same in any units of length, time and mass', () => {
    const factor = fc.integer({ min: -3, max: 3 }).map((power) => 8 ** power);
    fc.assert(
      fc.property(pairs, factor, factor, factor, ([a, b], length, time, mass) => {
        const bodies = mechanism().bodies.map((body) => ({ ...body, mass: body.mass * mass }));
        const run = { until: { time: 2 * time }, atMost: 2 * time };
        const other = mechanism({ bodies, run, extent: 10 * length, gravity: [0, (-9.80665 * length) / time ** 2] });
        const plain = compareRuns(mechanism(), a, b);
        const large = compareRuns(other, scaled(a, length, time, mass), scaled(b, length, time, mass));
        expect(large.verdict).toBe(plain.verdict);
        figures(large).forEach(({ share }, i) => expect(share).toBeCloseTo(figures(plain)[i].share, 12));
      }),
    );
  });

  it('agrees just where every figure is within tolerance, and names a part only otherwise', () => {
    fc.assert(
      fc.property(pairs, ([a, b]) => {
        const comparison = compareRuns(mechanism(), a, b);
        const within = figures(comparison).every(({ share }) => share <= AGREEMENT);
        expect(comparison.verdict).toBe(within ? 'agrees' : 'differs');
        expect(comparison.parting === null).toBe(within);
        expect(figures(comparison).every((figure) => figure.within === figure.share <= AGREEMENT)).toBe(true);
      }),
    );
  });
});
