import {
  adjoint,
  diagonal,
  frobeniusNorm,
  identity,
  multiply,
  multiplyAdjointFirst,
  subtract,
  type ComplexMatrix,
} from '../../../src/linalg/complex-matrix.js';

/** LAPACK-style test ratios: a residual in units of its size n and 2⁻⁵². Frobenius norms, which only enlarge numerators. */
const UNIT = 2 ** -52;

/** Bounds of the method, §9. */
export const EIGEN_RATIO = 60;
export const SOLVE_RATIO = 30;

/** ‖V*V − 1‖ / (rows 2⁻⁵²). */
export function orthogonalityRatio(v: ComplexMatrix): number {
  const defect = frobeniusNorm(subtract(multiplyAdjointFirst(v, v), identity(v.cols)));
  return defect / (Math.max(v.rows, 1) * UNIT);
}

/** ‖A − V diag(values) V*‖ / (n ‖A‖ 2⁻⁵²). */
export function eigenRatio(a: ComplexMatrix, values: Float64Array, v: ComplexMatrix): number {
  return differenceRatio(a, multiply(multiply(v, diagonal(values)), adjoint(v)));
}

/** ‖A − B‖ / (n ‖A‖ 2⁻⁵²), n the larger side of A; 0 when both vanish. */
export function differenceRatio(a: ComplexMatrix, b: ComplexMatrix): number {
  const norm = frobeniusNorm(a);
  const delta = frobeniusNorm(subtract(a, b));
  if (norm === 0) return delta === 0 ? 0 : Infinity;
  return delta / norm / (Math.max(a.rows, a.cols) * UNIT);
}

/** ‖A X − B‖ / (n ‖A‖ ‖X‖ 2⁻⁵²). */
export function solveRatio(a: ComplexMatrix, x: ComplexMatrix, b: ComplexMatrix): number {
  const size = frobeniusNorm(a) * frobeniusNorm(x) * Math.max(a.rows, a.cols) * UNIT;
  const delta = frobeniusNorm(subtract(multiply(a, x), b));
  return delta === 0 ? 0 : delta / size;
}

/** A real row-major array as a matrix. */
export function asMatrix(re: Float64Array, rows: number, cols: number = rows): ComplexMatrix {
  return { rows, cols, re, im: new Float64Array(rows * cols) };
}
