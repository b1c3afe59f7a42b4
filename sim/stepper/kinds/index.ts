import type { Shape } from '../../mechanism/kinds/body.js';
import type { DriveLaw } from '../../mechanism/kinds/drive.js';
import type { Joint } from '../../mechanism/kinds/joint.js';
import type { Spring } from '../../mechanism/kinds/spring.js';
import type { Scene } from '../scene.js';
import type { JointElement } from './joint.js';
import { pinElement } from './pin.js';
import { slideElement } from './slide.js';
import { linearSpring, torsionSpring, type SpringElement } from './spring.js';
import { weldElement } from './weld.js';

/*
 * Every kind of the mechanism file has an entry here, so that a new one does not compile until it has been decided:
 * what builds it, or null where the stepper does not simulate it yet (`unsupported` then says so).
 */

type Builders<Kinds extends { kind: string }, Built> = {
  [K in Kinds['kind']]: ((scene: Scene, element: Extract<Kinds, { kind: K }>) => Built) | null;
};

export const joints = {
  pin: pinElement,
  slide: slideElement,
  weld: weldElement,
  rope: null,
  gear: null,
  rack: null,
  screw: null,
} satisfies Builders<Joint, JointElement>;

export const springs = {
  linear: linearSpring,
  torsion: torsionSpring,
  gas: null,
} satisfies Builders<Spring, SpringElement>;

/** Which shapes and drives are simulated; they are built by contact/outline.ts and kinds/drive.ts. */
export const shapes = {
  particle: true,
  disc: true,
  box: true,
  bar: true,
  polygon: true,
  cam: false,
  none: true,
} satisfies Record<Shape['kind'], boolean>;

export const driveLaws = {
  effort: true,
  effortCurve: false,
  speed: false,
  motor: false,
} satisfies Record<DriveLaw['kind'], boolean>;

/** Builds a joint that `unsupported` has nothing against. */
export function buildJoint(scene: Scene, joint: Joint): JointElement {
  const build = joints[joint.kind] as ((scene: Scene, joint: Joint) => JointElement) | null;
  if (!build) throw new RangeError(`${joint.kind} ${joint.id} is not simulated`);
  return build(scene, joint);
}

/** Builds a spring that `unsupported` has nothing against. */
export function buildSpring(scene: Scene, spring: Spring): SpringElement {
  const build = springs[spring.kind] as ((scene: Scene, spring: Spring) => SpringElement) | null;
  if (!build) throw new RangeError(`${spring.kind} spring ${spring.id} is not simulated`);
  return build(scene, spring);
}
