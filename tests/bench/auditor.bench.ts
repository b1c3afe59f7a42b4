import { readdirSync, readFileSync } from 'node:fs';
import { resolve } from 'node:path';
import { runAuditor } from '../../sim/auditor/index.js';
import { readMechanism } from '../../sim/mechanism/index.js';
import type { Mechanism } from '../../sim/mechanism/model.js';
import { odex } from '../support/odex.js';
import { box, particle, track } from '../support/parts.js';
import { mechanismOf, Run, type Parts } from '../support/run.js';
import { squeezer } from '../support/squeezer.js';

/**
 * What an audit costs and how far it is to be trusted: every demo in under a second with its closure and drift, forty links
 * and sixty contacts, and evaluations of the right-hand side beside those of a general-purpose extrapolation code that
 * integrates the same problem, both to the same accuracy.
 */
const SECOND = 1000;
const CLOSURE = 1e-9;
const DRIFT = 1e-10;
/** Greatest ratio of evaluations to those of odex. */
const LIMIT = 1.2;

let missed = 0;
const need = (isMet: boolean): string => {
  if (!isMet) missed += 1;
  return isMet ? '' : '  MISSED';
};

/** Audits once and prints a line; a mechanism is audited once before, so that the code is warm as in a window. */
function line(name: string, mechanism: Mechanism, mostMs = Infinity): Run {
  const began = performance.now();
  const ran = new Run(mechanism, runAuditor(mechanism));
  const ms = performance.now() - began;
  const { drift, evaluations, events } = ran.recording.counters;
  const isClosed = ran.openShare() <= CLOSURE && drift <= DRIFT && ran.recording.end === 'reachedEnd';
  console.log(
    `  ${name.padEnd(30)} ${ms.toFixed(0).padStart(6)} ms ${String(evaluations).padStart(7)} evaluations ` +
      `${String(events).padStart(5)} events  open ${ran.openShare().toExponential(1)}  drift ${drift.toExponential(1)}` +
      need(isClosed && ms <= mostMs),
  );
  return ran;
}

function demos(): void {
  console.log('demos (need: under a second, closure 1e-9, drift 1e-10)');
  const folder = resolve('assets/examples');
  for (const name of readdirSync(folder).filter((file) => file.endsWith('.json'))) {
    const { mechanism } = readMechanism(readFileSync(resolve(folder, name), 'utf8'));
    if (mechanism) line(name.replace('.json', ''), mechanism, SECOND);
  }
}

const link = (i: number, length: number): Parts => ({
  id: `l${i}`,
  shape: { kind: 'bar', length, width: 0.02 },
  mass: 0.1,
  at: [(i + 0.5) * length, 0],
});

function size(): void {
  console.log('\nsize (need: still audited)');
  const count = 40;
  line(
    'a chain of 40 links, 1 s',
    mechanismOf({
      bodies: Array.from({ length: count }, (_, i) => link(i, 0.1)),
      joints: Array.from({ length: count }, (_, i) => ({
        id: `p${i}`,
        kind: 'pin',
        between: [`l${i}`, i === 0 ? 'ground' : `l${i - 1}`],
        at: [0.1 * i, 0],
      })),
      run: { until: 1 },
    }),
  );
  line(
    '30 sliding boxes, 60 contacts',
    mechanismOf({
      bodies: Array.from({ length: 30 }, (_, i) =>
        box(`b${i}`, [0.5 * i, 0.1], [0.4, 0.2], 1, { velocity: [0.1 * i, 0] }),
      ),
      tracks: [track('floor', [-1, 0], [60, 0])],
      contacts: [{ between: ['*', 'floor'], friction: 0.3 }],
      run: { until: 1 },
    }),
  );
}

/** A smooth problem that both integrate without output on the way. */
interface Problem {
  name: string;
  parts: Parts;
  /** The same equations for odex, with the work of gravity (and of the drive) as further states. */
  derivative: (t: number, y: number[]) => number[];
  start: number[];
  until: number;
  /** Places to compare: x and y of every body, of a run and of the other's end. */
  placesOf: (y: readonly number[]) => number[];
}

const G = 9.81;

function pendulum(): Problem {
  const until = 10;
  return {
    name: 'pendulum from 90°, 10 s',
    until,
    parts: {
      gravity: [0, -G],
      bodies: [particle('a', [1, 0], 1)],
      joints: [{ id: 'p', kind: 'pin', between: ['a', 'ground'], at: [0, 0] }],
      run: { until },
    },
    start: [1, 0, 0, 0, 0],
    // In the same coordinates: the link pulls v² − g y toward the hook.
    derivative: (_t, [x, y, u, w]) => {
      const pull = (u * u + w * w - G * y) / (x * x + y * y);
      return [u, w, -pull * x, -G - pull * y, -G * w];
    },
    placesOf: ([x, y]) => [x, y],
  };
}

function doublePendulum(): Problem {
  const until = 5;
  const knee = [1, 0];
  return {
    name: 'double pendulum from 90°, 5 s',
    until,
    parts: {
      gravity: [0, -G],
      bodies: [particle('a', [1, 0], 1), particle('b', [2, 0], 1)],
      joints: [
        { id: 'p', kind: 'pin', between: ['a', 'ground'], at: [0, 0] },
        { id: 'q', kind: 'pin', between: ['b', 'a'], at: knee },
      ],
      run: { until },
    },
    start: [Math.PI / 2, Math.PI / 2, 0, 0, 0, 0],
    derivative: (_t, [a, b, u, w]) => {
      const [c, s] = [Math.cos(a - b), Math.sin(a - b)];
      const [f, g] = [-2 * G * Math.sin(a) - s * w * w, -G * Math.sin(b) + s * u * u];
      const det = 2 - c * c;
      const powers = [-G * Math.sin(a) * u, -G * (Math.sin(a) * u + Math.sin(b) * w)];
      return [u, w, (f - c * g) / det, (2 * g - c * f) / det, ...powers];
    },
    placesOf: ([a, b]) => [Math.sin(a), -Math.cos(a), Math.sin(a) + Math.sin(b), -Math.cos(a) - Math.cos(b)],
  };
}

/** Distance of places from the exact ones. */
const off = (places: readonly number[], exact: readonly number[]): number =>
  Math.hypot(...places.map((place, i) => place - exact[i]));

function auditedPlaces(problem: Problem, tolerance: number): { places: number[]; evaluations: number } {
  const mechanism = mechanismOf(problem.parts);
  const ran = new Run(mechanism, runAuditor(mechanism, { tolerance, rows: 1 }));
  const places = mechanism.bodies.flatMap(({ id }) => [ran.motion(id).x, ran.motion(id).y]);
  return { places, evaluations: ran.recording.counters.evaluations };
}

/** Evaluations that odex needs for an error, between the two tolerances about it (straight in logarithms). */
function evaluationsFor(error: number, trials: readonly [error: number, evaluations: number][]): number {
  const sorted = [...trials].sort((a, b) => b[0] - a[0]);
  const i = Math.max(
    1,
    sorted.findIndex(([each]) => each <= error),
  );
  const [[e0, n0], [e1, n1]] = [sorted[i - 1], sorted[i]];
  const share = (Math.log(error) - Math.log(e0)) / (Math.log(e1) - Math.log(e0));
  return Math.exp(Math.log(n0) + share * (Math.log(n1) - Math.log(n0)));
}

function evaluations(): void {
  console.log(`\nevaluations for the same accuracy (need: at most ${LIMIT} times odex)`);
  for (const problem of [pendulum(), doublePendulum()]) {
    const exact = problem.placesOf(odex(problem.derivative, problem.start, problem.until, 1e-15).y);
    const trials = [4, 5, 6, 7, 8, 9, 10, 11, 12, 13].map((digits): [number, number] => {
      const { y, nEval } = odex(problem.derivative, problem.start, problem.until, 10 ** -digits);
      return [off(problem.placesOf(y), exact), nEval];
    });
    for (const tolerance of [1e-7, 1e-9, 1e-11]) {
      const { places, evaluations: count } = auditedPlaces(problem, tolerance);
      const error = off(places, exact);
      const theirs = evaluationsFor(error, trials);
      console.log(
        `  ${problem.name.padEnd(30)} off by ${error.toExponential(1)}: ${count} against ${theirs.toFixed(0)}, ` +
          `${(count / theirs).toFixed(2)} times${need(count <= LIMIT * theirs)}`,
      );
    }
  }
}

demos();
size();
console.log('\nthe seven-body squeezing mechanism to 0.03 s');
line('squeezer', mechanismOf(squeezer(0.03)));
evaluations();
process.exitCode = missed === 0 ? 0 : 1;
