import type { Dynamics } from './dynamics.js';
import type { Account } from './ledgers.js';
import { factor, solve } from './method/pivoted-solve.js';
import type { Row } from './row.js';

const MOST_PASSES = 4;
const EXACT = 1e-15;

/** What a projection did. */
export interface Projected {
  /** Greatest constraint error before it (positions). */
  drift: number;
  /** Kinetic energy it changed, relative to nothing. */
  energy: number;
}

/**
 * After each step, brings positions and velocities back onto joints and closed contacts, in the mass metric (Hairer &
 * Wanner, *Solving ODEs II*, 1996, VII.2; Eich, SIAM J. Numer. Anal. 30, 1993). The energy it changes is booked.
 */
export class Projection {
  constructor(
    private readonly dynamics: Dynamics,
    private readonly booked: Account,
  ) {}

  apply(t: number, q: Float64Array, v: Float64Array, works: Float64Array): Projected {
    let drift = 0;
    const before = q.slice();
    for (let pass = 0; pass < MOST_PASSES; pass += 1) {
      this.dynamics.update(t, q, v);
      const { rows, errors } = this.positions();
      const worst = errors.reduce((most, error) => Math.max(most, Math.abs(error)), 0);
      if (pass === 0) drift = worst;
      if (worst <= EXACT) break;
      this.push(rows, errors, q);
    }
    this.dynamics.update(t, q, v);
    this.bookShift(
      q.map((value, i) => value - before[i]),
      works,
    );
    return { drift, energy: this.velocities(v, works) };
  }

  private positions(): { rows: Row[]; errors: number[] } {
    const { joints, unilaterals } = this.dynamics.parts;
    const rows: Row[] = [];
    const errors: number[] = [];
    for (const joint of joints) {
      if (joint.isReleased) continue;
      joint.errors.forEach((error, k) => {
        rows.push(joint.rows[k]);
        errors.push(error);
      });
    }
    for (const { isClosed, normal, gap } of unilaterals) {
      if (!isClosed) continue;
      rows.push(normal);
      errors.push(gap);
    }
    return { rows, errors };
  }

  private velocities(v: Float64Array, works: Float64Array): number {
    const { joints, unilaterals, frictions, soft } = this.dynamics.parts;
    const rows: Row[] = [];
    const errors: number[] = [];
    const hold = (row: Row, target: number): void => {
      rows.push(row);
      errors.push(row.rate(v) - target);
    };
    for (const joint of joints) {
      if (!joint.isReleased) joint.rows.forEach((row, k) => hold(row, joint.speeds[k]));
    }
    for (const { isClosed, normal } of unilaterals) if (isClosed) hold(normal, 0);
    for (const { sliding, pair, members } of this.dynamics.groups) {
      if (sliding === 0 && pair.staticFriction > 0) hold(members[0].tangent, members[0].surfaceSpeed);
    }
    for (const { isActive, sliding, row } of frictions) if (isActive && sliding === 0) hold(row, 0);
    for (const { isPressed, sliding, rubs, point } of soft) {
      if (isPressed && sliding === 0 && rubs) hold(point.tangent, point.surfaceSpeed);
    }
    const before = v.slice();
    this.push(rows, errors, v);
    return this.book(before, v, works);
  }

  /** What stores give by a shift of places is work of theirs like any other; no body gains by it: numerical takes it back. */
  private bookShift(shift: Float64Array, works: Float64Array): void {
    if (shift.every((value) => value === 0)) return;
    const { system, parts } = this.dynamics;
    const [gx, gy] = system.mechanism.gravity;
    parts.gravity.forEach((account, i) => {
      const work = system.mass[3 * i] * (gx * shift[3 * i] + gy * shift[3 * i + 1]);
      account.add(works, i, work);
      this.booked.add(works, i, -work);
    });
    for (const { account, row, size } of parts.forces) {
      if (!account.stored) continue;
      account.addRow(works, row, size, shift);
      this.booked.addRow(works, row, -size, shift);
    }
  }

  private book(before: Float64Array, after: Float64Array, works: Float64Array): number {
    const { mass, count } = this.dynamics.system;
    let sum = 0;
    for (let body = 0; body < count; body += 1) {
      let change = 0;
      for (let k = 3 * body; k < 3 * body + 3; k += 1) {
        change += 0.5 * mass[k] * (after[k] - before[k]) * (after[k] + before[k]);
      }
      if (change !== 0) this.booked.add(works, body, change);
      sum += Math.abs(change);
    }
    return sum;
  }

  /** Takes `errors` of the rows out of x, changing it least in the mass metric. */
  private push(rows: readonly Row[], errors: readonly number[], x: Float64Array): void {
    const n = rows.length;
    if (n === 0) return;
    const { inverseMass } = this.dynamics.system;
    const matrix = new Float64Array(n * n);
    for (let i = 0; i < n; i += 1) {
      for (let j = 0; j < n; j += 1) matrix[i * n + j] = rows[i].coupling(rows[j], inverseMass);
    }
    const lambda = solve(
      factor(matrix, n, true),
      Float64Array.from(errors, (error) => -error),
      new Float64Array(n),
    );
    rows.forEach((row, i) => {
      row.addImpulse(x, lambda[i], inverseMass);
    });
  }
}
