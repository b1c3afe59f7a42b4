/** How a search for a root ended: `root` is the end of the last bracket at which |f| is least. */
export interface Root {
  root: number;
  /** The last bracket: f has opposite signs (or a zero) at its ends, and `low` ≤ root ≤ `high`. */
  low: number;
  high: number;
  evaluations: number;
  reason: 'converged' | 'noSignChange' | 'nonFinite' | 'maxIterations';
}

/**
 * A root of f between `a` and `b`, where f has opposite signs, bracketed throughout: inverse quadratic interpolation and
 * the secant rule where they shrink the bracket, bisection where they do not. Superlinear on smooth functions, and never
 * much slower than bisection.
 * Source: R. P. Brent, Algorithms for Minimization without Derivatives, 1973, ch. 4.
 *
 * @param tolerance the bracket's width to reach, in the unit of a and b; rounding of the root is added to it. Default:
 *   the rounding of b − a
 * @param fa f(a) and f(b), where they are known already
 */
export function findRoot(f: (x: number) => number, a: number, b: number, tolerance = 0, fa = f(a), fb = f(b)): Root {
  const state: Bracket = { a, fa, b, fb, c: a, fc: fa, last: b - a, beforeLast: b - a };
  if (!Number.isFinite(fa) || !Number.isFinite(fb)) return ended(state, 2, 'nonFinite');
  if (fa !== 0 && fb !== 0 && fa > 0 === fb > 0) return ended(state, 2, 'noSignChange');
  for (let evaluations = 2; evaluations < MOST; evaluations += 1) {
    order(state);
    const reach = 2 * Number.EPSILON * Math.abs(state.b) + 0.5 * tolerance;
    const half = 0.5 * (state.c - state.b);
    if (state.fb === 0 || Math.abs(half) <= reach) return ended(state, evaluations, 'converged');
    const step = nextStep(state, half, reach);
    state.a = state.b;
    state.fa = state.fb;
    state.b += Math.abs(step) > reach ? step : Math.sign(half) * reach;
    state.fb = f(state.b);
    if (!Number.isFinite(state.fb)) return ended(state, evaluations + 1, 'nonFinite');
  }
  return ended(state, MOST, 'maxIterations');
}

/** Bisection alone would need 1075 halvings of the widest bracket of doubles. */
const MOST = 200;

/** `b` is the best point, `c` the other end of the bracket, `a` the best point before; steps of the last two rounds. */
interface Bracket {
  a: number;
  fa: number;
  b: number;
  fb: number;
  c: number;
  fc: number;
  last: number;
  beforeLast: number;
}

/** Keeps the root between b and c, and |f(b)| the lesser. */
function order(s: Bracket): void {
  if (s.fb > 0 === s.fc > 0 && s.fb !== 0) {
    s.c = s.a;
    s.fc = s.fa;
    s.last = s.beforeLast = s.b - s.a;
  }
  if (Math.abs(s.fc) >= Math.abs(s.fb)) return;
  [s.a, s.b, s.c] = [s.b, s.c, s.b];
  [s.fa, s.fb, s.fc] = [s.fb, s.fc, s.fb];
}

function nextStep(s: Bracket, half: number, reach: number): number {
  if (Math.abs(s.beforeLast) >= reach && Math.abs(s.fa) > Math.abs(s.fb)) {
    const { p, q } = interpolation(s, half);
    if (2 * p < Math.min(3 * half * q - Math.abs(reach * q), Math.abs(s.beforeLast * q))) {
      s.beforeLast = s.last;
      s.last = p / q;
      return s.last;
    }
  }
  s.last = s.beforeLast = half;
  return half;
}

/** The step p/q (p ≥ 0) of the secant rule on two points, of inverse quadratic interpolation on three. */
function interpolation(s: Bracket, half: number): { p: number; q: number } {
  const ratio = s.fb / s.fa;
  let p = 2 * half * ratio;
  let q = 1 - ratio;
  if (s.a !== s.c) {
    const u = s.fa / s.fc;
    const v = s.fb / s.fc;
    p = ratio * (2 * half * u * (u - v) - (s.b - s.a) * (v - 1));
    q = (u - 1) * (v - 1) * (ratio - 1);
  }
  return p > 0 ? { p, q: -q } : { p: -p, q };
}

function ended(s: Bracket, evaluations: number, reason: Root['reason']): Root {
  const { b, c } = s;
  return { root: b, low: Math.min(b, c), high: Math.max(b, c), evaluations, reason };
}
