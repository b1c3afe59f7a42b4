/**
 * Second derivatives at the knots of the natural cubic spline of a function: for steps h and values f,
 * h_{i−1} M_{i−1} + 2 (h_{i−1} + h_i) M_i + h_i M_{i+1} = 6 (slope_i − slope_{i−1}), M = 0 at both ends.
 * Source: de Boor, A Practical Guide to Splines, ch. IV. Elimination needs no pivoting: the system is diagonally dominant.
 */
export function naturalSecondDerivatives(values: readonly number[], h: readonly number[]): number[] {
  const last = values.length - 1;
  const slope = (i: number): number => (values[i + 1] - values[i]) / h[i];
  const upper: number[] = [0];
  const right: number[] = [0];
  for (let i = 1; i < last; i += 1) {
    const pivot = 2 * (h[i - 1] + h[i]) - h[i - 1] * upper[i - 1];
    upper.push(h[i] / pivot);
    right.push((6 * (slope(i) - slope(i - 1)) - h[i - 1] * right[i - 1]) / pivot);
  }
  const second = new Array<number>(last + 1).fill(0);
  for (let i = last - 1; i > 0; i -= 1) second[i] = right[i] - upper[i] * second[i + 1];
  return second;
}

/** Coefficients of v, v², v³ (v = u/h, 0 to 1) of the cubic from `a` to `b` with second derivatives `m` and `n` at its ends. */
export function spanCoefficients(a: number, b: number, m: number, n: number, h: number): [number, number, number] {
  const k = (h * h) / 6;
  return [b - a - k * (2 * m + n), 3 * k * m, k * (n - m)];
}
