import type { FrictionGroup } from './dynamics.js';
import { mix } from './dynamics.js';
import type { Bilateral } from './element.js';
import { lemke } from './method/lemke.js';
import { factor, solve, type Factored } from './method/pivoted-solve.js';
import type { Row } from './row.js';
import type { System } from './system.js';
import type { Unilateral } from './unilateral.js';

/** A tangential unknown: bounded by coefficient × its normals' sum + constant. */
export interface Tangential {
  row: Row;
  coefficient: number;
  normals: readonly number[];
  constant: number;
}

export interface Solution {
  normals: Float64Array;
  tangentials: Float64Array;
  /** Rates (accelerations) along the normals and tangents afterwards. */
  normalRates: Float64Array;
  tangentialRates: Float64Array;
  /** Change of velocity (acceleration) that all of it makes, joints included, and the joints' own forces. */
  change: Float64Array;
  jointForces: Float64Array;
}

/**
 * The complementarity problem of contacts with Coulomb friction, on accelerations (which of them hold) and on velocities
 * (impacts): normals ξ ≥ 0 ⟂ λ ≥ 0; tangents λ_t in [−B, B] with B = μ Σλ + constant, against the rate
 * (Glocker & Pfeiffer, *Multibody Dynamics with Unilateral Contacts*, 1996, ch. 6 and 8). Joints are eliminated first.
 */
export class ContactProblem {
  private readonly jointRows: Row[];
  private readonly factored: Factored;

  constructor(
    private readonly system: System,
    joints: readonly Bilateral[],
    /** Rows held besides the joints' own. */
    held: readonly Row[] = [],
  ) {
    this.jointRows = [...joints.filter(({ isReleased }) => !isReleased).flatMap(({ rows }) => rows), ...held];
    const n = this.jointRows.length;
    const matrix = new Float64Array(n * n);
    for (let i = 0; i < n; i += 1) {
      for (let j = 0; j < n; j += 1) {
        matrix[i * n + j] = this.jointRows[i].coupling(this.jointRows[j], system.inverseMass);
      }
    }
    this.factored = factor(matrix, n, true);
  }

  /** Brings the joints' rows to `targets` (rates), the rest of the motion least changed; returns the joints' forces. */
  holdJoints(motion: Float64Array, targets: Float64Array): Float64Array {
    const n = this.jointRows.length;
    const right = Float64Array.from(this.jointRows, (row, i) => targets[i] - row.rate(motion));
    const forces = solve(this.factored, right, new Float64Array(n));
    this.jointRows.forEach((row, i) => {
      row.addImpulse(motion, forces[i], this.system.inverseMass);
    });
    return forces;
  }

  /** M⁻¹Dᵀ less what the joints take of it, and the joints' share for a unit along D. */
  private response(along: Row): { motion: Float64Array; joints: Float64Array } {
    const motion = new Float64Array(3 * this.system.count);
    along.addImpulse(motion, 1, this.system.inverseMass);
    const joints = this.holdJoints(motion, new Float64Array(this.jointRows.length));
    return { motion, joints };
  }

  /**
   * @param normals rows of the normals, and the directions their forces act along (with sliding friction mixed in)
   * @param normalRates rates without any of these forces, what restitution asks for taken off
   * @returns null where the problem has no solution that Lemke's method finds
   */
  solve(
    normals: readonly { row: Row; along: Row }[],
    tangentials: readonly Tangential[],
    normalRates: Float64Array,
    tangentialRates: Float64Array,
  ): Solution | null {
    const responses = [...normals.map(({ along }) => along), ...tangentials.map(({ row }) => row)].map((row) =>
      this.response(row),
    );
    const rows = [...normals.map(({ row }) => row), ...tangentials.map(({ row }) => row)];
    const nN = normals.length;
    const nT = tangentials.length;
    const size = nN + nT;
    const a = (i: number, j: number): number => coupling[i * size + j];
    const coupling = new Float64Array(size * size);
    rows.forEach((row, i) => {
      responses.forEach(({ motion }, j) => {
        coupling[i * size + j] = row.rate(motion);
      });
    });
    const n = nN + 2 * nT;
    const m = new Float64Array(n * n);
    const q = new Float64Array(n);
    for (let i = 0; i < size; i += 1) {
      q[i] = i < nN ? normalRates[i] : tangentialRates[i - nN];
      for (let j = 0; j < nN; j += 1) m[i * n + j] = a(i, j);
      tangentials.forEach(({ coefficient, normals: members, constant }, k) => {
        m[i * n + nN + k] = a(i, nN + k);
        for (const j of members) m[i * n + j] -= coefficient * a(i, nN + k);
        q[i] -= a(i, nN + k) * constant;
      });
      if (i >= nN) m[i * n + i + nT] = 1;
    }
    tangentials.forEach(({ coefficient, normals: members, constant }, k) => {
      const i = nN + nT + k;
      for (const j of members) m[i * n + j] = 2 * coefficient;
      m[i * n + nN + k] = -1;
      q[i] = 2 * constant;
    });
    const z = lemke(m, q, n);
    if (!z) return null;
    const lambda = new Float64Array(size);
    lambda.set(z.subarray(0, nN));
    tangentials.forEach(({ coefficient, normals: members, constant }, k) => {
      lambda[nN + k] = z[nN + k] - constant - coefficient * members.reduce((sum, j) => sum + z[j], 0);
    });
    return this.compose(lambda, nN, responses, normalRates, tangentialRates, a);
  }

  private compose(
    lambda: Float64Array,
    nN: number,
    responses: readonly { motion: Float64Array; joints: Float64Array }[],
    normalRates: Float64Array,
    tangentialRates: Float64Array,
    a: (i: number, j: number) => number,
  ): Solution {
    const size = lambda.length;
    const rate = (i: number, free: number): number => {
      let sum = free;
      for (let j = 0; j < size; j += 1) sum += a(i, j) * lambda[j];
      return sum;
    };
    const change = new Float64Array(3 * this.system.count);
    const jointForces = new Float64Array(this.jointRows.length);
    responses.forEach(({ motion, joints }, j) => {
      for (let i = 0; i < change.length; i += 1) change[i] += lambda[j] * motion[i];
      for (let i = 0; i < jointForces.length; i += 1) jointForces[i] += lambda[j] * joints[i];
    });
    return {
      normals: lambda.slice(0, nN),
      tangentials: lambda.slice(nN),
      normalRates: Float64Array.from({ length: nN }, (_, i) => rate(i, normalRates[i])),
      tangentialRates: Float64Array.from({ length: size - nN }, (_, k) => rate(nN + k, tangentialRates[k])),
      change,
      jointForces,
    };
  }
}

/** Direction of a closed point's force: its normal, with the friction of its group where that slides. */
export function forceRow(unilateral: Unilateral, group: FrictionGroup | undefined): Row {
  if (!group || group.sliding === 0) return unilateral.normal;
  const point = group.members.find((member) => member === unilateral);
  return point ? mix(point.normal, point.tangent, -group.sliding * group.pair.kineticFriction) : unilateral.normal;
}
