import { describe, expect, it } from 'vitest';
import { DENSE, ERROR_5, NODES, STAGES, THIRD_ORDER } from '../../../../sim/auditor/method/coefficients.js';
import { Dop853, type Derivative } from '../../../../sim/auditor/method/dop853.js';
import { convergence } from '../../../convergence/slope.js';

/** A rooted tree as the list of its root's subtrees (Hairer, Nørsett & Wanner, *Solving ODEs I*, II.2). */
interface Tree {
  order: number;
  /** γ(t). */
  density: number;
  branches: Tree[];
}

const LEAF: Tree = { order: 1, density: 1, branches: [] };

/** Every rooted tree up to an order: as many as 1, 1, 2, 4, 9, 20, 48, 115 of orders 1 to 8. */
function treesUpTo(most: number): Tree[] {
  const trees = [LEAF];
  for (let order = 2; order <= most; order += 1) {
    const smaller = trees.slice();
    const choose = (left: number, from: number, chosen: Tree[]): void => {
      if (left === 0) {
        const density = chosen.reduce((product, tree) => product * tree.density, order);
        trees.push({ order, density, branches: chosen });
        return;
      }
      for (let i = from; i < smaller.length; i += 1) {
        if (smaller[i].order <= left) choose(left - smaller[i].order, i, [...chosen, smaller[i]]);
      }
    };
    choose(order - 1, 0, []);
  }
  return trees;
}

const TREES = treesUpTo(8);
const COUNT = 16;

/** Φ_i(t) of every stage: the product over its branches of Σ_j a_ij Φ_j. */
function elementary({ branches }: Tree): number[] {
  const below = branches.map(elementary);
  return Array.from({ length: COUNT }, (_, i) =>
    below.reduce((product, phi) => product * (STAGES[i] ?? []).reduce((sum, [j, a]) => sum + a * phi[j], 0), 1),
  );
}

const weigh = (weights: readonly (readonly [number, number])[], phi: readonly number[]): number =>
  weights.reduce((sum, [i, b]) => sum + b * phi[i], 0);

/** Weights of the continuous extension at θ, by letting the interpolation itself run on unit vectors. */
function denseWeights(theta: number): [number, number][] {
  const columns: number[][] = Array.from({ length: 7 }, () => Array.from({ length: COUNT }, () => 0));
  for (const [i, b] of STAGES[12]) columns[0][i] = b;
  columns[0].forEach((b, i) => {
    columns[1][i] = -b;
    columns[2][i] = 2 * b;
  });
  columns[1][0] += 1;
  columns[2][0] -= 1;
  columns[2][12] -= 1;
  DENSE.forEach((row, k) => {
    for (const [i, c] of row) columns[3 + k][i] = c;
  });
  return Array.from({ length: COUNT }, (_, i) => {
    let value = 0;
    for (let j = 6; j >= 0; j -= 1) value = (value + columns[j][i]) * (j % 2 === 0 ? theta : 1 - theta);
    return [i, value];
  });
}

describe('the coefficients of DOP853', () => {
  it('are met by the 200 rooted trees of orders 1 to 8', () => {
    expect(TREES).toHaveLength(200);
    const worst = Math.max(...TREES.map((tree) => Math.abs(weigh(STAGES[12], elementary(tree)) - 1 / tree.density)));
    console.log(`order conditions 1 to 8 met to ${worst.toExponential(1)}`);
    expect(worst).toBeLessThan(1e-13);
  });

  it('are not of order 9: some condition of that order fails', () => {
    const ninth = treesUpTo(9).filter(({ order }) => order === 9);
    expect(ninth).toHaveLength(286);
    const worst = Math.max(...ninth.map((tree) => Math.abs(weigh(STAGES[12], elementary(tree)) - 1 / tree.density)));
    expect(worst).toBeGreaterThan(1e-8);
  });

  it('have as nodes the sums of their rows', () => {
    STAGES.forEach((row, i) => expect(row.reduce((sum, [, a]) => sum + a, 0)).toBeCloseTo(NODES[i], 13));
  });

  it('give a continuous extension of order 7: θ^|t|/γ(t) for the 85 trees up to it, at any θ', () => {
    const trees = TREES.filter(({ order }) => order <= 7);
    expect(trees).toHaveLength(85);
    for (const theta of [0.1, 0.37, 0.5, 0.81, 1]) {
      const weights = denseWeights(theta);
      for (const tree of trees) {
        const off = weigh(weights, elementary(tree)) - theta ** tree.order / tree.density;
        expect(Math.abs(off)).toBeLessThan(1e-12);
      }
    }
  });

  it('estimate errors by differences to solutions of order 5 and 3', () => {
    for (const tree of TREES) {
      const phi = elementary(tree);
      if (tree.order <= 5) expect(Math.abs(weigh(ERROR_5, phi))).toBeLessThan(1e-13);
      if (tree.order <= 3) expect(weigh(THIRD_ORDER, phi)).toBeCloseTo(1 / tree.density, 13);
    }
    const sixth = TREES.filter(({ order }) => order === 6).map((tree) => Math.abs(weigh(ERROR_5, elementary(tree))));
    expect(Math.max(...sixth)).toBeGreaterThan(1e-6);
  });
});

/** y′ = y cos t from 1: y = exp(sin t). */
const growing: Derivative = (t, y, dy) => {
  dy[0] = y[0] * Math.cos(t);
};
const START = [1];
const exact = (t: number): number => Math.exp(Math.sin(t));
const unit = new Float64Array(1).fill(1);
const FROM = 0.7;
const STEPS = [4, 5, 6, 8, 10, 12].map((n) => 2 / n);

/** Runs with steps of h to t = 2; `each` is called after every step. */
function even(h: number, each: (method: Dop853, t: number) => void): number {
  const method = new Dop853(growing, 1);
  const y = Float64Array.from(START);
  const steps = Math.round(2 / h);
  for (let n = 0; n < steps; n += 1) {
    method.restart(n * h, y);
    method.try(h, unit);
    method.finish();
    each(method, n * h);
    y.set(method.end);
  }
  return y[0];
}

/** One step from t = 0.7. */
function oneStep(h: number): { method: Dop853; estimate: number } {
  const method = new Dop853(growing, 1);
  method.restart(FROM, Float64Array.of(exact(FROM)));
  const estimate = method.try(h, unit);
  method.finish();
  return { method, estimate };
}

describe('DOP853 on y′ = y cos t', () => {
  it('has the observed order 8 at the ends of its steps', () => {
    const { slope } = convergence('DOP853, end of the steps', STEPS, (h) => even(h, () => undefined) - exact(2));
    expect(Math.abs(slope - 8)).toBeLessThan(0.2);
  });

  it('has the observed order 7 between them, h⁸ within a step', () => {
    const state = new Float64Array(1);
    const { slope } = convergence('DOP853, dense output', STEPS, (h) => {
      let worst = 0;
      even(h, (method, t) => {
        for (const theta of [0.2, 0.4, 0.6, 0.8]) {
          worst = Math.max(worst, Math.abs(method.interpolate(theta, state)[0] - exact(t + theta * h)));
        }
      });
      return worst;
    });
    expect(Math.abs(slope - 8)).toBeLessThan(0.2);
  });

  it('estimates an error that shrinks with h⁸, and is not less than the true one', () => {
    const { slope } = convergence('error estimate', STEPS, (h) => oneStep(h).estimate);
    expect(Math.abs(slope - 8)).toBeLessThan(0.3);
    for (const h of STEPS) {
      const { method, estimate } = oneStep(h);
      expect(estimate).toBeGreaterThan(Math.abs(method.end[0] - exact(FROM + h)));
    }
  });

  it('begins its interpolant at the start and ends it at the end, to the last digits', () => {
    const state = new Float64Array(1);
    even(0.25, (method, t) => {
      expect(method.interpolate(0, state)[0]).toBeCloseTo(exact(t), 9);
      expect(method.interpolate(1, state)[0]).toBeCloseTo(method.end[0], 14);
    });
  });

  it('counts 13 evaluations a step, and three more where it is interpolated', () => {
    const { method } = oneStep(0.1);
    expect(method.evaluations).toBe(13);
    method.interpolate(0.5, new Float64Array(1));
    method.interpolate(0.6, new Float64Array(1));
    expect(method.evaluations).toBe(16);
  });

  it('says that a state ran out of numbers by an error that is not one', () => {
    const method = new Dop853((_t, _y, dy) => dy.fill(NaN), 1);
    method.restart(0, new Float64Array(1));
    expect(method.try(0.1, unit)).toBeNaN();
  });
});
