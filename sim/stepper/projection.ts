import { TimeStep } from 'planck';
import type { ContactManager } from './contact/manager.js';
import { frameOf } from './contact/soft-point.js';
import type { BodyInternals } from './planck-internals.js';
import { partInner, type Scene } from './scene.js';
import type { VelocitySolver } from './solver.js';
import { newState, type State } from './state.js';
import type { Touch } from './contact/touch.js';

const MOST_PASSES = 8;
/** Positions off by less than this are left alone [engine length]. */
const EXACT = 1e-12;
const step = new TimeStep();

/**
 * Brings the end of a step back onto joints and pressed contacts: planck's own position constraints for joints, and the
 * same in the mass metric for the gaps of contacts that carry force (which may open as well as close). The rule leaves
 * errors of third order in the step, so these moves are tiny; what they change of the energy is booked.
 */
export class Projection {
  private readonly last: State;

  constructor(
    private readonly scene: Scene,
    private readonly manager: ContactManager,
    private readonly solver: VelocitySolver,
  ) {
    this.last = newState(scene.ids.length);
  }

  /** Moves `state` (positions are also in planck, contacts evaluated there). Returns false when nothing moved. */
  apply(state: State): boolean {
    const { scene, solver } = this;
    const gaps = this.pressedGaps();
    const joints = solver.joints.filter((joint) => !joint.isReleased);
    if (joints.length === 0 && gaps.every(({ gap }) => Math.abs(gap) <= EXACT)) return false;
    const changes = joints.length + gaps.length > 1;
    for (let pass = 0; pass < MOST_PASSES; pass += 1) {
      for (const joint of joints) joint.reader.joint.solvePositionConstraints(step);
      for (const gap of gaps) this.close(gap, state);
      if (!changes || this.moved() <= EXACT) break;
    }
    return scene.bodies.some(
      ({ c_position: { c, a } }, i) => c.x !== state.x[i] || c.y !== state.y[i] || a !== state.a[i],
    );
  }

  /** Greatest move since last asked. */
  private moved(): number {
    const { last } = this;
    const { bodies } = this.scene;
    let most = 0;
    for (let i = 0; i < bodies.length; i += 1) {
      const { c, a } = bodies[i].c_position;
      most = Math.max(most, Math.abs(c.x - last.x[i]), Math.abs(c.y - last.y[i]), Math.abs(a - last.a[i]));
      last.x[i] = c.x;
      last.y[i] = c.y;
      last.a[i] = a;
    }
    return most;
  }

  private pressedGaps(): PressedGap[] {
    const gaps: PressedGap[] = [];
    for (const touch of this.solver.rigid.live) {
      const { contact } = touch;
      for (let j = 0; j < contact.v_pointCount; j += 1) {
        if (contact.v_points[j as 0 | 1].normalImpulse <= 0) continue;
        const { key } = contact.m_manifold.points[j].id;
        for (let i = 0; i < touch.count; i += 1) {
          const candidate = touch.candidates[i as 0 | 1];
          if (candidate.key === key) gaps.push(pressedGap(touch, i as 0 | 1));
        }
      }
    }
    return gaps;
  }

  private close(gap: PressedGap, state: State): void {
    const { touch, nx, ny, leverA, leverB } = gap;
    const a = partInner(this.scene, touch.bodyA);
    const b = partInner(this.scene, touch.bodyB);
    const now = gap.gap + this.moveOf(touch.bodyB, gap, leverB, state) - this.moveOf(touch.bodyA, gap, leverA, state);
    const k = a.m_invMass + b.m_invMass + a.m_invI * leverA * leverA + b.m_invI * leverB * leverB;
    if (k === 0) return;
    const push = -now / k;
    a.c_position.c.x -= a.m_invMass * push * nx;
    a.c_position.c.y -= a.m_invMass * push * ny;
    a.c_position.a -= a.m_invI * push * leverA;
    b.c_position.c.x += b.m_invMass * push * nx;
    b.c_position.c.y += b.m_invMass * push * ny;
    b.c_position.a += b.m_invI * push * leverB;
  }

  /** How far the point of a part has moved along the normal since the step's end. */
  private moveOf(part: number, { nx, ny }: PressedGap, lever: number, { x, y, a }: State): number {
    if (part < 0) return 0;
    const { c, a: angle } = this.scene.bodies[part].c_position;
    return nx * (c.x - x[part]) + ny * (c.y - y[part]) + lever * (angle - a[part]);
  }

  /** Clears what the recorder was shown, before a step is booked. */
  resetReadings(): void {
    for (const { reading } of this.manager.met) {
      reading.points = 0;
      reading.normal = 0;
      reading.friction = 0;
      reading.slip = 0;
    }
  }
}

interface PressedGap {
  touch: Touch;
  gap: number;
  nx: number;
  ny: number;
  leverA: number;
  leverB: number;
}

/** Normal and levers of a candidate at the bodies' present transforms. */
function pressedGap(touch: Touch, index: 0 | 1): PressedGap {
  const { nx, ny, x, y } = frameOf(touch, index);
  const lever = ({ c_position: { c } }: BodyInternals): number => (x - c.x) * ny - (y - c.y) * nx;
  const { m_fixtureA, m_fixtureB } = touch.contact;
  const { gap } = touch.candidates[index];
  return { touch, gap, nx, ny, leverA: lever(m_fixtureA.m_body), leverB: lever(m_fixtureB.m_body) };
}
