/** Errors against step, with the slope of their logarithms fitted by least squares. */
export interface Convergence {
  slope: number;
  errors: number[];
}

/**
 * Runs `errorOf` at each step and fits log|error| = slope · log h + c; prints the table. Steps whose error is at rounding
 * do not belong to the asymptotic range, so choose them above it.
 */
export function convergence(title: string, steps: readonly number[], errorOf: (step: number) => number): Convergence {
  const errors = steps.map(errorOf);
  const xs = steps.map(Math.log);
  const ys = errors.map((error) => Math.log(Math.abs(error)));
  const [mx, my] = [mean(xs), mean(ys)];
  const slope =
    xs.reduce((sum, x, i) => sum + (x - mx) * (ys[i] - my), 0) / xs.reduce((sum, x) => sum + (x - mx) ** 2, 0);
  const rows = steps.map(
    (step, i) => `  ${step.toExponential(2).padStart(10)} ${errors[i].toExponential(3).padStart(12)}`,
  );
  console.log([title, '      step h        error', ...rows, `  slope ${slope.toFixed(3)}`].join('\n'));
  return { slope, errors };
}

const mean = (values: readonly number[]): number => values.reduce((sum, value) => sum + value, 0) / values.length;
