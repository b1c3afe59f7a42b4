import { timeOfRow, type Recording } from '../recording/index.js';
import type { Rows } from './run-view.js';

/** A quantity at an instant. */
export interface Sample {
  /** [s] */
  time: number;
  value: number;
}

/** The greatest value of a sampled quantity. */
export interface Peak extends Sample {
  /** How far the samples leave it open; nil where it is at an end of the span, which is a row. */
  resolution: number;
}

/** Three neighbouring curvatures that differ by more than this ratio are not those of one smooth curve. */
const ALIKE = 0.5;

/** A neighbour nearer than this share of the greater distance to the next ones tells nothing about the curve. */
const NEAR = 0.25;

/** Samples of a quantity at the rows of a span, cut where an impact is: across it nothing is smooth. */
export function smoothRuns(recording: Recording, { fromRow, toRow }: Rows, read: (row: number) => number): Sample[][] {
  const runs: Sample[][] = [];
  for (let row = fromRow; row <= toRow; row++) {
    const time = timeOfRow(recording, row);
    const run = runs.at(-1);
    const sample = { time, value: read(row) };
    if (run && time > run[run.length - 1].time) run.push(sample);
    else runs.push([sample]);
  }
  return runs;
}

/**
 * The greatest value of a quantity sampled at rows, which may be farther apart than the solver's steps.
 *
 * Where the samples around the highest one are those of a smooth curve (their second divided differences agree within a
 * factor of two), it is the vertex of the parabola through three of them; the error is of third order in their distance,
 * and `resolution` is estimated from a second parabola twice as wide. Elsewhere, at a jump or a kink, a parabola would
 * overshoot, and the highest sample itself is taken; `resolution` is then its distance to the nearer neighbour.
 * Blind to what rises and falls between two rows.
 *
 * @param runs of samples by time, each smooth; at least one sample in all
 */
export function peakOf(runs: readonly (readonly Sample[])[]): Peak {
  const peaks = runs.filter((run) => run.length > 0).map(peakOfRun);
  return peaks.reduce((best, peak) => (peak.value > best.value ? peak : best));
}

/** The least value, likewise. */
export function leastOf(runs: readonly (readonly Sample[])[]): Peak {
  const { value, ...rest } = peakOf(runs.map((run) => run.map((sample) => ({ ...sample, value: -sample.value }))));
  return { value: -value, ...rest };
}

function peakOfRun(run: readonly Sample[]): Peak {
  let i = 0;
  for (let j = 1; j < run.length; j++) if (run[j].value > run[i].value) i = j;
  const top = run[i];
  const least = NEAR * Math.max(gap(run, i, -1), gap(run, i, 1));
  const [left, right] = [neighbour(run, i, -1, least), neighbour(run, i, 1, least)];
  if (left < 0 || right < 0) return { ...top, resolution: 0 };
  const farLeft = neighbour(run, left, -1, least);
  const farRight = neighbour(run, right, 1, least);
  const chain = [farLeft, left, i, right, farRight].filter((index) => index >= 0).map((index) => run[index]);
  if (!isSmooth(chain)) {
    return { ...top, resolution: Math.min(top.value - run[left].value, top.value - run[right].value) };
  }
  const vertex = vertexOf(run[left], top, run[right]);
  const isWide = farLeft >= 0 && farRight >= 0;
  // At a distance x from the highest sample the error goes with x (h² − x²): with 2 h for h it is at least four times that.
  const resolution = isWide
    ? Math.abs(vertexOf(run[farLeft], top, run[farRight]).value - vertex.value) / 3
    : vertex.value - top.value;
  return { ...vertex, resolution };
}

function gap(run: readonly Sample[], i: number, way: 1 | -1): number {
  const next = run.at(i + way);
  return next && i + way >= 0 ? Math.abs(next.time - run[i].time) : 0;
}

/** The next sample that way that is far enough off; −1 where there is none. */
function neighbour(run: readonly Sample[], i: number, way: 1 | -1, least: number): number {
  for (let j = i + way; j >= 0 && j < run.length; j += way) {
    if (Math.abs(run[j].time - run[i].time) >= least) return j;
  }
  return -1;
}

function isSmooth(chain: readonly Sample[]): boolean {
  if (chain.length < 4) return false;
  const curvatures = chain.slice(2).map((_, i) => -curvature(chain[i], chain[i + 1], chain[i + 2]));
  const least = Math.min(...curvatures);
  return least > 0 && least >= ALIKE * Math.max(...curvatures);
}

const slope = (a: Sample, b: Sample): number => (b.value - a.value) / (b.time - a.time);

/** Second derivative of the parabola through three samples. */
function curvature(a: Sample, b: Sample, c: Sample): number {
  return (2 * (slope(b, c) - slope(a, b))) / (c.time - a.time);
}

/** Vertex of the parabola through three samples, of which the middle one is the highest. */
function vertexOf(a: Sample, b: Sample, c: Sample): Sample {
  const bend = curvature(a, b, c);
  if (!(bend < 0)) return b;
  const atMiddle = slope(a, b) + 0.5 * bend * (b.time - a.time);
  return { time: b.time - atMiddle / bend, value: b.value - atMiddle ** 2 / (2 * bend) };
}
