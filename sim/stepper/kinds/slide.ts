import { PrismaticJoint } from 'planck';
import type { Slide } from '../../mechanism/kinds/joint.js';
import { jointInternals } from '../planck-internals.js';
import { partBody, partIndex, partInner, type Scene } from '../scene.js';
import { JointElement } from './joint.js';
import { commonReader } from './pin.js';

/** A slide: planck's prismatic joint, its axis fixed in the document's second part (planck's A). */
export function slideElement(scene: Scene, slide: Slide): JointElement {
  const a = partIndex(scene, slide.between[1]);
  const b = partIndex(scene, slide.between[0]);
  const at = { x: slide.at[0] / scene.scale.length, y: slide.at[1] / scene.scale.length };
  const axis = { x: slide.axis[0], y: slide.axis[1] };
  const joint = new PrismaticJoint({ collideConnected: true }, partBody(scene, a), partBody(scene, b), at, axis);
  scene.world.createJoint(joint);
  const inner = jointInternals(joint);
  return new JointElement(scene, slide, {
    ...commonReader(scene, joint, inner),
    impulse(out) {
      const { x: across, y: turning } = inner.m_impulse;
      out.px = across * inner.m_perp.x;
      out.py = across * inner.m_perp.y;
      out.momentA = across * inner.m_s1 + turning;
      out.momentB = across * inner.m_s2 + turning;
    },
    violation() {
      const va = partInner(scene, a).c_velocity;
      const vb = partInner(scene, b).c_velocity;
      const across =
        inner.m_perp.x * (vb.v.x - va.v.x) + inner.m_perp.y * (vb.v.y - va.v.y) + inner.m_s2 * vb.w - inner.m_s1 * va.w;
      return Math.max(Math.abs(across), Math.abs(vb.w - va.w));
    },
  });
}
