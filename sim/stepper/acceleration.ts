import type { AxisRow } from './axis-row.js';
import type { BodyInternals, ConstraintPoint, ContactInternals, XY } from './planck-internals.js';
import type { Scene } from './scene.js';

/** What remains of a solve is taken as this many sweeps' worth of a straight line at the most. */
const MEMORY = 8;
/** Directions shorter than this share of what they came from are rounding. */
const DEPENDENT = 1e-10;
/** Velocities stand still when a sweep moves none by more than this share of the greatest [engine speed]. */
const CONVERGED = 1e-13;
const MOST_SWEEPS = 600;
/** Where this many sweeps have brought nothing, what is left is the rounding of unlike masses, if it is as small as this. */
const PATIENCE = 30;
const ROUNDING = 1e-8;
/** Beyond so many impulses it would cost more than it gains. */
const MOST_IMPULSES = 48;

/** One impulse of a solve. */
export interface Impulse {
  get(): number;
  /** Changes it, and the velocities with it. */
  add(change: number): void;
  /** It only pushes. */
  pushes: boolean;
}

/** The impulses of contacts; none where there are too many to be carried on. */
export const impulsesOf = (contacts: readonly ContactInternals[]): Impulse[] =>
  contacts.length > MOST_IMPULSES
    ? []
    : contacts.flatMap((contact) =>
        contact.v_points.slice(0, contact.v_pointCount).flatMap((point) => {
          const { x, y } = contact.v_normal;
          return [along(contact, point, 'normalImpulse', x, y), along(contact, point, 'tangentImpulse', y, -x)];
        }),
      );

function along(
  { m_fixtureA, m_fixtureB }: ContactInternals,
  point: ConstraintPoint,
  name: 'normalImpulse' | 'tangentImpulse',
  nx: number,
  ny: number,
): Impulse {
  const push = ({ c_velocity, m_invMass, m_invI }: BodyInternals, { x, y }: XY, impulse: number): void => {
    c_velocity.v.x += m_invMass * impulse * nx;
    c_velocity.v.y += m_invMass * impulse * ny;
    c_velocity.w += m_invI * impulse * (x * ny - y * nx);
  };
  return {
    get: () => point[name],
    add: (change) => {
      point[name] += change;
      push(m_fixtureA.m_body, point.rA, -change);
      push(m_fixtureB.m_body, point.rB, change);
    },
    pushes: name === 'normalImpulse',
  };
}

export const impulseOf = (row: AxisRow, pushes: boolean): Impulse => ({
  get: () => row.impulse,
  add: (change) => {
    row.impulse += change;
    row.apply(change);
  },
  pushes,
});

/**
 * Ends a solve that plain sweeps do not end, as those of a heavy body on a light one: each sweep's result is carried on
 * along the sweeps before it to where the least is left (Anderson, *J. ACM* 12, 1965; on a linear problem it is GMRES:
 * Walker & Ni, *SIAM J. Numer. Anal.* 49, 2011).
 */
export class Acceleration {
  sweeps = 0;

  constructor(private readonly scene: Scene) {}

  /** Sweeps until the velocities stand still; returns false when they do not. */
  run(sweep: () => void, impulses: readonly Impulse[]): boolean {
    if (impulses.length === 0 || impulses.length > MOST_IMPULSES) return false;
    const ends: Float64Array[] = [];
    const moves: Float64Array[] = [];
    let from = this.read(impulses);
    let least = Infinity;
    let leastAt = 0;
    for (let i = 0; i < MOST_SWEEPS; i += 1) {
      sweep();
      this.sweeps += 1;
      const end = this.read(impulses);
      const move = end.map((value, k) => value - from[k]);
      const change = this.change(end, move);
      if (change <= CONVERGED || (change <= ROUNDING && i - leastAt > PATIENCE)) return true;
      if (change < least / 2) {
        least = change;
        leastAt = i;
      }
      ends.push(end);
      moves.push(move);
      if (ends.length > MEMORY) {
        ends.shift();
        moves.shift();
      }
      this.carryOn(ends, moves, impulses);
      from = this.read(impulses);
    }
    // A last sweep brings what was carried on back within all bounds.
    sweep();
    return false;
  }

  private read(impulses: readonly Impulse[]): Float64Array {
    const { bodies } = this.scene;
    const values = new Float64Array(3 * bodies.length + impulses.length);
    bodies.forEach(({ c_velocity: { v, w } }, i) => values.set([v.x, v.y, w], 3 * i));
    impulses.forEach((impulse, i) => {
      values[3 * bodies.length + i] = impulse.get();
    });
    return values;
  }

  /** Greatest change of a velocity, relative to the greatest velocity. */
  private change(end: Float64Array, move: Float64Array): number {
    const count = 3 * this.scene.bodies.length;
    let most = 1e-3;
    let change = 0;
    for (let i = 0; i < count; i += 1) {
      most = Math.max(most, Math.abs(end[i]));
      change = Math.max(change, Math.abs(move[i]));
    }
    return change / most;
  }

  /** The last end, less what the differences of the moves can take off its move, by Gram–Schmidt from the latest on. */
  private carryOn(ends: Float64Array[], moves: Float64Array[], impulses: readonly Impulse[]): void {
    const last = ends.length - 1;
    const end = ends[last];
    const left = Float64Array.from(moves[last]);
    const next = Float64Array.from(end);
    const bases: { move: Float64Array; end: Float64Array }[] = [];
    for (let k = last - 1; k >= 0; k -= 1) {
      const move = moves[last].map((value, i) => value - moves[k][i]);
      const step = end.map((value, i) => value - ends[k][i]);
      const whole = this.size(move);
      for (const base of bases) {
        const share = this.product(move, base.move);
        addTo(move, base.move, -share);
        addTo(step, base.end, -share);
      }
      const size = this.size(move);
      if (!(size > DEPENDENT * whole)) continue;
      bases.push({ move: move.map((value) => value / size), end: step.map((value) => value / size) });
    }
    for (const base of bases) {
      const share = this.product(left, base.move);
      addTo(left, base.move, -share);
      addTo(next, base.end, -share);
    }
    const offset = 3 * this.scene.bodies.length;
    impulses.forEach((impulse, i) => {
      const wanted = next[offset + i];
      impulse.add((impulse.pushes ? Math.max(0, wanted) : wanted) - end[offset + i]);
    });
  }

  /** Products of velocities in the measure of the kinetic energy. */
  private product(a: Float64Array, b: Float64Array): number {
    const { mass, inertia } = this.scene;
    let sum = 0;
    for (let i = 0; i < mass.length; i += 1) {
      sum += mass[i] * (a[3 * i] * b[3 * i] + a[3 * i + 1] * b[3 * i + 1]) + inertia[i] * a[3 * i + 2] * b[3 * i + 2];
    }
    return sum;
  }

  private size(a: Float64Array): number {
    return Math.sqrt(this.product(a, a));
  }
}

function addTo(to: Float64Array, what: Float64Array, times: number): void {
  for (let i = 0; i < to.length; i += 1) to[i] += times * what[i];
}
