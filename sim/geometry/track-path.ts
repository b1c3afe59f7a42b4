import { cross, distance, dot, norm, subtract, type Vec } from '../core/vec.js';
import type { Track, TrackSegment } from '../mechanism/kinds/track.js';
import { arcAt, arcPiece, linePiece } from './arc-piece.js';
import { cubicAt } from './cubic-piece.js';
import { boxAround, growBox, newFoot, type Box, type Foot, type Piece } from './piece.js';
import { splinePieces } from './spline.js';

/** Tangents closer than this [rad] pass smoothly; ends closer than this × extent touch (the mechanism file, Touching). */
export const TOUCHING = 1e-6;

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

const isCorner = (turn: number): boolean => Math.abs(turn) > TOUCHING;

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

/**
 * Links the runs of different tracks that pass smoothly into each other: their ends lie within 1e-6 of `extent`, their
 * directions agree within 1e-6, and their free sides meet. Tracks drawn in opposite senses link too (`RunLink.at`).
 * Where several qualify, the first in the document's order is taken.
 *
 * @param extent the mechanism's extent [m]
 */
export function joinTracks(tracks: readonly Track[], extent: number): TrackPath[] {
  const paths = tracks.map(buildTrack);
  const ends = paths.flatMap(openEnds);
  for (const end of ends) {
    const other = ends.find((candidate) => meetsSmoothly(end, candidate, extent));
    if (!other) continue;
    const link = { run: other.run, at: other.at };
    if (end.at === 'start') end.run.previous = link;
    else end.run.next = link;
  }
  return paths;
}

/** An open end of a track; `outward` points along the path out of it, `free` tells which sides of that are free. */
interface OpenEnd {
  run: SmoothRun;
  at: 'start' | 'end';
  point: Vec;
  outward: Vec;
  free: { left: boolean; right: boolean };
}

function openEnds(path: TrackPath): OpenEnd[] {
  if (path.closed) return [];
  const first = path.runs[0];
  const last = path.runs[path.runs.length - 1];
  const [tx, ty] = endTangent(first.pieces[0], 'start');
  const isLeft = path.side !== 'right';
  const isRight = path.side !== 'left';
  return [
    { run: first, at: 'start', point: first.start, outward: [-tx, -ty], free: { left: isRight, right: isLeft } },
    {
      run: last,
      at: 'end',
      point: last.end,
      outward: endTangent(last.pieces[last.pieces.length - 1], 'end'),
      free: { left: isLeft, right: isRight },
    },
  ];
}

function meetsSmoothly(a: OpenEnd, b: OpenEnd, extent: number): boolean {
  if (a.run === b.run || a.run.track === b.run.track) return false;
  const sides = (a.free.left && b.free.right) || (a.free.right && b.free.left);
  const isStraight = norm([a.outward[0] + b.outward[0], a.outward[1] + b.outward[1]]) <= TOUCHING;
  return sides && isStraight && norm(subtract(a.point, b.point)) <= TOUCHING * extent;
}

/** How far apart two points may be and still touch [m]. */
export const touching = (a: Vec, b: Vec, extent: number): boolean => distance(a, b) <= TOUCHING * extent;

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

export type { Foot };
