import { gaussLegendre } from '../core/quadrature.js';
import { rootsInUnit } from '../core/polynomial.js';
import type { Vec } from '../core/vec.js';
import { boxAround, growBox, type CubicPiece, type Foot } from './piece.js';

type Three = readonly [number, number, number];

/** A cubic span from `start`, by its coefficients [m]; `end` is where it must end, to the bit. */
export function cubicPiece(start: Vec, end: Vec, bx: Three, by: Three, segment: number, name?: string): CubicPiece {
  const product = (i: number, j: number): number => bx[i] * bx[j] + by[i] * by[j];
  const piece: CubicPiece = {
    kind: 'cubic',
    segment,
    ...(name === undefined ? {} : { name }),
    from: 0,
    length: 0,
    start,
    end,
    box: boxAround([start, end]),
    bx,
    by,
    normal: [
      product(0, 0),
      3 * product(0, 1),
      4 * product(0, 2) + 2 * product(1, 1),
      5 * product(1, 2),
      3 * product(2, 2),
    ],
    panels: new Float64Array(2),
  };
  piece.panels = panelsOf(piece);
  piece.length = piece.panels[piece.panels.length - 1];
  growToExtremes(piece);
  return piece;
}

const coordinate = (start: number, b: Three, v: number): number => start + v * (b[0] + v * (b[1] + v * b[2]));
const slope = (b: Three, v: number): number => b[0] + v * (2 * b[1] + 3 * v * b[2]);
const bend = (b: Three, v: number): number => 2 * b[1] + 6 * v * b[2];

const speedAt = (piece: CubicPiece, v: number): number => Math.hypot(slope(piece.bx, v), slope(piece.by, v));

/** Halves the panels of v until the arc length no longer changes; near a cusp the count is bounded instead. */
function panelsOf(piece: CubicPiece): Float64Array {
  let panels = cumulated(piece, 1);
  for (let count = 2; count <= 1024; count *= 2) {
    const finer = cumulated(piece, count);
    const change = Math.abs(finer[count] - panels[panels.length - 1]);
    if (change <= 2e-15 * finer[count]) return panels;
    panels = finer;
  }
  return panels;
}

function cumulated(piece: CubicPiece, count: number): Float64Array {
  const lengths = new Float64Array(count + 1);
  for (let k = 0; k < count; k += 1) {
    lengths[k + 1] = lengths[k] + gaussLegendre((v) => speedAt(piece, v), k / count, (k + 1) / count);
  }
  return lengths;
}

const work = new Float64Array(6);
const roots = new Float64Array(6);

function growToExtremes(piece: CubicPiece): void {
  for (const b of [piece.bx, piece.by]) {
    work.set([b[0], 2 * b[1], 3 * b[2]]);
    const count = rootsInUnit(work, 2, roots);
    for (let k = 0; k < count; k += 1) growBox(piece.box, cubicPoint(piece, roots[k]));
  }
}

export const cubicPoint = (piece: CubicPiece, v: number): Vec =>
  v === 1 ? piece.end : [coordinate(piece.start[0], piece.bx, v), coordinate(piece.start[1], piece.by, v)];

/** Arc length from the start of the span to v [m]. */
export function cubicArcLength(piece: CubicPiece, v: number): number {
  const count = piece.panels.length - 1;
  if (v >= 1) return piece.length;
  const panel = Math.floor(v * count);
  const from = panel / count;
  if (v === from) return piece.panels[panel];
  return piece.panels[panel] + gaussLegendre((u) => speedAt(piece, u), from, v);
}

/** The inverse of `cubicArcLength`: v at arc length `s`, by Newton's method inside the panel's bracket. */
export function cubicParameter(piece: CubicPiece, s: number): number {
  if (s <= 0) return 0;
  if (s >= piece.length) return 1;
  const count = piece.panels.length - 1;
  let panel = 0;
  while (piece.panels[panel + 1] < s) panel += 1;
  let low = panel / count;
  let high = (panel + 1) / count;
  let v = low + ((high - low) * (s - piece.panels[panel])) / (piece.panels[panel + 1] - piece.panels[panel]);
  for (let iteration = 0; iteration < 60; iteration += 1) {
    const excess = cubicArcLength(piece, v) - s;
    if (excess > 0) high = v;
    else low = v;
    let next = v - excess / speedAt(piece, v);
    if (!(next >= low && next <= high)) next = 0.5 * (low + high);
    if (Math.abs(next - v) <= 2e-16 || excess === 0) return next;
    v = next;
  }
  return v;
}

/**
 * Writes the point at parameter v into `out` (all but `piece`). At a cusp, where the speed is nil, the tangent is the one
 * the path leaves along, and the curvature is given as 0.
 */
export function cubicAt(piece: CubicPiece, v: number, out: Foot): void {
  const [x, y] = cubicPoint(piece, v);
  const [dx, dy] = [slope(piece.bx, v), slope(piece.by, v)];
  const [ddx, ddy] = [bend(piece.bx, v), bend(piece.by, v)];
  const speed = Math.hypot(dx, dy);
  out.s = piece.from + cubicArcLength(piece, v);
  out.x = x;
  out.y = y;
  out.segment = piece.segment;
  const size = speed === 0 ? Math.hypot(ddx, ddy) : speed;
  out.tx = (speed === 0 ? ddx : dx) / size;
  out.ty = (speed === 0 ? ddy : dy) / size;
  out.curvature = speed === 0 ? 0 : (dx * ddy - dy * ddx) / (speed * speed * speed);
}

/**
 * The parameters in [0, 1] at which (x, y) is square to the span, all of them, ascending: roots of the quintic
 * (P(v) − q)·P′(v) = 0.
 * @param out at least 6 long
 * @returns how many
 */
export function squareParameters(piece: CubicPiece, x: number, y: number, out: Float64Array): number {
  const qx = x - piece.start[0];
  const qy = y - piece.start[1];
  const { bx, by, normal } = piece;
  work[0] = -(qx * bx[0] + qy * by[0]);
  work[1] = normal[0] - 2 * (qx * bx[1] + qy * by[1]);
  work[2] = normal[1] - 3 * (qx * bx[2] + qy * by[2]);
  work[3] = normal[2];
  work[4] = normal[3];
  work[5] = normal[4];
  return rootsInUnit(work, 5, out);
}

/** The parameters in [0, 1] at which the tangent is square to (nx, ny); @returns how many, at most 2 (+ rounding). */
export function tangentParameters(piece: CubicPiece, nx: number, ny: number, out: Float64Array): number {
  const { bx, by } = piece;
  work[0] = bx[0] * nx + by[0] * ny;
  work[1] = 2 * (bx[1] * nx + by[1] * ny);
  work[2] = 3 * (bx[2] * nx + by[2] * ny);
  return rootsInUnit(work, 2, out);
}
