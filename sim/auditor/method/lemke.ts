import { equilibrate } from './pivoted-solve.js';

/** How far below zero w may be, relative to the greatest entry of q. */
const ENOUGH = 1e-9;
/** Sizes of the perturbations of q that are tried where ties led the pivoting astray. */
const PERTURBATIONS = [0, 1e-12, 1e-10, 1e-8];

/**
 * Linear complementarity problem w = M z + q, w ≥ 0, z ≥ 0, w·z = 0, by Lemke's method of complementary pivoting
 * (Cottle, Pang & Stone, *The Linear Complementarity Problem*, 1992, algorithm 4.4.5). Every answer is checked; where ties
 * of a degenerate problem gave a wrong one, q is perturbed by a little (ibid. 4.9). Rows and columns are brought to one size
 * before, which leaves solutions what they are, so that light bodies among heavy ones are seen.
 *
 * @param m n × n, row by row
 * @returns z, or null where the method ends on a secondary ray (no solution found)
 */
export function lemke(m: Float64Array, q: Float64Array, n: number): Float64Array | null {
  const scaled = m.slice(0, n * n);
  const rows = equilibrate(scaled, n, n, 1);
  const columns = equilibrate(scaled, n, 1, n);
  const right = q.map((value, i) => value * rows[i]);
  const z = scaledLemke(scaled, right, n);
  return z?.map((value, i) => value * columns[i]) ?? null;
}

function scaledLemke(m: Float64Array, q: Float64Array, n: number): Float64Array | null {
  const size = q.reduce((most, value) => Math.max(most, Math.abs(value)), 0);
  for (const perturbation of PERTURBATIONS) {
    const moved = q.map((value, i) => value + perturbation * size * (1 + ((i * 7) % 11) / 11));
    const z = pivoting(m, moved, n);
    if (z && isSolution(m, q, z, n, Math.max(ENOUGH, 10 * perturbation) * size)) return z;
  }
  return null;
}

function isSolution(m: Float64Array, q: Float64Array, z: Float64Array, n: number, enough: number): boolean {
  for (let i = 0; i < n; i += 1) {
    let w = q[i];
    for (let j = 0; j < n; j += 1) w += m[i * n + j] * z[j];
    if (w < -enough || (z[i] > enough && w > enough * 1e3)) return false;
  }
  return true;
}

function pivoting(m: Float64Array, q: Float64Array, n: number): Float64Array | null {
  const z = new Float64Array(n);
  let least = 0;
  for (let i = 1; i < n; i += 1) if (q[i] < q[least]) least = i;
  if (n === 0 || q[least] >= 0) return z;
  const width = 2 * n + 2;
  const table = tableau(m, q, n, width);
  const basis = Int32Array.from({ length: n }, (_, i) => i);
  const artificial = 2 * n;
  pivotOn(table, n, width, least, artificial);
  let leaving = basis[least];
  basis[least] = artificial;
  for (let step = 0; step < 60 * (n + 1); step += 1) {
    const entering = leaving < n ? leaving + n : leaving - n;
    const row = ratioTest(table, n, width, entering, basis, artificial);
    if (row < 0) return null;
    pivotOn(table, n, width, row, entering);
    leaving = basis[row];
    basis[row] = entering;
    if (leaving === artificial) return readOut(table, n, width, basis, z);
  }
  return null;
}

/** Columns: w, z, the artificial variable, the right-hand side. */
function tableau(m: Float64Array, q: Float64Array, n: number, width: number): Float64Array {
  const table = new Float64Array(n * width);
  for (let i = 0; i < n; i += 1) {
    table[i * width + i] = 1;
    for (let j = 0; j < n; j += 1) table[i * width + n + j] = -m[i * n + j];
    table[i * width + 2 * n] = -1;
    table[i * width + 2 * n + 1] = q[i];
  }
  return table;
}

function pivotOn(table: Float64Array, n: number, width: number, row: number, column: number): void {
  const pivot = table[row * width + column];
  for (let j = 0; j < width; j += 1) table[row * width + j] /= pivot;
  for (let i = 0; i < n; i += 1) {
    const multiplier = table[i * width + column];
    if (i === row || multiplier === 0) continue;
    for (let j = 0; j < width; j += 1) table[i * width + j] -= multiplier * table[row * width + j];
  }
}

const NIL = 1e-12;

function ratioTest(
  table: Float64Array,
  n: number,
  width: number,
  column: number,
  basis: Int32Array,
  artificial: number,
): number {
  let best = Infinity;
  let row = -1;
  for (let i = 0; i < n; i += 1) {
    const pivot = table[i * width + column];
    if (pivot <= NIL) continue;
    const ratio = table[i * width + width - 1] / pivot;
    const tie = Math.abs(ratio - best) <= 1e-12 * (1 + Math.abs(best));
    if (!tie && ratio > best) continue;
    if (tie && basis[row] === artificial) continue;
    if (tie && basis[i] !== artificial && pivot <= table[row * width + column]) continue;
    best = tie ? Math.min(best, ratio) : ratio;
    row = i;
  }
  return row;
}

function readOut(table: Float64Array, n: number, width: number, basis: Int32Array, z: Float64Array): Float64Array {
  for (let i = 0; i < n; i += 1) {
    if (basis[i] >= n && basis[i] < 2 * n) z[basis[i] - n] = Math.max(0, table[i * width + width - 1]);
  }
  return z;
}
