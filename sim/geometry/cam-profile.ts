import { add, cross, left, norm, rotate, scale, subtract, unit, type Vec } from '../core/vec.js';
import type { CamShape } from '../mechanism/kinds/body.js';
import { camMotion } from './cam-motion.js';

/** A point of the profile for one turn of the cam, in body coordinates [m]. */
export interface CamPoint {
  at: Vec;
  /** Its derivative by the turn [m/rad]; null where the profile has a cusp. */
  slope: Vec;
  /** Where the follower's trace point is then: roller centre, knife edge, foot of a flat face's line. */
  trace: Vec;
}

/**
 * The profile that gives a follower its motion, at a turn θ [rad] of the cam from drawn in its working sense.
 *
 * In the cam's own frame the follower goes round the other way: its line points along u(θ). Flat face: the envelope
 * x = d u + d′ u′, d = base radius + s. Knife: the trace point itself, at √(R² − ε²) + s along the line and ε to its
 * right. Roller: the trace (pitch) curve less the roller's radius along its outward normal. Swinging roller: the trace
 * point goes round the pivot. `along` and `pivot` are taken in body coordinates, as drawn.
 * Source: Norton, Cam Design and Manufacturing Handbook, ch. 7; envelope theory.
 */
export function camPoint(cam: CamShape, turn: number): CamPoint {
  const sense = cam.turns === 'counterclockwise' ? -1 : 1;
  if (cam.follower.kind === 'flat') return flat(cam, turn, sense);
  const trace = cam.follower.pivot ? swinging(cam, turn, sense) : translating(cam, turn, sense);
  return cam.follower.kind === 'knife'
    ? { at: trace.point, slope: trace.slope, trace: trace.point }
    : inset(cam, trace, sense);
}

function flat(cam: CamShape, turn: number, sense: number): CamPoint {
  const { s, ds, dds } = camMotion(cam, turn);
  const u = rotate(cam.follower.along, sense * turn);
  const across = scale(left(u), sense);
  const reach = scale(u, cam.baseRadius + s);
  return { at: add(reach, scale(across, ds)), slope: scale(across, cam.baseRadius + s + dds), trace: reach };
}

/** The curve at the roller's radius inside the pitch curve; its slope is the pitch curve's times 1 − r × curvature. */
function inset(cam: CamShape, { point, slope, bend }: Trace, sense: number): CamPoint {
  const { radius } = cam.follower;
  const speed = norm(slope);
  const outward = scale(left(slope), -sense / speed);
  const curvature = (sense * cross(slope, bend)) / speed ** 3;
  return { at: subtract(point, scale(outward, radius)), slope: scale(slope, 1 - radius * curvature), trace: point };
}

/** The trace point in the cam's frame, and its first and second derivatives by the turn. */
interface Trace {
  point: Vec;
  slope: Vec;
  bend: Vec;
}

const pitchRadius = (cam: CamShape): number =>
  cam.baseRadius + (cam.follower.kind === 'roller' ? cam.follower.radius : 0);

function translating(cam: CamShape, turn: number, sense: number): Trace {
  const { along, offset } = cam.follower;
  const { s, ds, dds } = camMotion(cam, turn);
  const u = rotate(along, sense * turn);
  const height = Math.sqrt(pitchRadius(cam) ** 2 - offset ** 2) + s;
  const point = add(scale(u, height), scale(left(u), -offset));
  return inTurningFrame(point, scale(u, ds), scale(u, dds), sense);
}

/** The arm stands at its lowest angle from the line to the cam's origin, counter-clockwise of it, and rises from it. */
function swinging(cam: CamShape, turn: number, sense: number): Trace {
  const { pivot = [0, 0], arm = 0 } = cam.follower;
  const far = norm(pivot);
  const low = Math.acos((arm ** 2 + far ** 2 - pitchRadius(cam) ** 2) / (2 * arm * far));
  const { s, ds, dds } = camMotion(cam, turn);
  const reach = rotate(scale(unit(pivot), -arm), low + s + sense * turn);
  const point = add(rotate(pivot, sense * turn), reach);
  const moved = scale(left(reach), ds);
  return inTurningFrame(point, moved, add(scale(left(reach), dds), scale(reach, -ds * ds)), sense);
}

/** Adds the frame's own turning to a motion within it: P′ = ω P⊥ + v, P″ = ω P′⊥ + ω v⊥ + a, ω = ±1. */
function inTurningFrame(point: Vec, v: Vec, a: Vec, sense: number): Trace {
  const slope = add(scale(left(point), sense), v);
  const bend = add(scale(left(add(slope, v)), sense), a);
  return { point, slope, bend };
}

/** The profile as a fine polygon, in body coordinates [m]. */
export function camOutline(cam: CamShape, points = 720): Vec[] {
  return Array.from({ length: points }, (_, k) => camPoint(cam, (2 * Math.PI * k) / points).at);
}
