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
 * A root of f between `a` and `b`, where f has opposite signs, bracketed throughout: inverse quadratic interpolation where
 * the last three points allow it, bisection elsewhere. Superlinear on simple roots, near bisection's speed on multiple
 * ones and jumps.
 * Source: T. R. Chandrupatla, A new hybrid quadratic/bisection algorithm for finding the zero of a nonlinear function
 * without using derivatives, Advances in Engineering Software 28 (1997) 145–149.
 *
 * @param tolerance the bracket's width to reach, in the unit of a and b; rounding of the root is added to it. Default:
 *   the rounding of b − a
 * @param fa f(a) and f(b), where they are known already
 */
export function findRoot(
  f: (x: number) => number,
  a: number,
  b: number,
  tolerance = Number.EPSILON * Math.abs(b - a),
  fa = f(a),
  fb = f(b),
): Root {
  // p is the newest point, q the other end of the bracket, r the point dropped last.
  const s: Points = { p: b, fp: fb, q: a, fq: fa, r: a, fr: fa };
  if (!Number.isFinite(fa) || !Number.isFinite(fb)) return ended(s, 2, 'nonFinite');
  if (fa !== 0 && fb !== 0 && fa > 0 === fb > 0) return ended(s, 2, 'noSignChange');
  for (let evaluations = 2; evaluations < MOST; evaluations += 1) {
    const best = Math.abs(s.fp) < Math.abs(s.fq) ? s.p : s.q;
    const least = (0.5 * tolerance + Number.EPSILON * Math.abs(best)) / Math.abs(s.q - s.p);
    if (s.fp === 0 || s.fq === 0 || least > 0.5) return ended(s, evaluations, 'converged');
    const fraction = Math.min(Math.max(evaluations === 2 ? 0.5 : interpolated(s), least), 1 - least);
    const x = s.p + fraction * (s.q - s.p);
    const value = f(x);
    if (!Number.isFinite(value)) return ended(s, evaluations + 1, 'nonFinite');
    take(s, x, value);
  }
  return ended(s, MOST, 'maxIterations');
}

/** Far more than bisection to rounding needs; a bracket that straddles zero with a tiny tolerance may use them up. */
const MOST = 300;

interface Points {
  p: number;
  fp: number;
  q: number;
  fq: number;
  r: number;
  fr: number;
}

function take(s: Points, x: number, value: number): void {
  const replacesP = value > 0 === s.fp > 0;
  s.r = replacesP ? s.p : s.q;
  s.fr = replacesP ? s.fp : s.fq;
  if (!replacesP) [s.q, s.fq] = [s.p, s.fp];
  s.p = x;
  s.fp = value;
}

/** Fraction of the way from p to q by inverse quadratic interpolation, or ½ where that cannot be trusted. */
function interpolated({ p, fp, q, fq, r, fr }: Points): number {
  const place = (p - q) / (r - q);
  const level = (fp - fq) / (fr - fq);
  if (level * level >= place || (1 - level) * (1 - level) >= 1 - place) return 0.5;
  return (fp / (fq - fp)) * (fr / (fq - fr)) + ((r - p) / (q - p)) * (fp / (fr - fp)) * (fq / (fr - fq));
}

function ended({ p, fp, q, fq }: Points, evaluations: number, reason: Root['reason']): Root {
  const root = Math.abs(fp) <= Math.abs(fq) ? p : q;
  return { root, low: Math.min(p, q), high: Math.max(p, q), evaluations, reason };
}
