import { arcAt, arcDistance, arcParameter } from './arc-piece.js';
import { cubicAt, cubicParameter, cubicPoint, squareParameters } from './cubic-piece.js';
import { boxDistanceSquared, newFoot, type ArcPiece, type CubicPiece, type Foot, type Piece } from './piece.js';
import type { SmoothRun } from './track-path.js';

const trial = newFoot();
const roots = new Float64Array(6);

/**
 * The nearest point of a run to (x, y), over the whole run: exact on lines and arcs, to rounding on splines.
 *
 * The distance is signed, + on the left of the path. Where the foot is held at an end of an open run (`atStart`,
 * `atEnd`) the query is not square to the run: the distance is to the end point, its sign still the side.
 * At a tie (the centre of an arc) the first piece and its first point win.
 *
 * @param out overwritten and returned
 * @param hint index of the piece to try first, such as `out.piece` of the last call; it changes the cost, not the answer
 */
export function nearestOnRun(run: SmoothRun, x: number, y: number, out: Foot, hint = 0): Foot {
  const { pieces } = run;
  const first = hint < pieces.length ? hint : 0;
  let best = nearestOnPiece(pieces[first], x, y, out);
  out.piece = first;
  for (let k = 0; k < pieces.length; k += 1) {
    if (k === first || boxDistanceSquared(pieces[k].box, x, y) > best * best) continue;
    const found = nearestOnPiece(pieces[k], x, y, trial);
    if (found > best || (found === best && k > first)) continue;
    best = found;
    trial.piece = k;
    Object.assign(out, trial);
  }
  markEnds(run, x, y, out);
  return out;
}

/** The point of a run at arc length `s`: held to the ends of an open run, taken round on a closed one. */
export function pointAt(run: SmoothRun, s: number, out: Foot = newFoot()): Foot {
  const at = run.closed ? s - Math.floor(s / run.length) * run.length : Math.min(Math.max(s, 0), run.length);
  const index = pieceAt(run, at);
  const piece = run.pieces[index];
  const local = Math.min(Math.max(at - piece.from, 0), piece.length);
  if (piece.kind === 'cubic') cubicAt(piece, cubicParameter(piece, local), out);
  else arcAt(piece, local, out);
  out.piece = index;
  out.distance = 0;
  out.atStart = !run.closed && at === 0;
  out.atEnd = !run.closed && at === run.length;
  return out;
}

/** Nearest point of one piece, into `out`; @returns the distance without sign. */
function nearestOnPiece(piece: Piece, x: number, y: number, out: Foot): number {
  if (piece.kind === 'cubic') nearestOnCubic(piece, x, y, out);
  else nearestOnArc(piece, x, y, out);
  return Math.abs(out.distance);
}

function nearestOnArc(arc: ArcPiece, x: number, y: number, out: Foot): void {
  const s = arcParameter(arc, x, y);
  if (s >= 0 && s <= arc.length) {
    arcAt(arc, s, out);
    out.distance = arcDistance(arc, x, y);
    return;
  }
  const toStart = Math.hypot(x - arc.start[0], y - arc.start[1]);
  const toEnd = Math.hypot(x - arc.end[0], y - arc.end[1]);
  arcAt(arc, toStart <= toEnd ? 0 : arc.length, out);
  out.distance = signedTo(out, x, y);
}

function nearestOnCubic(piece: CubicPiece, x: number, y: number, out: Foot): void {
  const count = squareParameters(piece, x, y, roots);
  let v = 0;
  let least = Math.hypot(x - piece.start[0], y - piece.start[1]);
  for (let k = 0; k <= count; k += 1) {
    const candidate = k < count ? roots[k] : 1;
    const [px, py] = cubicPoint(piece, candidate);
    const found = Math.hypot(x - px, y - py);
    if (found < least) {
      least = found;
      v = candidate;
    }
  }
  cubicAt(piece, v, out);
  out.distance = v > 0 && v < 1 ? out.tx * (y - out.y) - out.ty * (x - out.x) : signedTo(out, x, y);
}

/** Distance to the foot itself, with the sign of the side of the path (+ where (x, y) is dead ahead or behind). */
function signedTo(foot: Foot, x: number, y: number): number {
  const dx = x - foot.x;
  const dy = y - foot.y;
  const away = Math.hypot(dx, dy);
  return foot.tx * dy - foot.ty * dx < 0 ? -away : away;
}

/** An end holds the foot where the query lies beyond it, along the path. */
export function markEnds(run: SmoothRun, x: number, y: number, foot: Foot): void {
  foot.atStart = false;
  foot.atEnd = false;
  if (run.closed) return;
  const ahead = foot.tx * (x - foot.x) + foot.ty * (y - foot.y);
  foot.atStart = foot.s <= 0 && ahead < 0;
  foot.atEnd = foot.s >= run.length && ahead > 0;
}

/** Index of the piece of a run on which arc length `s` lies. */
export function pieceAt(run: SmoothRun, s: number): number {
  let low = 0;
  let high = run.pieces.length - 1;
  while (low < high) {
    const middle = (low + high + 1) >> 1;
    if (run.pieces[middle].from <= s) low = middle;
    else high = middle - 1;
  }
  return low;
}
