import type { Bilateral, DryFriction, Force } from './element.js';
import type { Account } from './ledgers.js';
import { factor, solve } from './method/pivoted-solve.js';
import type { Row } from './row.js';
import type { SoftPoint } from './contact/soft-point.js';
import type { System } from './system.js';
import type { ContactPoint, Unilateral } from './unilateral.js';
import type { Pair } from './contact/pair.js';

/** Closed points of one pair on one line: they slide together, so they have one friction. */
export interface FrictionGroup {
  pair: Pair;
  members: ContactPoint[];
  sliding: 1 | -1 | 0;
  /** Friction force on B along the tangent, of the last solve. */
  lambda: number;
}

export interface Parts {
  forces: Force[];
  joints: Bilateral[];
  /** Everything that can hold one way only. */
  unilaterals: Unilateral[];
  frictions: DryFriction[];
  soft: SoftPoint[];
  gravity: Account[];
}

/** An unknown of the acceleration problem: `row` must meet its acceleration, the force acts along `along`. */
interface Unknown {
  row: Row;
  along: Row;
  target: number;
  take(lambda: number): void;
}

const CONVERGED = 1e-14;
const MOST_PASSES = 60;

/**
 * Accelerations of the mechanism in its present mode (index-1 form): M a = f + Jᵀλ with J a + γ = target for every joint,
 * closed contact and sticking friction, solved together (Hairer & Wanner, *Solving ODEs II*, 1996, VII.1). A sliding
 * contact's friction rides on its normal force, so that the matrix is not symmetric then.
 */
export class Dynamics {
  groups: FrictionGroup[] = [];
  readonly acceleration: Float64Array;
  /** Least pivot ratio of the last solve: nearly nil at a singular position. */
  pivotRatio = 1;
  private readonly force: Float64Array;

  constructor(
    readonly system: System,
    readonly parts: Parts,
  ) {
    this.acceleration = new Float64Array(3 * system.count);
    this.force = new Float64Array(3 * system.count);
  }

  /** Brings every row and force up to a state. */
  update(t: number, q: Float64Array, v: Float64Array): void {
    const { forces, joints, frictions, soft, unilaterals } = this.parts;
    for (const joint of joints) if (!joint.isReleased) joint.update(q, v, t);
    for (const force of forces) force.update(q, v, t);
    for (const unilateral of unilaterals) {
      if (!unilateral.isClosed) continue;
      unilateral.locate(q);
      unilateral.aim(q, v, t);
    }
    for (const point of soft) if (point.isPressed) point.update(q, v, t);
    for (const friction of frictions) if (friction.isActive) friction.update(q, v);
  }

  /** Solves for the accelerations and every reaction at a state. */
  accelerate(t: number, q: Float64Array, v: Float64Array): void {
    this.update(t, q, v);
    this.collectForces();
    const unknowns = this.unknowns();
    const matrix = this.matrix(unknowns);
    const isSymmetric = unknowns.every(({ row, along }) => row === along);
    const factored = factor(matrix, unknowns.length, isSymmetric);
    this.pivotRatio = factored.pivotRatio;
    const lambda = new Float64Array(unknowns.length);
    const right = new Float64Array(unknowns.length);
    const sliding = this.parts.frictions.filter((friction) => friction.isActive && friction.sliding !== 0);
    let last = Infinity;
    // Friction that rides on a reaction of the same solve is found by repetition: a contraction for any sane journal.
    for (let pass = 0; pass < MOST_PASSES; pass += 1) {
      this.freeAcceleration(sliding);
      unknowns.forEach(({ row, target }, i) => {
        right[i] = target - row.gamma - row.rate(this.acceleration);
      });
      solve(factored, right, lambda);
      unknowns.forEach((unknown, i) => {
        unknown.take(lambda[i]);
      });
      if (sliding.length === 0) break;
      let change = 0;
      for (const friction of sliding) {
        const next = -friction.sliding * friction.bound();
        change = Math.max(change, Math.abs(next - friction.lambda));
        friction.lambda = next;
      }
      if (change <= CONVERGED || change === last) break;
      last = change;
    }
    unknowns.forEach(({ along }, i) => {
      along.addImpulse(this.acceleration, lambda[i], this.system.inverseMass);
    });
  }

  /** Applied forces of this state, without reactions. */
  private collectForces(): void {
    const { force, system, parts } = this;
    const [gx, gy] = system.mechanism.gravity;
    for (let i = 0; i < system.count; i += 1) {
      force[3 * i] = system.mass[3 * i] * gx;
      force[3 * i + 1] = system.mass[3 * i] * gy;
      force[3 * i + 2] = 0;
    }
    for (const { row, size } of parts.forces) row.addForce(force, size);
    for (const point of parts.soft) if (point.isPressed) point.addForce(force);
  }

  /** Accelerations of the applied forces and of what slides on joints, with no reaction at all. */
  applied(t: number, q: Float64Array, v: Float64Array): Float64Array {
    this.update(t, q, v);
    this.collectForces();
    this.freeAcceleration(this.parts.frictions.filter(({ isActive, sliding }) => isActive && sliding !== 0));
    return this.acceleration.slice();
  }

  private freeAcceleration(sliding: readonly DryFriction[]): void {
    const { acceleration, force, system } = this;
    for (let i = 0; i < acceleration.length; i += 1) acceleration[i] = force[i] * system.inverseMass[i];
    for (const { row, lambda } of sliding) row.addImpulse(acceleration, lambda, system.inverseMass);
  }

  private unknowns(): Unknown[] {
    const { joints, unilaterals, frictions, soft } = this.parts;
    const unknowns: Unknown[] = [];
    for (const joint of joints) {
      if (joint.isReleased) continue;
      joint.rows.forEach((row, k) => {
        unknowns.push({ row, along: row, target: joint.changes[k], take: (lambda) => (joint.lambda[k] = lambda) });
      });
    }
    const grouped = new Set<Unilateral>(this.groups.flatMap(({ members }) => members));
    for (const unilateral of unilaterals) {
      if (!unilateral.isClosed || grouped.has(unilateral)) continue;
      const { normal } = unilateral;
      unknowns.push({ row: normal, along: normal, target: 0, take: (lambda) => (unilateral.lambda = lambda) });
    }
    this.groups.forEach((group) => unknowns.push(...this.groupUnknowns(group)));
    for (const friction of frictions) {
      if (!friction.isActive || friction.sliding !== 0) continue;
      const { row } = friction;
      unknowns.push({ row, along: row, target: 0, take: (lambda) => (friction.lambda = lambda) });
    }
    for (const point of soft) {
      if (!point.isPressed || point.sliding !== 0 || !point.rubs) continue;
      const { tangent, surfaceChange } = point.point;
      unknowns.push({
        row: tangent,
        along: tangent,
        target: surfaceChange,
        take: (lambda) => (point.friction = lambda),
      });
    }
    return unknowns;
  }

  private groupUnknowns(group: FrictionGroup): Unknown[] {
    const { members, sliding, pair } = group;
    const [lead] = members;
    const unknowns: Unknown[] = members.map((point, k) => {
      const along = sliding === 0 ? point.normal : this.slidingRow(point, sliding * pair.kineticFriction);
      return {
        row: point.normal,
        along,
        target: 0,
        take: (lambda: number) => {
          point.lambda = lambda;
          if (sliding !== 0) group.lambda = (k === 0 ? 0 : group.lambda) - sliding * pair.kineticFriction * lambda;
        },
      };
    });
    if (sliding === 0 && pair.staticFriction > 0) {
      const { tangent, surfaceChange } = lead;
      unknowns.push({ row: tangent, along: tangent, target: surfaceChange, take: (lambda) => (group.lambda = lambda) });
    } else if (sliding === 0) group.lambda = 0;
    return unknowns;
  }

  /** Direction of a sliding contact's whole force for a unit normal force. */
  private slidingRow(point: ContactPoint, coefficient: number): Row {
    return mix(point.normal, point.tangent, -coefficient);
  }

  private matrix(unknowns: readonly Unknown[]): Float64Array {
    const n = unknowns.length;
    const matrix = new Float64Array(n * n);
    const response = new Float64Array(3 * this.system.count);
    for (let j = 0; j < n; j += 1) {
      const { along } = unknowns[j];
      along.addImpulse(response, 1, this.system.inverseMass);
      for (let i = 0; i < n; i += 1) matrix[i * n + j] = unknowns[i].row.rate(response);
      for (const index of along.index) response[index] = 0;
    }
    return matrix;
  }

  /** Powers of every account's force at the state last solved, into the derivatives of the work integrals. */
  powers(into: Float64Array, v: Float64Array): void {
    const { system, parts } = this;
    into.fill(0);
    const [gx, gy] = system.mechanism.gravity;
    parts.gravity.forEach((account, i) => {
      account.add(into, i, system.mass[3 * i] * (gx * v[3 * i] + gy * v[3 * i + 1]));
    });
    for (const force of parts.forces) this.forcePower(force, into, v);
    for (const joint of parts.joints) {
      if (joint.isReleased) continue;
      joint.rows.forEach((row, k) => {
        joint.account.addRow(into, row, joint.lambda[k], v);
      });
    }
    for (const unilateral of parts.unilaterals) {
      if (unilateral.isClosed) unilateral.account.addRow(into, unilateral.normal, unilateral.lambda, v);
    }
    for (const { pair, members, sliding, lambda } of this.groups) {
      if (!pair.friction) continue;
      pair.friction.addRow(into, members[0].tangent, lambda, v);
      if (sliding !== 0) pair.friction.heat(into, -lambda * members[0].slip(v));
    }
    for (const friction of parts.frictions) {
      if (!friction.isActive) continue;
      friction.account.addRow(into, friction.row, friction.lambda, v);
      if (friction.sliding !== 0) friction.account.heat(into, -friction.lambda * friction.row.rate(v));
    }
    for (const point of parts.soft) if (point.isPressed) point.powers(into, v);
  }

  private forcePower({ account, row, size, isLossy, inputRatio }: Force, into: Float64Array, v: Float64Array): void {
    account.addRow(into, row, size, v);
    const power = size * row.rate(v);
    if (isLossy) account.heat(into, -power);
    if (inputRatio > 0 && account.inputSlot >= 0 && power > 0) into[account.inputSlot] += inputRatio * power;
  }
}

/** a + k b, as a row for forces (its γ is of no use). */
export function mix(a: Row, b: Row, k: number): Row {
  const row = Object.create(Object.getPrototypeOf(a) as object) as Row;
  Object.assign(row, { index: [...a.index, ...b.index], value: [...a.value, ...b.value.map((x) => k * x)], gamma: 0 });
  return row;
}
