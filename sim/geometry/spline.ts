import { distance, type Vec } from '../core/vec.js';
import { cubicPiece } from './cubic-piece.js';
import type { CubicPiece } from './piece.js';

/**
 * The natural cubic spline through points, by chord length: x(u) and y(u) are cubic between knots u₀ = 0,
 * u_{i+1} = u_i + |P_{i+1} − P_i|, with continuous second derivatives that vanish at both ends.
 * Source: de Boor, A Practical Guide to Splines, ch. IV (natural end conditions); the tridiagonal system is solved by
 * elimination without pivoting, which is safe because it is diagonally dominant.
 *
 * @param points at least two, consecutive ones distinct [m]
 * @returns one cubic piece for each span
 */
export function splinePieces(points: readonly Vec[], segment: number, name?: string): CubicPiece[] {
  const chords = points.slice(1).map((point, i) => distance(points[i], point));
  const mx = secondDerivatives(
    points.map((p) => p[0]),
    chords,
  );
  const my = secondDerivatives(
    points.map((p) => p[1]),
    chords,
  );
  return chords.map((h, i) => {
    const start = points[i];
    const end = points[i + 1];
    const bx = spanCoefficients(start[0], end[0], mx[i], mx[i + 1], h);
    const by = spanCoefficients(start[1], end[1], my[i], my[i + 1], h);
    return cubicPiece(start, end, bx, by, segment, name);
  });
}

/** Coefficients of v, v², v³, v = u/h, of the cubic with these end values and second derivatives. */
function spanCoefficients(a: number, b: number, m: number, n: number, h: number): [number, number, number] {
  const k = (h * h) / 6;
  return [b - a - k * (2 * m + n), 3 * k * m, k * (n - m)];
}

/** Second derivatives M at the knots: h_{i−1} M_{i−1} + 2 (h_{i−1} + h_i) M_i + h_i M_{i+1} = 6 (slope_i − slope_{i−1}). */
function secondDerivatives(values: number[], h: number[]): number[] {
  const last = values.length - 1;
  const slope = (i: number): number => (values[i + 1] - values[i]) / h[i];
  const upper: number[] = [0];
  const right: number[] = [0];
  for (let i = 1; i < last; i += 1) {
    const pivot = 2 * (h[i - 1] + h[i]) - h[i - 1] * upper[i - 1];
    upper.push(h[i] / pivot);
    right.push((6 * (slope(i) - slope(i - 1)) - h[i - 1] * right[i - 1]) / pivot);
  }
  const second = new Array<number>(last + 1).fill(0);
  for (let i = last - 1; i > 0; i -= 1) second[i] = right[i] - upper[i] * second[i + 1];
  return second;
}
