import { arcAt } from './arc-piece.js';
import { cubicAt, tangentParameters } from './cubic-piece.js';
import { newFoot, type ArcPiece, type Foot } from './piece.js';
import type { SmoothRun } from './track-path.js';

const roots = new Float64Array(6);

/**
 * The points of a run's arcs and splines at which the tangent is square to (nx, ny): where a straight face with that
 * normal can touch the run between its ends. Lines have none (their ends do it). `distance` is 0.
 *
 * @param nx component of the face's normal; its length does not matter, its sign neither
 */
export function pieceExtremeAlong(run: SmoothRun, nx: number, ny: number): Foot[] {
  return run.pieces.flatMap((piece, index) => {
    if (piece.kind !== 'cubic') return piece.curvature === 0 ? [] : arcExtremes(piece, index, nx, ny);
    const count = tangentParameters(piece, nx, ny, roots);
    return Array.from(roots.subarray(0, count), (v) => {
      const foot = newFoot();
      cubicAt(piece, v, foot);
      foot.piece = index;
      return foot;
    });
  });
}

/** The arc's direction is its first one turned by κ s; it is square to n where that angle is n's ± a quarter turn. */
function arcExtremes(arc: ArcPiece, index: number, nx: number, ny: number): Foot[] {
  const quarter = Math.atan2(-nx, ny) - Math.atan2(arc.tangent[1], arc.tangent[0]);
  const last = arc.curvature * arc.length;
  const slack = 1e-12;
  const first = Math.ceil((Math.min(0, last) - slack - quarter) / Math.PI);
  const feet: Foot[] = [];
  for (let k = first; quarter + k * Math.PI <= Math.max(0, last) + slack; k += 1) {
    const foot = newFoot();
    arcAt(arc, Math.min(Math.max((quarter + k * Math.PI) / arc.curvature, 0), arc.length), foot);
    foot.piece = index;
    feet.push(foot);
  }
  return feet;
}
