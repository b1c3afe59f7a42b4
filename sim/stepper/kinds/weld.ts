import { WeldJoint } from 'planck';
import type { Weld } from '../../mechanism/kinds/joint.js';
import { jointInternals } from '../planck-internals.js';
import { partBody, partIndex, partInner, type Scene } from '../scene.js';
import { JointElement } from './joint.js';
import { commonReader } from './pin.js';

/** A weld: planck's weld joint, at the mass centre of the document's first part. */
export function weldElement(scene: Scene, weld: Weld): JointElement {
  const a = partIndex(scene, weld.between[1]);
  const b = partIndex(scene, weld.between[0]);
  const at = partBody(scene, b >= 0 ? b : a).getPosition();
  const joint = new WeldJoint({ collideConnected: true }, partBody(scene, a), partBody(scene, b), at);
  scene.world.createJoint(joint);
  const inner = jointInternals(joint);
  return new JointElement(scene, weld, {
    ...commonReader(scene, joint, inner),
    impulse(out) {
      const { x, y, z } = inner.m_impulse;
      out.px = x;
      out.py = y;
      out.momentA = inner.m_rA.x * y - inner.m_rA.y * x + z;
      out.momentB = inner.m_rB.x * y - inner.m_rB.y * x + z;
    },
    violation() {
      const va = partInner(scene, a).c_velocity;
      const vb = partInner(scene, b).c_velocity;
      const ux = vb.v.x - vb.w * inner.m_rB.y - va.v.x + va.w * inner.m_rA.y;
      const uy = vb.v.y + vb.w * inner.m_rB.x - va.v.y - va.w * inner.m_rA.x;
      return Math.max(Math.hypot(ux, uy), Math.abs(vb.w - va.w));
    },
  });
}
