import { describe, expect, it } from 'vitest';
import { buildTrack, joinTracks, pointAt } from '../../../sim/geometry/index.js';
import type { Vec } from '../../../sim/core/vec.js';
import { arc, bulgeOf, line, spline, track } from './support.js';

const rad = Math.PI / 180;

/** A chute of 20° that rounds into a level run-out with radius 0.5. */
const foot: Vec = [1, 0];
const top: Vec = [foot[0] - 2 * Math.cos(20 * rad), foot[1] + 2 * Math.sin(20 * rad)];
const level: Vec = [foot[0] + 0.5 * Math.sin(20 * rad), foot[1] - 0.5 * (1 - Math.cos(20 * rad))];
const runOut: Vec = [level[0] + 1, level[1]];

describe('the path of a track', () => {
  it('is one smooth run over line, tangent arc and line', () => {
    const path = buildTrack(track(top, [line(...foot), arc(level, bulgeOf(20)), line(...runOut)]));
    expect(path.runs).toHaveLength(1);
    expect(path.corners).toEqual([]);
    expect(path.length).toBeCloseTo(2 + 0.5 * 20 * rad + 1, 12);
    expect(path.runs[0].pieces.map((piece) => piece.segment)).toEqual([0, 1, 2]);
  });

  it('is cut at a corner, with the turn signed: positive to the left', () => {
    const path = buildTrack(track(top, [line(...foot), line(2, 0)]));
    expect(path.runs).toHaveLength(2);
    expect(path.corners).toHaveLength(1);
    const [corner] = path.corners;
    expect(corner.at).toEqual(foot);
    expect(corner.s).toBeCloseTo(2, 14);
    expect(corner.turn).toBeCloseTo(20 * rad, 14);
    expect([corner.before, corner.after]).toEqual([0, 1]);
    expect(path.runs[1].offset).toBeCloseTo(2, 14);
  });

  it('passes smoothly over a kink below one part in a million, and not above', () => {
    const bent = (angle: number): number =>
      buildTrack(track([0, 0], [line(1, 0), line(1 + Math.cos(angle), Math.sin(angle))])).runs.length;
    expect(bent(0.9e-6)).toBe(1);
    expect(bent(1.1e-6)).toBe(2);
  });

  it('keeps the name and index of the segment each piece was drawn by', () => {
    const path = buildTrack(
      track(
        [0, 0],
        [
          { ...line(1, 0), name: 'feed' },
          { ...spline([2, 0], [3, 1]), name: 'lift' },
        ],
      ),
    );
    const pieces = path.runs.flatMap((run) => run.pieces);
    expect(pieces.map(({ name, segment }) => [name, segment])).toEqual([
      ['feed', 0],
      ['lift', 1],
      ['lift', 1],
    ]);
  });

  it('of a closed square is four runs and four corners that come round to the first', () => {
    const path = buildTrack(track([0, 0], [line(1, 0), line(1, 1), line(0, 1), line(0, 0)], { closed: true }));
    expect(path.runs).toHaveLength(4);
    expect(path.corners.map(({ s, before, after }) => [s, before, after])).toEqual([
      [0, 3, 0],
      [1, 0, 1],
      [2, 1, 2],
      [3, 2, 3],
    ]);
    path.corners.forEach((corner) => expect(corner.turn).toBeCloseTo(Math.PI / 2, 14));
  });

  it('of a closed stadium is one periodic run', () => {
    const stadium = track([0, 0], [line(2, 0), arc([2, 1], 1), line(0, 1), arc([0, 0], 1)], { closed: true });
    const [run, ...others] = buildTrack(stadium).runs;
    expect(others).toEqual([]);
    expect(run.closed).toBe(true);
    expect(run.length).toBeCloseTo(4 + Math.PI, 13);
    const [once, twice] = [pointAt(run, 0.4), pointAt(run, 0.4 - 2 * run.length)];
    expect(twice.x).toBeCloseTo(once.x, 12);
    expect(twice.y).toBeCloseTo(once.y, 12);
  });

  it('of a closed drop shape is one run that begins and ends at its corner, wherever the drawing began', () => {
    // Two lines tangent to a half circle, meeting in a tip; drawn from the middle of one line.
    const tip: Vec = [0, 0];
    const reach = 2;
    const half = Math.asin(0.5 / reach);
    const side = Math.sqrt(reach ** 2 - 0.25);
    const low: Vec = [side * Math.cos(half), -side * Math.sin(half)];
    const high: Vec = [low[0], -low[1]];
    const start: Vec = [low[0] / 2, low[1] / 2];
    const drop = track(
      start,
      [line(...low), arc(high, Math.tan((Math.PI + 2 * half) / 4)), line(...tip), line(...start)],
      {
        closed: true,
      },
    );
    const path = buildTrack(drop);
    expect(path.runs).toHaveLength(1);
    expect(path.corners).toHaveLength(1);
    expect(path.runs[0].start).toEqual(tip);
    expect(path.runs[0].end).toEqual(tip);
    expect(path.runs[0].closed).toBe(false);
    expect(path.runs[0].length).toBeCloseTo(path.length, 13);
    expect(path.corners[0].turn).toBeCloseTo(Math.PI - 2 * half, 12);
  });
});

describe('joined tracks', () => {
  const a = track([0, 0], [line(1, 0)], { id: 'a' });
  const b = track([1, 0], [arc([2, 1], bulgeOf(90))], { id: 'b' });

  it('pass smoothly from one into the next', () => {
    const [first, second] = joinTracks([a, b], 3);
    expect(first.runs[0].next).toEqual({ run: second.runs[0], at: 'start' });
    expect(second.runs[0].previous).toEqual({ run: first.runs[0], at: 'end' });
    expect(first.runs[0].previous).toBeNull();
    expect(second.runs[0].next).toBeNull();
  });

  it('pass into one that is drawn the other way and free on the other side', () => {
    const reversed = track([2, 1], [arc([1, 0], bulgeOf(-90))], { id: 'b', side: 'right' });
    const [first, second] = joinTracks([a, reversed], 3);
    expect(first.runs[0].next).toEqual({ run: second.runs[0], at: 'end' });
    expect(second.runs[0].next).toEqual({ run: first.runs[0], at: 'end' });
  });

  it('do not pass where the free sides differ, the tangents differ, or the ends are apart', () => {
    const wrongSide = { ...b, side: 'right' as const };
    const bent = track([1, 0], [line(2, 0.01)], { id: 'b' });
    const apart = track([1 + 4e-6, 0], [line(2, 0)], { id: 'b' });
    const near = track([1 + 2e-6, 0], [line(2, 0)], { id: 'b' });
    for (const other of [wrongSide, bent, apart]) expect(joinTracks([a, other], 3)[0].runs[0].next).toBeNull();
    expect(joinTracks([a, near], 3)[0].runs[0].next).not.toBeNull();
  });
});
