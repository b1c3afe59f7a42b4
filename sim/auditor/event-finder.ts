import type { Dop853 } from './method/dop853.js';
import type { Watch } from './watch-list.js';

/** Looks at the watched values in a step. */
export const SAMPLES = 8;
const MOST_HALVINGS = 80;
const POLISHES = 2;

/** The first event of a step: the step shortened to it (done anew), and everything that happens there. */
export interface Found {
  taken: number;
  watches: Watch[];
}

type Look = (t: number, y: Float64Array) => { q: Float64Array; v: Float64Array };

/**
 * Looks for the first event in the step just finished: values are sampled on the dense output, a change of sign is
 * bracketed and its root found there, and then a fresh step is made to it and polished once or twice, so that the state
 * there is as good as any other (Shampine & Thompson, *Event location for ordinary differential equations*, Comput. Math.
 * Appl. 39, 2000). A value counts as positive at the start, whatever rounding makes of it.
 */
export function findEvent(
  method: Dop853,
  watches: readonly Watch[],
  size: number,
  h: number,
  scale: Float64Array,
  look: Look,
  t: number,
): Found | null {
  if (watches.length === 0) return null;
  const state = new Float64Array(size);
  const valueAt = (watch: Watch, theta: number): number => {
    const { q, v } = look(t + theta * h, method.interpolate(theta, state));
    return watch.value(q, v);
  };
  for (let k = 1; k <= SAMPLES; k += 1) {
    const theta = k / SAMPLES;
    const { q, v } = look(t + theta * h, method.interpolate(theta, state));
    const passed = watches.filter((watch) => watch.value(q, v) < -watch.tolerance);
    if (passed.length === 0) continue;
    const low = (k - 1) / SAMPLES;
    // Looked for a tolerance below zero: rounding about the start is then no root.
    const roots = passed.map((watch) => root((x) => valueAt(watch, x) + watch.tolerance, low, theta));
    const first = Math.min(...roots);
    const together = passed.filter((_, i) => roots[i] <= first + 1e-10 * theta + 1e-15);
    return land(method, together, first * h, scale, look, t);
  }
  return null;
}

/** Root of a value that is taken as positive at `low` and is negative at `high`: bisection with secant steps. */
function root(value: (x: number) => number, low: number, high: number): number {
  let [a, b] = [low, high];
  let fb = value(b);
  let fa = Math.max(value(a), 0);
  for (let i = 0; i < MOST_HALVINGS && b - a > 1e-13 * high; i += 1) {
    const secant = fa > 0 && Number.isFinite(fa) ? a + ((b - a) * fa) / (fa - fb) : (a + b) / 2;
    const x = i % 3 === 2 || !(secant > a && secant < b) ? (a + b) / 2 : secant;
    const fx = value(x);
    if (fx > 0) {
      a = x;
      fa = fx;
    } else {
      b = x;
      fb = fx;
    }
    if (fx === 0) break;
  }
  return b;
}

/** Makes the shortened step anew, and moves its end onto the root. */
function land(method: Dop853, watches: Watch[], length: number, scale: Float64Array, look: Look, t: number): Found {
  const [watch] = watches;
  if (!(length > 1e-14 * Math.max(1, t))) return { taken: 0, watches };
  let taken = length;
  const run = (h: number): number => {
    method.try(h, scale);
    method.finish();
    const { q, v } = look(t + h, method.end);
    return watch.value(q, v);
  };
  let value = run(taken);
  const state = new Float64Array(method.size);
  for (let i = 0; i < POLISHES && value !== 0; i += 1) {
    const { q, v } = look(t + 0.99 * taken, method.interpolate(0.99, state));
    const slope = (value - watch.value(q, v)) / (0.01 * taken);
    const shift = slope !== 0 ? -value / slope : 0;
    if (!(Math.abs(shift) < 1e-3 * taken) || Math.abs(shift) < 1e-15 * taken) break;
    const polished = taken + shift;
    const next = run(polished);
    if (!(Math.abs(next) <= Math.abs(value))) {
      run(taken);
      break;
    }
    taken = polished;
    value = next;
  }
  return { taken, watches };
}
