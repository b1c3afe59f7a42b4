import { arcAt, arcDistance, arcParameter } from './arc-piece.js';
import { cubicAt, cubicParameter, cubicPoint } from './cubic-piece.js';
import type { CubicPiece, Foot, Piece } from './piece.js';

const MOST_STEPS = 30;

/**
 * The foot of (x, y) on one piece continued beyond its ends (a line, a whole circle, the span's own polynomial), near
 * where `out` stood: the smooth law that an integrator needs across the piece's end. `s` runs beyond the piece too.
 *
 * @param out its `s` is where to start looking; overwritten and returned
 */
export function footOnPiece(piece: Piece, x: number, y: number, out: Foot): Foot {
  if (piece.kind === 'cubic') return footOnSpan(piece, x, y, out);
  arcAt(piece, arcParameter(piece, x, y), out);
  out.distance = arcDistance(piece, x, y);
  out.atStart = false;
  out.atEnd = false;
  return out;
}

/** Newton's method on (P(v) − q)·P′(v) = 0. */
function footOnSpan(piece: CubicPiece, x: number, y: number, out: Foot): Foot {
  const local = Math.min(Math.max(out.s - piece.from, 0), piece.length);
  let v = cubicParameter(piece, local);
  for (let i = 0; i < MOST_STEPS; i += 1) {
    const [px, py] = cubicPoint(piece, v);
    const [dx, dy] = [slope(piece.bx, v), slope(piece.by, v)];
    const [ddx, ddy] = [bend(piece.bx, v), bend(piece.by, v)];
    const f = (px - x) * dx + (py - y) * dy;
    const step = f / (dx * dx + dy * dy + (px - x) * ddx + (py - y) * ddy);
    v -= step;
    if (!(Math.abs(step) > 1e-16 * (1 + Math.abs(v)))) break;
  }
  cubicAt(piece, Math.min(Math.max(v, 0), 1), out);
  const within = out.s;
  cubicAt(piece, v, out);
  const speed = Math.hypot(slope(piece.bx, v), slope(piece.by, v));
  out.s = v < 0 ? piece.from + v * speed : v > 1 ? piece.from + piece.length + (v - 1) * speed : within;
  out.distance = out.tx * (y - out.y) - out.ty * (x - out.x);
  out.atStart = false;
  out.atEnd = false;
  return out;
}

const slope = ([a, b, c]: readonly [number, number, number], v: number): number => a + v * (2 * b + 3 * c * v);
const bend = ([, b, c]: readonly [number, number, number], v: number): number => 2 * b + 6 * c * v;
