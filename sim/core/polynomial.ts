/**
 * Real roots of a polynomial in [0, 1], ascending, each to rounding.
 *
 * Between two consecutive roots of its derivative a polynomial is monotonic, so that each root is bracketed by them:
 * the roots of the derivatives are found first, from degree 1 upwards, each by Newton's method kept inside its bracket.
 * (The idea is old; see C. Yuksel, "High-Performance Polynomial Root Finding for Graphics", 2022, for a modern account.)
 *
 * @param c coefficients, lowest power first; c[degree] may be zero
 * @param degree at most 5
 * @param out receives the roots; at least degree + 1 long
 * @returns how many were found. Roots at 0 and 1 count. A polynomial that is zero throughout has none. A double root
 *   is found once where rounding lets it touch zero, and may be missed where rounding lifts it off.
 */
export function rootsInUnit(c: Float64Array, degree: number, out: Float64Array): number {
  let used = degree;
  while (used > 0 && c[used] === 0) used -= 1;
  if (used === 0) return 0;
  if (used === 5 && neverZero(c)) return 0;
  let brackets: Float64Array = EDGES;
  let count = 0;
  for (let order = used - 1; order >= 0; order -= 1) {
    differentiate(c, used, order, derivative);
    const roots = order === 0 ? out : order % 2 === 0 ? even : odd;
    const inner = brackets;
    const innerCount = count;
    count = 0;
    let from = 0;
    for (let k = 0; k <= innerCount; k += 1) {
      const to = k < innerCount ? inner[k] : 1;
      count = appendRoot(derivative, used - order, from, to, roots, count);
      from = to;
    }
    brackets = roots;
  }
  return count;
}

const EDGES = new Float64Array(6);
const derivative = new Float64Array(6);
const even = new Float64Array(6);
const odd = new Float64Array(6);

/** Value of a polynomial of the degree given at x (Horner). */
export function evaluate(c: Float64Array, degree: number, x: number): number {
  let value = c[degree];
  for (let k = degree - 1; k >= 0; k -= 1) value = value * x + c[k];
  return value;
}

/** A quintic whose Bernstein coefficients on [0, 1] all have one sign has no root there. */
function neverZero(c: Float64Array): boolean {
  const [a, b, d, e, f, g] = c as unknown as [number, number, number, number, number, number];
  const b1 = a + b / 5;
  const b2 = a + (2 * b) / 5 + d / 10;
  const b3 = a + (3 * b) / 5 + (3 * d) / 10 + e / 10;
  const b4 = a + (4 * b) / 5 + (3 * d) / 5 + (2 * e) / 5 + f / 5;
  const b5 = a + b + d + e + f + g;
  return (
    (a > 0 && b1 > 0 && b2 > 0 && b3 > 0 && b4 > 0 && b5 > 0) ||
    (a < 0 && b1 < 0 && b2 < 0 && b3 < 0 && b4 < 0 && b5 < 0)
  );
}

function differentiate(c: Float64Array, degree: number, order: number, out: Float64Array): void {
  for (let k = order; k <= degree; k += 1) {
    let factor = 1;
    for (let j = 0; j < order; j += 1) factor *= k - j;
    out[k - order] = c[k] * factor;
  }
}

function appendRoot(
  c: Float64Array,
  degree: number,
  from: number,
  to: number,
  roots: Float64Array,
  count: number,
): number {
  const low = evaluate(c, degree, from);
  const high = evaluate(c, degree, to);
  if (low === 0) {
    if (count > 0 && roots[count - 1] === from) return count;
    roots[count] = from;
    return count + 1;
  }
  if (high === 0) {
    roots[count] = to;
    return count + 1;
  }
  if (low > 0 === high > 0) return count;
  roots[count] = newtonInBracket(c, degree, from, to, low);
  return count + 1;
}

/** Newton's method that never leaves a shrinking bracket: a step out of it is replaced by a bisection. */
function newtonInBracket(c: Float64Array, degree: number, from: number, to: number, valueFrom: number): number {
  let low = from;
  let high = to;
  let x = 0.5 * (from + to);
  for (let iteration = 0; iteration < 100; iteration += 1) {
    let value = c[degree];
    let slope = 0;
    for (let k = degree - 1; k >= 0; k -= 1) {
      slope = slope * x + value;
      value = value * x + c[k];
    }
    if (value === 0) return x;
    if (value > 0 === valueFrom > 0) low = x;
    else high = x;
    let next = x - value / slope;
    if (!(next > low && next < high)) next = 0.5 * (low + high);
    if (Math.abs(next - x) <= 1.2e-16 * Math.abs(x) + 1e-19 || next <= low || next >= high) return next;
    x = next;
  }
  return x;
}
