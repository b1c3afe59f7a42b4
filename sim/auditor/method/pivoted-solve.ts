/** A matrix factored with complete pivoting; rank-deficient systems get a basic solution (free unknowns nil). */
export interface Factored {
  n: number;
  rank: number;
  /** Smallest pivot used over the greatest. */
  pivotRatio: number;
  lu: Float64Array;
  rows: Int32Array;
  columns: Int32Array;
  /** Powers of two that rows and columns were multiplied by. */
  rowScale: Float64Array;
  columnScale: Float64Array;
}

/** Pivots below this share of the greatest are taken as nil: redundant constraints. */
const NIL = 1e-11;
/** Smaller entries than this are as good as nil. */
const LEAST = 1e-200;

/**
 * Gaussian elimination with complete pivoting (Golub & Van Loan, *Matrix Computations*, 4th ed. 2013, 3.4.8), of an n × n
 * matrix held row by row. It is the safest of the direct methods for the small, sometimes singular systems here. Rows and
 * columns are brought to one size before (ibid. 3.5.2), so that light bodies are no lack of rank. Of a symmetric matrix without
 * negative pivots the greatest entry is always on the diagonal, so that it is looked for there alone.
 */
export function factor(a: Float64Array, n: number, isSymmetric = false): Factored {
  const lu = a.slice(0, n * n);
  const rowScale = isSymmetric ? equilibrateEvenly(lu, n) : equilibrate(lu, n, n, 1);
  const columnScale = isSymmetric ? rowScale : equilibrate(lu, n, 1, n);
  const rows = Int32Array.from({ length: n }, (_, i) => i);
  const columns = Int32Array.from({ length: n }, (_, i) => i);
  let greatest = 0;
  let last = 0;
  let rank = 0;
  for (let k = 0; k < n; k += 1) {
    const [p, q, size] = isSymmetric ? diagonalPivot(lu, n, k) : pivot(lu, n, k);
    if (k === 0) greatest = size;
    if (size === 0 || size <= NIL * greatest) break;
    swapRows(lu, n, k, p, rows);
    swapColumns(lu, n, k, q, columns);
    last = size;
    rank += 1;
    eliminate(lu, n, k);
  }
  return { n, rank, pivotRatio: greatest > 0 ? last / greatest : 1, lu, rows, columns, rowScale, columnScale };
}

/** Scales rows and columns alike by powers of two, so that the diagonal is about one. */
function equilibrateEvenly(lu: Float64Array, n: number): Float64Array {
  const scales = new Float64Array(n);
  for (let i = 0; i < n; i += 1) {
    const size = lu[i * n + i];
    scales[i] = size > LEAST && Number.isFinite(size) ? 2 ** -Math.round(Math.log2(size) / 2) : 1;
  }
  for (let i = 0; i < n; i += 1) {
    for (let j = 0; j < n; j += 1) lu[i * n + j] *= scales[i] * scales[j];
  }
  return scales;
}

/**
 * Multiplies each row (or column: entry (i, j) is at i·across + j·along) by a power of two that makes its greatest entry
 * about one; returns those.
 */
export function equilibrate(lu: Float64Array, n: number, across: number, along: number): Float64Array {
  const scales = new Float64Array(n);
  for (let i = 0; i < n; i += 1) {
    let size = 0;
    for (let j = 0; j < n; j += 1) size = Math.max(size, Math.abs(lu[i * across + j * along]));
    const scale = size > LEAST && Number.isFinite(size) ? 2 ** -Math.round(Math.log2(size)) : 1;
    for (let j = 0; j < n; j += 1) lu[i * across + j * along] *= scale;
    scales[i] = scale;
  }
  return scales;
}

function pivot(lu: Float64Array, n: number, k: number): [number, number, number] {
  let p = k;
  let q = k;
  let size = 0;
  for (let i = k; i < n; i += 1) {
    for (let j = k; j < n; j += 1) {
      const value = Math.abs(lu[i * n + j]);
      if (value <= size) continue;
      size = value;
      p = i;
      q = j;
    }
  }
  return [p, q, size];
}

function diagonalPivot(lu: Float64Array, n: number, k: number): [number, number, number] {
  let p = k;
  let size = 0;
  for (let i = k; i < n; i += 1) {
    const value = lu[i * n + i];
    if (value <= size) continue;
    size = value;
    p = i;
  }
  return [p, p, size];
}

function swapRows(lu: Float64Array, n: number, a: number, b: number, order: Int32Array): void {
  if (a === b) return;
  for (let j = 0; j < n; j += 1) [lu[a * n + j], lu[b * n + j]] = [lu[b * n + j], lu[a * n + j]];
  [order[a], order[b]] = [order[b], order[a]];
}

function swapColumns(lu: Float64Array, n: number, a: number, b: number, order: Int32Array): void {
  if (a === b) return;
  for (let i = 0; i < n; i += 1) [lu[i * n + a], lu[i * n + b]] = [lu[i * n + b], lu[i * n + a]];
  [order[a], order[b]] = [order[b], order[a]];
}

function eliminate(lu: Float64Array, n: number, k: number): void {
  const diagonal = lu[k * n + k];
  for (let i = k + 1; i < n; i += 1) {
    const multiplier = lu[i * n + k] / diagonal;
    lu[i * n + k] = multiplier;
    if (multiplier === 0) continue;
    for (let j = k + 1; j < n; j += 1) lu[i * n + j] -= multiplier * lu[k * n + j];
  }
}

/** Solves A x = b into `x`; b is left as it is. Equations that the rank leaves over are taken as consistent. */
export function solve(factored: Factored, b: Float64Array, x: Float64Array): Float64Array {
  const { n, rank, lu, rows, columns, rowScale, columnScale } = factored;
  const y = new Float64Array(n);
  for (let i = 0; i < rank; i += 1) {
    let sum = b[rows[i]] * rowScale[rows[i]];
    for (let j = 0; j < i; j += 1) sum -= lu[i * n + j] * y[j];
    y[i] = sum;
  }
  for (let i = rank - 1; i >= 0; i -= 1) {
    let sum = y[i];
    for (let j = i + 1; j < rank; j += 1) sum -= lu[i * n + j] * y[j];
    y[i] = sum / lu[i * n + i];
  }
  x.fill(0, 0, n);
  for (let i = 0; i < rank; i += 1) x[columns[i]] = y[i] * columnScale[columns[i]];
  return x;
}
