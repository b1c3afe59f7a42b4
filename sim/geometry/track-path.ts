import { cross, dot, type Vec } from '../core/vec.js';
import type { Track, TrackSegment } from '../mechanism/kinds/track.js';
import { arcAt, arcPiece, linePiece } from './arc-piece.js';
import { cubicAt } from './cubic-piece.js';
import { boxAround, growBox, newFoot, type Box, type Piece } from './piece.js';
import { splinePieces } from './spline.js';

/** Tangents closer than this [rad] pass smoothly (the mechanism file, Touching). */
const SMOOTH = 1e-6;

/** Where a run goes on: the other run, and the end of it that meets ours ('end' where it is drawn the other way). */
export interface RunLink {
  run: SmoothRun;
  at: 'start' | 'end';
}

/** A stretch of a track without a corner. */
export interface SmoothRun {
  track: string;
  /** Index among the runs of its track. */
  index: number;
  pieces: Piece[];
  length: number;
  /** It closes on itself smoothly; s is then taken modulo `length`. */
  closed: boolean;
  start: Vec;
  end: Vec;
  /** Arc length of its start on the track [m]; a run over a closed track's first point goes past the track's length. */
  offset: number;
  box: Box;
  /** The runs that go on smoothly from its ends, on other tracks; set by `joinTracks`. */
  previous: RunLink | null;
  next: RunLink | null;
}

/** A corner of a track, between two runs: `turn` is signed [rad], + to the left; ±π turns back on itself. */
export interface Corner {
  at: Vec;
  /** Arc length on the track [m]. */
  s: number;
  turn: number;
  /** Indexes of the runs before and after it. */
  before: number;
  after: number;
}

export interface TrackPath {
  id: string;
  side: Track['side'];
  runs: SmoothRun[];
  closed: boolean;
  length: number;
  corners: Corner[];
  box: Box;
}

/**
 * The path of a track: its segments as lines, exact arcs and spline spans, chained into smooth runs that are cut at
 * corners. A closed track without a corner is one periodic run; with corners, its first run begins at the first corner.
 */
export function buildTrack(track: Track): TrackPath {
  const pieces = piecesOf(track);
  const turns = pieces.map((piece, i) => turnBetween(pieces[i === 0 ? pieces.length - 1 : i - 1], piece));
  const starts = pieces.map((_, i) => i).filter((i) => (i === 0 && !track.closed) || isCorner(turns[i]));
  const offsets = startsOf(pieces);
  const length = offsets[pieces.length];
  const periodic = track.closed && starts.length === 0;
  const cuts = periodic ? [0] : starts;
  const runs = cuts.map((first, index) => {
    const next = cuts[index + 1] ?? cuts[0] + (track.closed ? pieces.length : 0);
    const count = next > first ? next - first : pieces.length - first;
    const chain = Array.from({ length: count }, (_, k) => pieces[(first + k) % pieces.length]);
    return smoothRun(track.id, index, chain, offsets[first], periodic);
  });
  const corners = starts
    .map((first, after) => ({
      at: pieces[first].start,
      s: offsets[first],
      turn: turns[first],
      before: (after + runs.length - 1) % runs.length,
      after,
    }))
    .filter((corner) => track.closed || corner.s > 0);
  return { id: track.id, side: track.side, runs, closed: track.closed, length, corners, box: around(runs) };
}

function piecesOf(track: Track): Piece[] {
  let at = track.from;
  return track.segments.flatMap((segment, index) => {
    const pieces = piecesFrom(at, segment, index);
    at = pieces[pieces.length - 1].end;
    return pieces;
  });
}

function piecesFrom(at: Vec, segment: TrackSegment, index: number): Piece[] {
  if (segment.kind === 'line') return [linePiece(at, segment.to, index, segment.name)];
  if (segment.kind === 'arc') return [arcPiece(at, segment.to, segment.bulge, index, segment.name)];
  return splinePieces([at, ...segment.through], index, segment.name);
}

function startsOf(pieces: Piece[]): number[] {
  const starts = [0];
  for (const piece of pieces) starts.push(starts[starts.length - 1] + piece.length);
  return starts;
}

/** Signed angle from one piece's direction at its end to the next one's at its start [rad]. */
function turnBetween(before: Piece, after: Piece): number {
  const a = endTangent(before, 'end');
  const b = endTangent(after, 'start');
  return Math.atan2(cross(a, b), dot(a, b));
}

const isCorner = (turn: number): boolean => Math.abs(turn) > SMOOTH;

const scratch = newFoot();

/** Unit tangent at an end of a piece, along the path. */
export function endTangent(piece: Piece, end: 'start' | 'end'): Vec {
  if (piece.kind === 'cubic') cubicAt(piece, end === 'start' ? 0 : 1, scratch);
  else arcAt(piece, end === 'start' ? 0 : piece.length, scratch);
  return [scratch.tx, scratch.ty];
}

function smoothRun(track: string, index: number, chain: Piece[], offset: number, closed: boolean): SmoothRun {
  let from = 0;
  for (const piece of chain) {
    piece.from = from;
    from += piece.length;
  }
  const start = chain[0].start;
  const end = chain[chain.length - 1].end;
  const box = boxAround([]);
  for (const piece of chain) grow(box, piece.box);
  return { track, index, pieces: chain, length: from, closed, start, end, offset, box, previous: null, next: null };
}

function around(parts: readonly { box: Box }[]): Box {
  const box = boxAround([]);
  for (const part of parts) grow(box, part.box);
  return box;
}

function grow(box: Box, other: Box): void {
  growBox(box, [other.minX, other.minY]);
  growBox(box, [other.maxX, other.maxY]);
}
