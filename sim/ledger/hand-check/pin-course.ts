import { add, norm, rotate, scale, subtract, type Vec } from '../../core/vec.js';
import type { Pin } from '../../mechanism/kinds/joint.js';
import type { Course } from './course.js';
import type { Leg } from './happenings.js';
import type { Scene } from './scene.js';

/** The course of a body about a fixed pin: q is the angle turned, M = I + m r² about the pin. */
export function pinCourse(scene: Scene, body: string, leg: Leg, pin: Pin): Course {
  const start = scene.pose(body, leg.from);
  const turn = scene.pose(body, leg.to).angle - start.angle;
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
      return { x, y, angle: start.angle + sense * q };
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

/** Moment of inertia about a pin, by Steiner's rule [kg m²]. */
export function aboutPin(scene: Scene, body: string, pin: Pin): number {
  const { mass, inertia } = scene.body(body);
  return inertia + mass * pinArm(scene, body, pin) ** 2;
}

/** Distance from a pin to the centre of mass [m]. */
export function pinArm(scene: Scene, body: string, pin: Pin): number {
  return norm(subtract(scene.drawnCenter(body), pin.at));
}
