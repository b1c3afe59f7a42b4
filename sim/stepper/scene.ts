import { World, type Body as PlanckBody } from 'planck';
import type { Vec } from '../core/vec.js';
import type { Body } from '../mechanism/kinds/body.js';
import type { PointOn } from '../mechanism/kinds/joint.js';
import type { Mechanism } from '../mechanism/model.js';
import { Books } from './books.js';
import { NumericalBooks } from './numerical.js';
import { bodyInternals, worldInternals, type BodyInternals, type WorldInternals } from './planck-internals.js';
import { scaleFor, shapeReach, type Scale } from './scale.js';
import { newState, type State } from './state.js';

/** A point fixed to a part, in the frame of its mass centre [engine length]. */
export interface Anchor {
  body: number;
  x: number;
  y: number;
}

/** The mechanism in planck's world and engine units: everything the layers of the stepper share. */
export interface Scene {
  mechanism: Mechanism;
  scale: Scale;
  world: World;
  inner: WorldInternals;
  ground: PlanckBody;
  groundInner: BodyInternals;
  planckBodies: PlanckBody[];
  bodies: BodyInternals[];
  ids: string[];
  /** Engine masses and moments of inertia. */
  mass: Float64Array;
  inertia: Float64Array;
  /** Farthest point of each body from its mass centre. */
  reach: Float64Array;
  gravity: { x: number; y: number };
  state: State;
  start: State;
  books: Books;
  numerical: NumericalBooks;
  /** Engine time. */
  time: number;
}

/** Builds planck's world: bodies with their masses and no shapes yet. Sleeping and planck's own stepping are unused. */
export function buildScene(mechanism: Mechanism): Scene {
  const scale = scaleFor(mechanism);
  const world = new World({ gravity: { x: 0, y: 0 }, allowSleep: false, continuousPhysics: false });
  const ground = world.createBody();
  const ids = mechanism.bodies.map((body) => body.id);
  const planckBodies = mechanism.bodies.map((body) => addBody(world, body, scale));
  const books = new Books();
  const state = newState(ids.length);
  const scene: Scene = {
    mechanism,
    scale,
    world,
    inner: worldInternals(world),
    ground,
    groundInner: bodyInternals(ground),
    planckBodies,
    bodies: planckBodies.map(bodyInternals),
    ids,
    mass: Float64Array.from(mechanism.bodies, (body) => body.mass / scale.mass),
    inertia: Float64Array.from(mechanism.bodies, (body) => body.inertia / scale.inertia),
    reach: Float64Array.from(mechanism.bodies, (body) => reachOf(body) / scale.length),
    gravity: { x: mechanism.gravity[0] / scale.acceleration, y: mechanism.gravity[1] / scale.acceleration },
    state,
    start: newState(ids.length),
    books,
    numerical: new NumericalBooks(books, ids),
    time: 0,
  };
  mechanism.bodies.forEach((body, i) => placeBody(body, i, scene));
  return scene;
}

function addBody(world: World, body: Body, scale: Scale): PlanckBody {
  const [x, y] = massCentre(body);
  const planckBody = world.createBody({
    type: 'dynamic',
    position: { x: x / scale.length, y: y / scale.length },
    angle: body.angle,
    fixedRotation: body.inertia === 0,
  });
  const inertia = body.inertia / scale.inertia;
  planckBody.setMassData({ mass: body.mass / scale.mass, center: { x: 0, y: 0 }, I: inertia });
  return planckBody;
}

function placeBody(body: Body, i: number, { state, start, scale }: Scene): void {
  const [x, y] = massCentre(body);
  const startAt = [x / scale.length, y / scale.length, body.angle] as const;
  [state.x[i], state.y[i], state.a[i]] = startAt;
  [start.x[i], start.y[i], start.a[i]] = startAt;
  state.vx[i] = body.velocity[0] / scale.speed;
  state.vy[i] = body.velocity[1] / scale.speed;
  state.w[i] = body.inertia === 0 ? 0 : body.spin * scale.time;
}

/** Sheet position of a body's centre of mass at the start [m]. */
export function massCentre(body: Body): Vec {
  const [x, y] = body.centerOfMass;
  const [c, s] = [Math.cos(body.angle), Math.sin(body.angle)];
  return [body.at[0] + c * x - s * y, body.at[1] + s * x + c * y];
}

function reachOf(body: Body): number {
  return shapeReach(body.shape) + Math.hypot(...body.centerOfMass);
}

/** Index of a part; −1 for the ground. */
export const partIndex = (scene: Scene, id: string): number => scene.ids.indexOf(id);

export const partInner = (scene: Scene, index: number): BodyInternals =>
  index < 0 ? scene.groundInner : scene.bodies[index];

export const partBody = (scene: Scene, index: number): PlanckBody =>
  index < 0 ? scene.ground : scene.planckBodies[index];

/** The frame of a point given on the sheet as drawn. */
export function anchorOf(scene: Scene, point: PointOn): Anchor {
  const { scale, start } = scene;
  const body = partIndex(scene, point.of);
  const x = point.at[0] / scale.length;
  const y = point.at[1] / scale.length;
  if (body < 0) return { body, x, y };
  const dx = x - start.x[body];
  const dy = y - start.y[body];
  const [c, s] = [Math.cos(start.a[body]), Math.sin(start.a[body])];
  return { body, x: c * dx + s * dy, y: -s * dx + c * dy };
}

/** Where an anchor is now, by the parts' present transforms; `out` is overwritten and returned. */
export function anchorAt(scene: Scene, anchor: Anchor, out: { x: number; y: number }): { x: number; y: number } {
  if (anchor.body < 0) {
    out.x = anchor.x;
    out.y = anchor.y;
    return out;
  }
  const { p, q } = scene.bodies[anchor.body].m_xf;
  out.x = p.x + q.c * anchor.x - q.s * anchor.y;
  out.y = p.y + q.s * anchor.x + q.c * anchor.y;
  return out;
}

/** Moves planck's bodies to positions (and keeps where they came from, for the broad phase). */
export function poseBodies(scene: Scene, x: Float64Array, y: Float64Array, a: Float64Array): void {
  const { bodies } = scene;
  for (let i = 0; i < bodies.length; i += 1) {
    const body = bodies[i];
    body.m_sweep.c.x = x[i];
    body.m_sweep.c.y = y[i];
    body.m_sweep.a = a[i];
    body.c_position.c.x = x[i];
    body.c_position.c.y = y[i];
    body.c_position.a = a[i];
    body.synchronizeTransform();
  }
}

/** Poses one body between two states, for a look at its contacts; `share` 0 is the first. */
export function poseBetween(scene: Scene, index: number, from: State, to: State, share: number): void {
  if (index < 0) return;
  const body = scene.bodies[index];
  body.m_sweep.c.x = from.x[index] + share * (to.x[index] - from.x[index]);
  body.m_sweep.c.y = from.y[index] + share * (to.y[index] - from.y[index]);
  body.m_sweep.a = from.a[index] + share * (to.a[index] - from.a[index]);
  body.synchronizeTransform();
}

/** Remembers the present positions as the start of a sweep. */
export function startSweep(scene: Scene, { x, y, a }: State): void {
  const { bodies } = scene;
  for (let i = 0; i < bodies.length; i += 1) {
    const { m_sweep } = bodies[i];
    m_sweep.c0.x = x[i];
    m_sweep.c0.y = y[i];
    m_sweep.a0 = a[i];
  }
}

/** Writes velocities into planck's solver. */
export function setVelocities(scene: Scene, vx: Float64Array, vy: Float64Array, w: Float64Array): void {
  const { bodies } = scene;
  for (let i = 0; i < bodies.length; i += 1) {
    const { c_velocity } = bodies[i];
    c_velocity.v.x = vx[i];
    c_velocity.v.y = vy[i];
    c_velocity.w = w[i];
  }
}

/** Reads velocities out of planck's solver. */
export function getVelocities(scene: Scene, vx: Float64Array, vy: Float64Array, w: Float64Array): void {
  const { bodies } = scene;
  for (let i = 0; i < bodies.length; i += 1) {
    const { c_velocity } = bodies[i];
    vx[i] = c_velocity.v.x;
    vy[i] = c_velocity.v.y;
    w[i] = c_velocity.w;
  }
}

/** Kinetic energy of the velocities in `state` [engine energy]. */
export function kineticOf({ mass, inertia }: Scene, { vx, vy, w }: State): number {
  let sum = 0;
  for (let i = 0; i < mass.length; i += 1) {
    sum += 0.5 * (mass[i] * (vx[i] ** 2 + vy[i] ** 2) + inertia[i] * w[i] ** 2);
  }
  return sum;
}

/** Kinetic energy of the velocities now in planck's solver [engine energy]. */
export function kineticNow({ bodies, mass, inertia }: Scene): number {
  return bodies.reduce(
    (sum, { c_velocity: { v, w } }, i) => sum + 0.5 * (mass[i] * (v.x ** 2 + v.y ** 2) + inertia[i] * w ** 2),
    0,
  );
}
