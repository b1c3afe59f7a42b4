import type { Vec } from '../../core/vec.js';
import { buildTrack, pointAt, type Piece, type SmoothRun } from '../../geometry/index.js';
import type { Track } from '../../mechanism/kinds/track.js';
import type { DrawingContext, Figure } from '../figure.js';
import { hatchSide } from '../hatch.js';
import { line, narrow, segments, wide, type DrawOperation } from '../operations.js';
import { toPaper } from '../paper.js';

/** Greatest distance of a chord from its curve [px]. */
const sagitta = 0.04;

/** Points of a run of a track on paper, close enough together to look round. */
export function runPoints(run: SmoothRun, pixels: number): Vec[] {
  const places = run.pieces.flatMap((piece) => piecePlaces(piece, pixels));
  return [...places, run.length].map((s) => {
    const { x, y } = pointAt(run, s);
    return toPaper([x, y], pixels);
  });
}

function piecePlaces(piece: Piece, pixels: number): number[] {
  const count = pieceCount(piece, pixels);
  return Array.from({ length: count }, (_, i) => piece.from + (piece.length * i) / count);
}

function pieceCount(piece: Piece, pixels: number): number {
  if (piece.kind === 'line') return 1;
  if (piece.kind === 'cubic') return Math.max(8, Math.ceil((piece.length * pixels) / 4));
  const radius = pixels / Math.abs(piece.curvature);
  const step = 2 * Math.acos(Math.max(0, 1 - sagitta / radius));
  return Math.max(2, Math.ceil((piece.length * Math.abs(piece.curvature)) / step));
}

/** A track: its surface in wide line, hatched on the solid side; a belt has an arrow of its speed. */
export function trackFigures(track: Track, { pixels }: DrawingContext): Figure[] {
  const runs = buildTrack(track).runs.map((run) => runPoints(run, pixels));
  const operations: DrawOperation[] = runs.flatMap((points) => trackOperations(points, track.side));
  if (track.surfaceSpeed !== 0) operations.push(...beltArrow(runs[0], isForward(track)));
  return [{ key: `track:${track.id}`, layer: 'tracks', item: track.id, on: 'ground', operations }];
}

export function trackOperations(points: readonly Vec[], side: Track['side']): DrawOperation[] {
  const surface = line(points, { ...wide, cap: 'round' });
  if (side === 'both') return [surface];
  // Left and right of a path are the same on paper: the eye does not care that y runs down.
  const hatch = hatchSide(points, { side: side === 'left' ? 1 : -1, spacing: 7, depth: 6 });
  return [segments(hatch, narrow), surface];
}

function isForward({ surfaceSpeed }: Track): boolean {
  return typeof surfaceSpeed === 'number' ? surfaceSpeed > 0 : (surfaceSpeed.find(([, v]) => v !== 0)?.[1] ?? 0) > 0;
}

/** An arrow along the path, beside its middle, on the hatched side. */
function beltArrow(points: readonly Vec[], forward: boolean): DrawOperation[] {
  const i = Math.max(1, Math.floor(points.length / 2));
  const [a, b] = forward ? [points[i - 1], points[i]] : [points[i], points[i - 1]];
  const length = Math.hypot(b[0] - a[0], b[1] - a[1]) || 1;
  const [tx, ty] = [(b[0] - a[0]) / length, (b[1] - a[1]) / length];
  const sign = forward ? 1 : -1;
  const [x, y] = [(a[0] + b[0]) / 2 - ty * 14 * sign, (a[1] + b[1]) / 2 + tx * 14 * sign];
  const tail: Vec = [x - tx * 14, y - ty * 14];
  const head: Vec = [x + tx * 14, y + ty * 14];
  const barb = (s: number): Vec => [head[0] - 6 * tx - s * 3 * ty, head[1] - 6 * ty + s * 3 * tx];
  return [line([tail, head], narrow), line([barb(1), head, barb(-1)], narrow)];
}
