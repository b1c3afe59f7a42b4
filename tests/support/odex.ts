import { createRequire } from 'node:module';

type Derivative = (t: number, y: number[]) => number[];

interface Solver {
  absoluteTolerance: number;
  relativeTolerance: number;
  maxSteps: number;
  solve(f: Derivative, t0: number, y0: number[], t1: number): { y: number[]; nEval: number };
}

/** A general-purpose extrapolation code (Hairer's ODEX): its own types do not pass strict checks. */
const { Solver: Odex } = createRequire(import.meta.url)('odex') as { Solver: new (size: number) => Solver };

/** Integrates from t = 0 by extrapolation, both tolerances alike. */
export function odex(
  f: Derivative,
  y0: readonly number[],
  until: number,
  tolerance: number,
): { y: number[]; nEval: number } {
  const solver = new Odex(y0.length);
  solver.absoluteTolerance = tolerance;
  solver.relativeTolerance = tolerance;
  solver.maxSteps = 1e6;
  return solver.solve(f, 0, [...y0], until);
}
