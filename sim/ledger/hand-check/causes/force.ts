import { add, scale, subtract, type Vec } from '../../../core/vec.js';
import type { PointOn } from '../../../mechanism/kinds/joint.js';
import type { Cause } from '../cause.js';
import type { Course } from '../course.js';
import { isStill } from '../group.js';
import type { Leg } from '../happenings.js';
import { refuse } from '../refusal.js';
import type { Scene } from '../scene.js';

/** What a cause pushes with, for the reactions it brings about [N]. */
export interface Push {
  on: string;
  force: (q: number, square: number) => Vec;
}

/** A cause and the forces it puts on the bodies. */
export interface PushingCause extends Cause {
  pushes?: Push[];
}

/** The stretch that causes are asked for. */
export interface Stretch {
  scene: Scene;
  course: Course;
  leg: Leg;
}

/** Where a point fixed to a part is at q [m]. */
export const placeOn = ({ scene, course }: Stretch, point: PointOn, q: number): Vec =>
  scene.place(point, (body) => course.pose(body, q));

/** d/dq of that point [m per unit of q]; the ground and bodies that stand still have none. */
export function placeRate(stretch: Stretch, point: PointOn, q: number): Vec {
  const { course } = stretch;
  if (!course.members.includes(point.of)) return [0, 0];
  const { tangent, turn } = course.rate(q);
  const center = course.pose(point.of, q);
  const [ax, ay] = subtract(placeOn(stretch, point, q), [center.x, center.y]);
  return add(tangent, scale([-ay, ax], turn));
}

/** Which of two parts move with the course; a moving part outside it makes no hand sum. */
export function movingEnds({ scene, course, leg }: Stretch, id: string, ends: readonly string[]): boolean[] {
  const inside = ends.map((end) => course.members.includes(end));
  if (!inside.includes(true)) return inside;
  const outside = ends.filter((end, i) => !inside[i] && !isStill(scene, end, leg));
  if (outside.length > 0) refuse(`${id} ends on ${outside[0]}, which moves too.`);
  return inside;
}
