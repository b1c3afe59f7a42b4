import { distance, type Vec } from '../core/vec.js';
import { cubicPiece } from './cubic-piece.js';
import { naturalSecondDerivatives, spanCoefficients } from './natural-spline.js';
import type { CubicPiece } from './piece.js';

/**
 * The natural cubic spline through points, by chord length: x(u) and y(u) are cubic between knots u₀ = 0,
 * u_{i+1} = u_i + |P_{i+1} − P_i|, with continuous second derivatives that vanish at both ends.
 *
 * @param points at least two, consecutive ones distinct [m]
 * @returns one cubic piece for each span
 */
export function splinePieces(points: readonly Vec[], segment: number, name?: string): CubicPiece[] {
  const chords = points.slice(1).map((point, i) => distance(points[i], point));
  const mx = naturalSecondDerivatives(
    points.map((p) => p[0]),
    chords,
  );
  const my = naturalSecondDerivatives(
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
