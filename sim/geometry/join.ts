import { distance, norm, type Vec } from '../core/vec.js';
import type { Track } from '../mechanism/kinds/track.js';
import { buildTrack, endTangent, type RunLink, type SmoothRun, type TrackPath } from './track-path.js';

/** Ends closer than this × extent touch, tangents closer than this [rad] agree (the mechanism file, Touching). */
export const TOUCHING = 1e-6;

/** True where two points lie so close that they touch. */
export const touching = (a: Vec, b: Vec, extent: number): boolean => distance(a, b) <= TOUCHING * extent;

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
    const link: RunLink = { run: other.run, at: other.at };
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
  return sides && isStraight && touching(a.point, b.point, extent);
}
