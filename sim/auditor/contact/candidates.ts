import { convexParts, joinTracks, pointAt } from '../../geometry/index.js';
import type { Curve } from '../../mechanism/kinds/track.js';
import type { Mark, System } from '../system.js';
import type { ContactPoint } from '../unilateral.js';
import { coursesOf, type Course } from './course.js';
import { RoundOnFace, type Faces } from './face.js';
import { FaceOnBulge } from './face-on-bulge.js';
import type { Pair } from './pair.js';
import { RoundOnRound } from './round-on-round.js';
import { RoundOnTrack, type Surfaces } from './round-on-track.js';

/** A body's outline as the auditor sees it: faces, and the rounds or bare points that can touch things. */
interface Outline {
  faces: Faces[];
  rounds: { mark: Mark; radius: number; ways: { x: number; y: number }[] }[];
}

/** Every possible contact point of the listed pairs. */
export function buildCandidates(system: System, pairs: readonly Pair[]): ContactPoint[] {
  const { mechanism } = system;
  const outlines = mechanism.bodies.map((_, body) => outlineOf(system, body));
  const paths = joinTracks(mechanism.tracks, mechanism.extent);
  const courses = coursesOf(paths);
  const surfaces = surfacesOf(system, pairs);
  const points: ContactPoint[] = [];
  for (const pair of pairs) {
    if (pair.first >= 0 && pair.second >= 0) points.push(...between(pair, outlines[pair.first], outlines[pair.second]));
  }
  outlines.forEach((outline, body) => {
    for (const course of courses) points.push(...onCourse(outline, body, course, courses, surfaces));
  });
  return points;
}

function outlineOf({ mechanism }: System, body: number): Outline {
  const { shape, centerOfMass } = mechanism.bodies[body];
  const faces: Faces[] = [];
  const rounds: Outline['rounds'] = [];
  for (const { points, radius } of convexParts(shape)) {
    const local = points.map(([x, y]) => ({ x: x - centerOfMass[0], y: y - centerOfMass[1] }));
    if (local.length > 1) faces.push({ body, points: local, radius });
    local.forEach(({ x, y }, i) => {
      const isKnown = rounds.some(({ mark }) => mark.x === x && mark.y === y);
      if (!isKnown) rounds.push({ mark: { body, x, y }, radius, ways: radius === 0 ? waysFrom(local, i) : [] });
    });
  }
  return { faces, rounds };
}

/** Unit vectors from a corner of a convex part to its neighbours. */
function waysFrom(points: readonly { x: number; y: number }[], i: number): { x: number; y: number }[] {
  if (points.length < 3) return [];
  const count = points.length;
  return [points[(i + 1) % count], points[(i + count - 1) % count]].map((to) => {
    const length = Math.hypot(to.x - points[i].x, to.y - points[i].y);
    return { x: (to.x - points[i].x) / length, y: (to.y - points[i].y) / length };
  });
}

function between(pair: Pair, a: Outline, b: Outline): ContactPoint[] {
  const points: ContactPoint[] = [];
  for (const faces of a.faces) points.push(...onFaces(pair, faces, b));
  for (const faces of b.faces) points.push(...onFaces(pair, faces, a));
  if (a.faces.length > 0 || b.faces.length > 0) return points;
  for (const one of a.rounds) {
    for (const other of b.rounds) {
      if (one.radius + other.radius > 0)
        points.push(new RoundOnRound(pair, one.mark, one.radius, other.mark, other.radius));
    }
  }
  return points;
}

function onFaces(pair: Pair, faces: Faces, { rounds }: Outline): ContactPoint[] {
  return rounds.map(({ mark, radius, ways }) => new RoundOnFace(pair, faces, mark, radius, ways));
}

function onCourse(
  outline: Outline,
  body: number,
  course: Course,
  courses: readonly Course[],
  surfaces: Surfaces,
): ContactPoint[] {
  const listed = course.map(({ track }) => surfaces.pairOf(body, track)).find((pair) => pair !== null);
  if (!listed) return [];
  const points: ContactPoint[] = outline.rounds.map(
    ({ mark, radius, ways }) => new RoundOnTrack(course, mark, radius, surfaces, listed, ways),
  );
  for (const faces of outline.faces) {
    for (const { x, y, track, way } of openCorners(course, courses)) {
      const pair = surfaces.pairOf(body, track);
      if (pair) points.push(new RoundOnFace(pair, faces, { body: -1, x, y }, 0, [way]));
    }
    const bends = course.some(({ run }) => run.pieces.some((piece) => piece.kind !== 'line'));
    if (!bends) continue;
    faces.points.forEach((_, face) => points.push(new FaceOnBulge(course, faces, face, surfaces, listed)));
  }
  return points;
}

const NEAR = 1e-6;

/** Ends of a course that stand out: not those that another track lies against on the free side (inside corners). */
function openCorners(
  course: Course,
  courses: readonly Course[],
): { x: number; y: number; track: number; way: { x: number; y: number } }[] {
  return course.flatMap(({ run, track, free }) => {
    if (run.closed) return [];
    const ends = [
      { isOpen: !run.previous, foot: pointAt(run, 0) },
      { isOpen: !run.next, foot: pointAt(run, run.length) },
    ];
    return ends
      .filter(({ isOpen }) => isOpen)
      .filter(({ foot }) => !isInside(foot, free, run, courses) && !isEarlier(foot, run, course, courses))
      .map(({ foot }) => {
        const sense = foot.s === 0 ? 1 : -1;
        return { x: foot.x, y: foot.y, track, way: { x: sense * foot.tx, y: sense * foot.ty } };
      });
  });
}

/** A corner is the end of one course and the start of the next: the first of the two stands for it. */
function isEarlier(
  { x, y }: { x: number; y: number },
  own: Course[number]['run'],
  course: Course,
  courses: readonly Course[],
): boolean {
  const before = courses.slice(0, courses.indexOf(course)).flatMap((other) => [...other]);
  return before.some(
    ({ run }) => run.track === own.track && [run.start, run.end].some(([ex, ey]) => Math.hypot(ex - x, ey - y) <= NEAR),
  );
}

function isInside(
  { x, y, tx, ty }: { x: number; y: number; tx: number; ty: number },
  free: number,
  own: Course[number]['run'],
  courses: readonly Course[],
): boolean {
  if (free === 0) return false;
  const [nx, ny] = [-ty * free, tx * free];
  return courses.some((course) =>
    course.some(({ run }) =>
      [0, run.length].some((s) => {
        const end = pointAt(run, s);
        const isSelf = run === own && Math.hypot(end.x - x, end.y - y) <= NEAR && end.tx === tx && end.ty === ty;
        if (isSelf || Math.hypot(end.x - x, end.y - y) > NEAR) return false;
        const away = s === 0 ? 1 : -1;
        return away * (end.tx * nx + end.ty * ny) > 1e-9;
      }),
    ),
  );
}

function surfacesOf({ mechanism, ids }: System, pairs: readonly Pair[]): Surfaces {
  const table = new Map<string, Pair>();
  for (const pair of pairs) {
    const body = Math.max(pair.first, pair.second);
    const isTrack = pair.first < 0 || pair.second < 0;
    const id = pair.between[pair.first < 0 ? 0 : 1];
    const track = mechanism.tracks.findIndex((candidate) => candidate.id === id);
    if (isTrack && track >= 0) table.set(`${ids[body]}/${track}`, pair);
  }
  return {
    pairOf: (body, track) => table.get(`${ids[body]}/${track}`) ?? null,
    speedOf: (track, t) => curveAt(mechanism.tracks[track].surfaceSpeed, t),
  };
}

/** Value and slope of a curve over time. */
export function curveAt(curve: Curve, t: number): { speed: number; change: number } {
  if (typeof curve === 'number') return { speed: curve, change: 0 };
  const last = curve[curve.length - 1];
  if (t < curve[0][0]) return { speed: curve[0][1], change: 0 };
  if (t >= last[0]) return { speed: last[1], change: 0 };
  const i = curve.findIndex(([x]) => x > t);
  const [x0, y0] = curve[i - 1];
  const [x1, y1] = curve[i];
  const change = (y1 - y0) / (x1 - x0);
  return { speed: y0 + change * (t - x0), change };
}
