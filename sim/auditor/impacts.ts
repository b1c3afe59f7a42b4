import { ContactProblem } from './contact-problem.js';
import type { Dynamics, FrictionGroup } from './dynamics.js';
import { groupsOf, isDouble, STILL, touches } from './modes.js';
import type { Row } from './row.js';
import { ContactPoint, type Unilateral } from './unilateral.js';

/** What an impact struck: one entry for each pair, stop or rope. */
export interface Strike {
  what: Unilateral;
  approachSpeed: number;
  effectiveMass: number;
}

export interface ImpactOutcome {
  strikes: Strike[];
  /** Part of the restitution that was left so as not to add energy (1: all). */
  cut: number;
}

/**
 * Impacts: all touching points at once, through joints, with Newton's restitution and kinetic friction on the impulses.
 * Where that would add energy, restitution is cut to the largest part that does not.
 */
export class Impacts {
  constructor(private readonly dynamics: Dynamics) {}

  /**
   * Changes `v` where touching points approach, and books it into the work integrals.
   * @param beforeChange called with what was struck, while the state is still that before the impact
   * @returns null where nothing approaches; 'noSolution' where no impulses are consistent
   */
  resolve(
    t: number,
    q: Float64Array,
    v: Float64Array,
    works: Float64Array,
    beforeChange: (strikes: Strike[]) => void,
  ): ImpactOutcome | 'noSolution' | null {
    const touching = this.touching(t, q, v);
    const rates = touching.map((unilateral) => unilateral.rate(v));
    if (!rates.some((rate) => rate < -STILL)) return null;
    const problem = new ContactProblem(this.dynamics.system, this.dynamics.parts.joints);
    const strikes = this.strikes(touching, rates, problem);
    beforeChange(strikes);
    const groups = groupsOf(touching);
    const solveWith = (cut: number): ReturnType<ContactProblem['solve']> =>
      this.solve(problem, touching, groups, rates, v, cut);
    let cut = 1;
    let solution = solveWith(1);
    if (!solution) return 'noSolution';
    const kinetic = this.kinetic(v);
    const isDriven = groups.some(({ members }) => members[0].surfaceSpeed !== 0);
    if (!isDriven && this.kineticAfter(v, solution.change) > kinetic * (1 + 1e-12)) {
      let [low, high] = [0, 1];
      for (let i = 0; i < 60; i += 1) {
        cut = (low + high) / 2;
        const trial = solveWith(cut);
        if (trial && this.kineticAfter(v, trial.change) <= kinetic) low = cut;
        else high = cut;
      }
      cut = low;
      solution = solveWith(low);
      if (!solution) return 'noSolution';
    }
    this.book(touching, groups, solution, v, works);
    for (let i = 0; i < v.length; i += 1) v[i] += solution.change[i];
    return { strikes, cut };
  }

  private touching(t: number, q: Float64Array, v: Float64Array): Unilateral[] {
    const { parts } = this.dynamics;
    this.dynamics.update(t, q, v);
    const found: Unilateral[] = [];
    for (const unilateral of parts.unilaterals) {
      unilateral.locate(q);
      if (!unilateral.isValid || !touches(unilateral)) continue;
      if (unilateral instanceof ContactPoint && !unilateral.isArmed) continue;
      unilateral.aim(q, v, t);
      if (!isDouble(unilateral, found)) found.push(unilateral);
    }
    return found;
  }

  private solve(
    problem: ContactProblem,
    touching: readonly Unilateral[],
    groups: readonly FrictionGroup[],
    rates: readonly number[],
    v: Float64Array,
    cut: number,
  ): ReturnType<ContactProblem['solve']> {
    const rubbing = groups.filter(({ pair }) => pair.kineticFriction > 0);
    return problem.solve(
      touching.map(({ normal }) => ({ row: normal, along: normal })),
      rubbing.map(({ pair, members }) => ({
        row: members[0].tangent,
        coefficient: pair.kineticFriction,
        normals: members.map((member) => touching.indexOf(member)),
        constant: 0,
      })),
      Float64Array.from(touching, (unilateral, i) => rates[i] + cut * rebound(unilateral, rates[i])),
      Float64Array.from(rubbing, ({ members }) => members[0].slip(v)),
    );
  }

  /** Impulse × mean rate of its row, body by body; what an impulse on a belt puts in is no loss. */
  private book(
    touching: readonly Unilateral[],
    groups: readonly FrictionGroup[],
    solution: NonNullable<ReturnType<ContactProblem['solve']>>,
    v: Float64Array,
    works: Float64Array,
  ): void {
    const mean = Float64Array.from(v, (value, i) => value + 0.5 * solution.change[i]);
    const { joints } = this.dynamics.parts;
    let k = 0;
    for (const joint of joints) {
      if (joint.isReleased) continue;
      for (const row of joint.rows) joint.account.addRow(works, row, solution.jointForces[k++], mean);
    }
    touching.forEach(({ impactAccount, normal }, i) => {
      const impulse = solution.normals[i];
      impactAccount.addRow(works, normal, impulse, mean);
      impactAccount.heat(works, -impulse * normal.rate(mean));
    });
    groups
      .filter(({ pair }) => pair.kineticFriction > 0)
      .forEach(({ members: [lead] }, i) => {
        const impulse = solution.tangentials[i];
        lead.impactAccount.addRow(works, lead.tangent, impulse, mean);
        lead.impactAccount.heat(works, -impulse * lead.slip(mean));
      });
  }

  private kinetic(v: Float64Array): number {
    const { mass } = this.dynamics.system;
    let sum = 0;
    for (let i = 0; i < v.length; i += 1) sum += 0.5 * mass[i] * v[i] * v[i];
    return sum;
  }

  private kineticAfter(v: Float64Array, change: Float64Array): number {
    return this.kinetic(Float64Array.from(v, (value, i) => value + change[i]));
  }

  private strikes(touching: readonly Unilateral[], rates: readonly number[], problem: ContactProblem): Strike[] {
    const struck = touching.map((what, i) => ({ what, rate: rates[i] })).filter(({ rate }) => rate < -STILL);
    const keyOf = (what: Unilateral): unknown => (what instanceof ContactPoint ? what.pair : what);
    const keys = [...new Set(struck.map(({ what }) => keyOf(what)))];
    const held = new Set(touching.filter(({ isClosed }) => isClosed).map(keyOf));
    return keys.flatMap((key) => {
      const own = struck.filter(({ what }) => keyOf(what) === key);
      const worst = own.reduce((a, b) => (b.rate < a.rate ? b : a));
      // Rolled on from one point to the next (round a corner): no touch, though its energy is booked.
      if (held.has(key) && -worst.rate < LEAST_REBOUND) return [];
      const mass = effectiveMass(
        problem,
        own.map(({ what }) => what.normal),
        own.map(({ rate }) => rate),
      );
      return { what: worst.what, approachSpeed: -worst.rate, effectiveMass: mass };
    });
  }
}

/** Slower than this nothing rebounds: it would not rise above what a touch is known to [auditor speed]. */
const LEAST_REBOUND = 1e-5;

/** Rate that Newton's restitution takes off the free rate: e × approach, nil below the pair's rest speed. */
function rebound({ restitution, restSpeed }: Unilateral, rate: number): number {
  return -rate >= Math.max(restSpeed, LEAST_REBOUND) ? restitution * rate : 0;
}

/**
 * The mass which, moving at the approach speed, carries the energy that a frictionless plastic impact of these points alone
 * takes, joints holding: Σ λ u / u_max².
 */
export function effectiveMass(problem: ContactProblem, rows: readonly Row[], rates: readonly number[]): number {
  const solution = problem.solve(
    rows.map((row) => ({ row, along: row })),
    [],
    Float64Array.from(rates),
    new Float64Array(0),
  );
  if (!solution) return Infinity;
  const most = Math.max(...rates.map(Math.abs));
  return rates.reduce((sum, rate, i) => sum - rate * solution.normals[i], 0) / (most * most);
}
