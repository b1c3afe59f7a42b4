import { add, cross, dot, norm, rotate, scale, subtract, type Vec } from '../../core/vec.js';
import type { Pin } from '../../mechanism/kinds/joint.js';
import type { Course } from './course.js';
import type { Leg } from './happenings.js';
import type { Scene } from './scene.js';

/** The course of a body about a fixed pin: q is the angle turned, M = I + m r² about the pin. */
export function pinCourse(scene: Scene, body: string, leg: Leg, pin: Pin): Course {
  const start = scene.pose(body, leg.from);
  const turn = turnOver(scene, body, leg, pin);
  const sense = turn < 0 ? -1 : 1;
  const arm = subtract([start.x, start.y], pin.at);
  const at = (q: number): Vec => rotate(arm, sense * q);
  return {
    kind: 'pin',
    members: [body],
    length: Math.abs(turn),
    measure: aboutPin(scene, body, pin),
    rollingMass: 0,
    pose: (id, q) => {
      if (id !== body) return scene.pose(id, leg.from);
      const [x, y] = add(pin.at, at(q));
      return { x, y, angle: isPoint(scene, body) ? start.angle : start.angle + sense * q };
    },
    rate: (q) => {
      const [x, y] = at(q);
      return { tangent: [-y * sense, x * sense], bend: scale([x, y], -1), turn: sense };
    },
    sense: (pin.between[0] === body ? sense : -sense) as 1 | -1,
    rubs: [],
    joints: [pin],
  };
}

/** A point mass has no angle of its own: it swings as on a massless link. */
const isPoint = (scene: Scene, body: string): boolean => scene.body(body).inertia === 0;

/** Angle turned about the pin over a leg, turns counted [rad]. */
function turnOver(scene: Scene, body: string, leg: Leg, pin: Pin): number {
  const [start, end] = [scene.pose(body, leg.from), scene.pose(body, leg.to)];
  if (!isPoint(scene, body)) return end.angle - start.angle;
  const arms = [start, ...leg.rows.map((row) => scene.poseAtRow(body, row)), end].map(({ x, y }) =>
    subtract([x, y], pin.at),
  );
  return arms.slice(1).reduce((sum, arm, i) => sum + Math.atan2(cross(arms[i], arm), dot(arms[i], arm)), 0);
}

/** Moment of inertia about a pin, by Steiner's rule [kg m²]. */
export function aboutPin(scene: Scene, body: string, pin: Pin): number {
  const { mass, inertia } = scene.body(body);
  return inertia + mass * pinArm(scene, body, pin) ** 2;
}

/** Distance from a pin to the centre of mass [m]. */
export function pinArm(scene: Scene, body: string, pin: Pin): number {
  return norm(subtract(scene.drawnCenter(body), pin.at));
}
