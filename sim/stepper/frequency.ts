import { TimeStep } from 'planck';
import type { Mechanism } from '../mechanism/model.js';
import { assemble, type Assembly } from './assembly.js';
import type { Scene } from './scene.js';

/** The estimate only rises from round to round; it is used as a bound that nothing may exceed. */
const ROUNDS = 60;
const JOINT_SWEEPS = 60;

const step = new TimeStep();
step.warmStarting = false;
step.dtRatio = 0;

/**
 * Greatest angular frequency [rad/s] at which the springs of a mechanism drive it as drawn, its joints holding, or its
 * compliant contacts the bodies that no joint holds. Power iteration on M⁻¹K (Golub & Van Loan, *Matrix Computations*,
 * 2013, 8.2): never above the true one.
 */
export function greatestFrequency(mechanism: Mechanism): number {
  const assembly = assemble(mechanism, { isOn: () => false });
  return Math.max(springFrequency(assembly) / assembly.scene.scale.time, contactFrequency(mechanism));
}

function springFrequency({ scene, springs, joints }: Assembly): number {
  if (springs.length === 0 || scene.bodies.length === 0) return 0;
  const stiffnesses = springs.map((spring) => spring.ready());
  for (const { reader } of joints) reader.joint.initVelocityConstraints(step);
  scene.bodies.forEach(({ c_velocity }, i) => {
    // Any start will do that is square to no way of swinging.
    c_velocity.v.x = Math.sin(i + 1);
    c_velocity.v.y = Math.cos(2 * i + 1);
    c_velocity.w = Math.sin(3 * i + 2);
  });
  let square = 0;
  for (let round = 0; round < ROUNDS; round += 1) {
    const rates = springs.map(({ row }) => row.rate());
    rest(scene);
    springs.forEach(({ row }, i) => row.apply(stiffnesses[i] * rates[i]));
    for (let i = 0; i < JOINT_SWEEPS; i += 1) {
      for (const { reader } of joints) reader.joint.solveVelocityConstraints(step);
    }
    const size = Math.sqrt(twiceKinetic(scene));
    if (size === 0) return 0;
    // The first round only takes out of the start what the joints do not let move.
    if (round > 0) square = size;
    shrink(scene, size);
  }
  return Math.sqrt(square);
}

function rest({ bodies }: Scene): void {
  for (const { c_velocity } of bodies) {
    c_velocity.v.x = 0;
    c_velocity.v.y = 0;
    c_velocity.w = 0;
  }
}

function shrink({ bodies }: Scene, size: number): void {
  for (const { c_velocity } of bodies) {
    c_velocity.v.x /= size;
    c_velocity.v.y /= size;
    c_velocity.w /= size;
  }
}

function twiceKinetic({ bodies, mass, inertia }: Scene): number {
  return bodies.reduce(
    (sum, { c_velocity: { v, w } }, i) => sum + mass[i] * (v.x * v.x + v.y * v.y) + inertia[i] * w * w,
    0,
  );
}

/** Straight on: a contact off the mass centre is stiffer yet, and which points meet is not known beforehand. */
function contactFrequency({ contacts, bodies, joints }: Mechanism): number {
  const squares = contacts.flatMap(({ compliant, between }) => {
    const held = joints.some((joint) => 'between' in joint && joint.between.some((id) => between.includes(id)));
    if (!compliant || held) return [];
    const mobility = bodies.filter(({ id }) => between.includes(id)).reduce((sum, { mass }) => sum + 1 / mass, 0);
    return [compliant.stiffness * mobility];
  });
  return Math.sqrt(Math.max(0, ...squares));
}
