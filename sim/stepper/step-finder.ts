import type { Passage, Trial } from './trial.js';
import type { State } from './state.js';

const MOST_TRIALS = 80;

/**
 * Shortens a step to the first event in it: a touch, a stop, the end of a slide, a station. Each trial is a whole step of
 * the midpoint rule, so the end that is found is one the rule really reaches. The root is bracketed and taken by the
 * secant, halved when that stalls (regula falsi guarded by bisection; Brent, *Algorithms for Minimization without
 * Derivatives*, 1973, ch. 4).
 *
 * @param locates whether touches and stops are looked for; where they come too thick they wait for the step's end
 * @returns the step taken (the trial stands at its end) and what is met there
 */
export function findStep(trial: Trial, state: State, tau: number, locates: boolean): { taken: number; met: Passage[] } {
  trial.run(state, tau);
  let passed = trial.passed(locates);
  if (passed.length === 0) return { taken: tau, met: [] };
  const known: Passage[] = [];
  const lowValues: number[] = [];
  let low = 0;
  let high = tau;
  let width = tau;
  for (let i = 0; i < MOST_TRIALS; i += 1) {
    for (const passage of passed) track(trial, passage, state, known, lowValues);
    const slow = i % 3 === 2 && high - low > width / 4;
    if (i % 3 === 2) width = high - low;
    const at = slow ? (low + high) / 2 : earliest(passed, known, lowValues, low, high);
    trial.run(state, at);
    const now = trial.passed(locates);
    if (now.length > 0) {
      high = at;
      passed = now;
    } else {
      const values = known.map((passage) => trial.valueOf(passage));
      const met = known.filter((_, k) => Math.abs(values[k]) <= 1);
      if (met.length > 0) return { taken: at, met };
      low = at;
      values.forEach((value, k) => {
        lowValues[k] = value;
      });
    }
    if (high - low <= 4e-16 * Math.max(tau, high)) break;
  }
  // The event jumps instead of passing through zero: take the step to just after it.
  trial.run(state, high);
  return { taken: high, met: trial.passed(locates) };
}

function track(trial: Trial, passage: Passage, state: State, known: Passage[], lowValues: number[]): void {
  if (known.some((other) => isSame(other, passage))) return;
  known.push(passage);
  lowValues.push(trial.startValueOf(passage, state));
}

const isSame = (a: Passage, b: Passage): boolean => a.kind === b.kind && a.source === b.source;

/** The least secant estimate among the events passed at `high`. */
function earliest(passed: Passage[], known: Passage[], lowValues: number[], low: number, high: number): number {
  let at = high;
  for (const passage of passed) {
    const from = lowValues[known.findIndex((other) => isSame(other, passage))] ?? Infinity;
    const share = Number.isFinite(from) && from > 0 ? from / (from - passage.value) : 0.5;
    at = Math.min(at, low + share * (high - low));
  }
  const guard = 1e-4 * (high - low);
  return Math.min(Math.max(at, low + guard), high - guard);
}
