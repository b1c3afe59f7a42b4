import { DistanceJoint, RevoluteJoint, type Joint } from 'planck';
import type { Pin } from '../../mechanism/kinds/joint.js';
import { jointInternals, type JointInternals } from '../planck-internals.js';
import { partBody, partIndex, partInner, type Scene } from '../scene.js';
import { JointElement, type JointReader } from './joint.js';

/**
 * A pin: planck's revolute joint; a particle pinned away from itself has no turn of its own and hangs as on a massless
 * link, planck's distance joint.
 */
export function pinElement(scene: Scene, pin: Pin): JointElement {
  const a = partIndex(scene, pin.between[1]);
  const b = partIndex(scene, pin.between[0]);
  const at = { x: pin.at[0] / scene.scale.length, y: pin.at[1] / scene.scale.length };
  const link = [a, b].find((part) => part >= 0 && isPointAwayFrom(scene, part, at));
  if (link !== undefined) return new JointElement(scene, pin, linkReader(scene, a, b, link, at));
  const joint = new RevoluteJoint({ collideConnected: true }, partBody(scene, a), partBody(scene, b), at);
  scene.world.createJoint(joint);
  return new JointElement(scene, pin, revoluteReader(scene, joint, a, b));
}

/** True for a body that cannot turn and whose mass centre is not at the pin. */
export function isPointAwayFrom({ state, inertia }: Scene, part: number, at: { x: number; y: number }): boolean {
  return inertia[part] === 0 && Math.hypot(at.x - state.x[part], at.y - state.y[part]) > 1e-6;
}

function revoluteReader(scene: Scene, joint: Joint, a: number, b: number): JointReader {
  const inner = jointInternals(joint);
  return {
    ...commonReader(scene, joint, inner),
    impulse(out) {
      out.px = inner.m_impulse.x;
      out.py = inner.m_impulse.y;
      out.momentA = inner.m_rA.x * out.py - inner.m_rA.y * out.px;
      out.momentB = inner.m_rB.x * out.py - inner.m_rB.y * out.px;
    },
    violation() {
      const va = partInner(scene, a).c_velocity;
      const vb = partInner(scene, b).c_velocity;
      const ux = vb.v.x - vb.w * inner.m_rB.y - va.v.x + va.w * inner.m_rA.y;
      const uy = vb.v.y + vb.w * inner.m_rB.x - va.v.y - va.w * inner.m_rA.x;
      return Math.hypot(ux, uy);
    },
  };
}

/** What joints with a vector impulse share. */
export function commonReader(
  scene: Scene,
  joint: Joint,
  inner: JointInternals,
): Pick<JointReader, 'joint' | 'save' | 'restore' | 'destroy'> {
  let [x, y, z] = [0, 0, 0];
  return {
    joint: inner,
    save() {
      ({ x, y, z } = inner.m_impulse);
    },
    restore() {
      inner.m_impulse.x = x;
      inner.m_impulse.y = y;
      inner.m_impulse.z = z;
    },
    destroy() {
      scene.world.destroyJoint(joint);
    },
  };
}

function linkReader(scene: Scene, a: number, b: number, point: number, at: { x: number; y: number }): JointReader {
  const { state } = scene;
  const centre = { x: state.x[point], y: state.y[point] };
  const [endA, endB] = point === a ? [centre, at] : [at, centre];
  const joint = new DistanceJoint({ collideConnected: true }, partBody(scene, a), partBody(scene, b), endA, endB);
  scene.world.createJoint(joint);
  const inner = jointInternals(joint);
  const scalar = inner as unknown as { m_impulse: number };
  let kept = 0;
  return {
    joint: inner,
    save() {
      kept = scalar.m_impulse;
    },
    restore() {
      scalar.m_impulse = kept;
    },
    destroy() {
      scene.world.destroyJoint(joint);
    },
    impulse(out) {
      out.px = scalar.m_impulse * inner.m_u.x;
      out.py = scalar.m_impulse * inner.m_u.y;
      out.momentA = inner.m_rA.x * out.py - inner.m_rA.y * out.px;
      out.momentB = inner.m_rB.x * out.py - inner.m_rB.y * out.px;
    },
    violation() {
      const va = partInner(scene, a).c_velocity;
      const vb = partInner(scene, b).c_velocity;
      const ux = vb.v.x - vb.w * inner.m_rB.y - va.v.x + va.w * inner.m_rA.y;
      const uy = vb.v.y + vb.w * inner.m_rB.x - va.v.y - va.w * inner.m_rA.x;
      return Math.abs(ux * inner.m_u.x + uy * inner.m_u.y);
    },
  };
}
