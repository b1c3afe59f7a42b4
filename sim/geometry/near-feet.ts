import { arcAt, arcDistance, arcParameter } from './arc-piece.js';
import { cubicAt, squareParameters } from './cubic-piece.js';
import { markEnds } from './nearest.js';
import { boxDistanceSquared, newFoot, type Foot, type Piece } from './piece.js';
import type { SmoothRun } from './track-path.js';

const roots = new Float64Array(6);
const before = newFoot();
const after = newFoot();

/** Two feet nearer along the run than this fraction of its length are one. */
const SAME = 1e-9;

/**
 * Every place of a run whose distance to (x, y) is a local minimum not above `within`, in order of arc length: where a
 * disc or a corner touches, or will. Feet held at an end of an open run count (`atStart`, `atEnd`).
 *
 * A foot inside a piece is a minimum where 1 − κ d > 0 (κ the signed curvature, d the signed distance).
 *
 * @param within [m], not negative
 */
export function allNearFeet(run: SmoothRun, x: number, y: number, within: number): Foot[] {
  const found: Foot[] = [];
  run.pieces.forEach((piece, index) => {
    if (boxDistanceSquared(piece.box, x, y) > within * within) return;
    addJoint(run, index, x, y, within, found);
    addSquare(piece, index, x, y, within, found);
    if (index === run.pieces.length - 1 && !run.closed) addEnd(run, x, y, within, found);
  });
  found.sort((a, b) => a.s - b.s);
  return found.filter((foot, k) => k === 0 || foot.s - found[k - 1].s > SAME * run.length);
}

function addSquare(piece: Piece, index: number, x: number, y: number, within: number, found: Foot[]): void {
  if (piece.kind === 'cubic') {
    const count = squareParameters(piece, x, y, roots);
    for (let k = 0; k < count; k += 1) {
      const foot = newFoot();
      cubicAt(piece, roots[k], foot);
      foot.distance = foot.tx * (y - foot.y) - foot.ty * (x - foot.x);
      addMinimum(foot, index, within, found);
    }
    return;
  }
  const s = arcParameter(piece, x, y);
  if (s < 0 || s > piece.length) return;
  const foot = newFoot();
  arcAt(piece, s, foot);
  foot.distance = arcDistance(piece, x, y);
  addMinimum(foot, index, within, found);
}

function addMinimum(foot: Foot, index: number, within: number, found: Foot[]): void {
  if (Math.abs(foot.distance) > within || 1 - foot.curvature * foot.distance <= 0) return;
  foot.piece = index;
  found.push(foot);
}

/** The start of a piece, where it is nearer than both of its sides: at an open start, or where two pieces just turn outwards. */
function addJoint(run: SmoothRun, index: number, x: number, y: number, within: number, found: Foot[]): void {
  const isOpen = index === 0 && !run.closed;
  const count = run.pieces.length;
  placeAtEnd(run.pieces[index], 0, after);
  if (along(after, x, y) > 0) return;
  if (!isOpen) {
    placeAtEnd(run.pieces[(index + count - 1) % count], 1, before);
    if (along(before, x, y) < 0) return;
  }
  addHeld(run, after, index, x, y, within, found);
}

function addEnd(run: SmoothRun, x: number, y: number, within: number, found: Foot[]): void {
  const last = run.pieces.length - 1;
  placeAtEnd(run.pieces[last], 1, before);
  if (along(before, x, y) >= 0) addHeld(run, before, last, x, y, within, found);
}

function addHeld(run: SmoothRun, at: Foot, index: number, x: number, y: number, within: number, found: Foot[]): void {
  const away = Math.hypot(x - at.x, y - at.y);
  if (away > within) return;
  const side = at.tx * (y - at.y) - at.ty * (x - at.x);
  const foot = { ...at, piece: index, distance: side < 0 ? -away : away };
  markEnds(run, x, y, foot);
  found.push(foot);
}

const along = (foot: Foot, x: number, y: number): number => foot.tx * (x - foot.x) + foot.ty * (y - foot.y);

function placeAtEnd(piece: Piece, end: 0 | 1, out: Foot): void {
  if (piece.kind === 'cubic') cubicAt(piece, end, out);
  else arcAt(piece, end * piece.length, out);
}
