import { distance, rotate, subtract, unit, type Vec } from '../core/vec.js';
import { boxAround, growBox, type ArcPiece, type Foot } from './piece.js';

/** A straight piece from `start` to `end`, which differ. */
export function linePiece(start: Vec, end: Vec, segment: number, name?: string): ArcPiece {
  return {
    kind: 'line',
    segment,
    ...(name === undefined ? {} : { name }),
    from: 0,
    length: distance(start, end),
    start,
    end,
    box: boxAround([start, end]),
    tangent: unit(subtract(end, start)),
    curvature: 0,
  };
}

/**
 * A circular arc by the bulge of the DXF polyline, b = tan(θ/4), θ the included angle, + counter-clockwise:
 * κ = 2 sin(θ/2) / chord = 4 b / ((1 + b²) chord). A bulge that rises less than the rounding of its chord is a line.
 */
export function arcPiece(start: Vec, end: Vec, bulge: number, segment: number, name?: string): ArcPiece {
  const line = linePiece(start, end, segment, name);
  if (Math.abs(bulge) < Number.EPSILON) return line;
  const included = 4 * Math.atan(bulge);
  const curvature = (4 * bulge) / ((1 + bulge * bulge) * line.length);
  const arc: ArcPiece = {
    ...line,
    kind: 'arc',
    length: included / curvature,
    tangent: rotate(line.tangent, -included / 2),
    curvature,
  };
  growToExtremes(arc);
  return arc;
}

/** Adds to the box the points of the arc whose tangent is upright or level. */
function growToExtremes(arc: ArcPiece): void {
  const quarter = Math.PI / 2;
  const first = Math.atan2(arc.tangent[1], arc.tangent[0]);
  const last = first + arc.curvature * arc.length;
  const foot: Vec[] = [];
  for (let k = Math.ceil(Math.min(first, last) / quarter); k * quarter <= Math.max(first, last); k += 1) {
    foot.push(pointOnArc(arc, (k * quarter - first) / arc.curvature));
  }
  foot.forEach((point) => growBox(arc.box, point));
}

function pointOnArc(arc: ArcPiece, s: number): Vec {
  const turn = arc.curvature * s;
  const along = turn === 0 ? s : Math.sin(turn) / arc.curvature;
  const half = Math.sin(turn / 2);
  const across = turn === 0 ? 0 : (2 * half * half) / arc.curvature;
  const [tx, ty] = arc.tangent;
  return [arc.start[0] + along * tx - across * ty, arc.start[1] + along * ty + across * tx];
}

/** Writes the point at arc length `s` of the piece into `out` (all but `piece`, and `s` on the run). */
export function arcAt(arc: ArcPiece, s: number, out: Foot): void {
  const turn = arc.curvature * s;
  const [tx, ty] = arc.tangent;
  const c = Math.cos(turn);
  const d = Math.sin(turn);
  const along = turn === 0 ? s : d / arc.curvature;
  const half = Math.sin(turn / 2);
  const across = turn === 0 ? 0 : (2 * half * half) / arc.curvature;
  out.s = arc.from + s;
  out.x = arc.start[0] + along * tx - across * ty;
  out.y = arc.start[1] + along * ty + across * tx;
  out.tx = c * tx - d * ty;
  out.ty = c * ty + d * tx;
  out.curvature = arc.curvature;
  out.segment = arc.segment;
}

/**
 * Arc length on the piece of the point where (x, y) is square to it, not held to its ends: with w = q − start,
 * φ = atan2(κ t·w, 1 − κ n·w) and s = φ/κ; on an arc, φ is taken on the side of the piece's middle.
 */
export function arcParameter(arc: ArcPiece, x: number, y: number): number {
  const [tx, ty] = arc.tangent;
  const wx = x - arc.start[0];
  const wy = y - arc.start[1];
  const along = tx * wx + ty * wy;
  if (arc.curvature === 0) return along;
  const across = tx * wy - ty * wx;
  const k = arc.curvature;
  const turn = Math.atan2(k * along, 1 - k * across);
  const s = turn / k;
  const circle = (2 * Math.PI) / Math.abs(k);
  const middle = arc.length / 2;
  return s < middle - circle / 2 ? s + circle : s > middle + circle / 2 ? s - circle : s;
}

/** Signed distance of (x, y) to the whole line or circle, + on the left: (2 n·w − κ w²) / (1 + |n − κ w|). */
export function arcDistance(arc: ArcPiece, x: number, y: number): number {
  const [tx, ty] = arc.tangent;
  const wx = x - arc.start[0];
  const wy = y - arc.start[1];
  const across = tx * wy - ty * wx;
  const k = arc.curvature;
  if (k === 0) return across;
  return (2 * across - k * (wx * wx + wy * wy)) / (1 + Math.hypot(-ty - k * wx, tx - k * wy));
}
