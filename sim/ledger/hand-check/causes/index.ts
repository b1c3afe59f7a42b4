import type { Cause } from '../cause.js';
import { damperCauses } from './dampers.js';
import { driveCauses, loadCauses } from './efforts.js';
import type { Stretch } from './force.js';
import { frictionCauses } from './frictions.js';
import { gravityCause } from './gravity.js';
import { springCauses } from './springs.js';

/** Everything that works on the bodies of a course, in the order it is written down. */
export function causesOf(stretch: Stretch): Cause[] {
  const others = [
    ...gravityCause(stretch.scene, stretch.course),
    ...springCauses(stretch),
    ...loadCauses(stretch),
    ...driveCauses(stretch),
    ...damperCauses(stretch),
  ];
  return [...others, ...frictionCauses(stretch, others)];
}
