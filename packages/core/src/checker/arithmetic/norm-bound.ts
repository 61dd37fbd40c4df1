import { NORM_ITERATIONS } from './limits.js';
import type { ComplexIntervalMatrix } from './interval-matrix.js';
import { addUp, divUp, mulUp, sqrtUp } from './rounding.js';

/** Upper bound of ‖A‖₂ for every Hermitian matrix in an interval matrix: ‖A‖₂ ≤ ‖|A|‖₂. */
export function hermitianNormBound(a: ComplexIntervalMatrix): number {
  const n = a.rows;
  const moduli = modulusBounds(a);
  for (let i = 0; i < n; i++) {
    for (let j = 0; j < i; j++) {
      const top = Math.max(moduli[i * n + j], moduli[j * n + i]);
      moduli[i * n + j] = top;
      moduli[j * n + i] = top;
    }
  }
  return nonNegativeNormBound(moduli, n);
}

/** Upper bound of ‖A‖₂ ≤ (‖A‖₁‖A‖_∞)^{1/2} for every matrix in an interval matrix. */
export function normBound(a: ComplexIntervalMatrix): number {
  const moduli = modulusBounds(a);
  const columns = new Float64Array(a.cols);
  let largestRow = 0;
  for (let i = 0; i < a.rows; i++) {
    let row = 0;
    for (let j = 0; j < a.cols; j++) {
      row = addUp(row, moduli[i * a.cols + j]);
      columns[j] = addUp(columns[j], moduli[i * a.cols + j]);
    }
    largestRow = Math.max(largestRow, row);
  }
  return sqrtUp(
    mulUp(
      largestRow,
      columns.reduce((x, y) => Math.max(x, y), 0),
    ),
  );
}

/** Upper bound of the norm of a symmetric non-negative n×n matrix: max_i (Nx)_i/x_i for any x > 0 (Collatz 1942). */
export function nonNegativeNormBound(matrix: Float64Array, n: number): number {
  let x = new Float64Array(n).fill(1);
  let best = Infinity;
  for (let step = 0; step <= NORM_ITERATIONS; step++) {
    const next = new Float64Array(n);
    let bound = 0;
    for (let i = 0; i < n; i++) {
      let sum = 0;
      for (let j = 0; j < n; j++) {
        const y = matrix[i * n + j];
        if (y > 0) sum = addUp(sum, mulUp(y, x[j]));
        else if (y !== 0) return Infinity;
      }
      next[i] = sum;
      bound = Math.max(bound, divUp(sum, x[i]));
    }
    best = Math.min(best, bound);
    if (!(best > 0 && best < Infinity)) break;
    // Weights for the next round: a damped power step, kept positive and of ordinary size.
    x = next.map((value, i) => Math.max((value / bound + x[i]) / 2, WEIGHT_FLOOR));
  }
  return n === 0 ? 0 : best;
}

/** Smallest weight of a row: small weights only loosen the bound, never break it. */
const WEIGHT_FLOOR = 1e-6;

/** Upper bounds of the moduli of the entries. */
function modulusBounds(a: ComplexIntervalMatrix): Float64Array {
  return Float64Array.from(a.re.lo, (_, k) =>
    modulusUp(Math.max(-a.re.lo[k], a.re.hi[k]), Math.max(-a.im.lo[k], a.im.hi[k])),
  );
}

/** Upper bound of √(x²+y²), x, y ≥ 0. */
export function modulusUp(x: number, y: number): number {
  if (x === 0 || y === 0) return x + y;
  return sqrtUp(addUp(mulUp(x, x), mulUp(y, y)));
}
