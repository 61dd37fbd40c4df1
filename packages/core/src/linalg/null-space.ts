import { adjoint, frobeniusNorm, multiply, zeros, type ComplexMatrix } from './complex-matrix.js';
import { orthogonalColumns, packedQR, upperTriangle } from './qr-real.js';
import { packedComplexQR, unitaryColumns, upperTriangleComplex } from './qr-complex.js';
import { transposeReal } from './real-matrix.js';
import { svdComplex } from './svd-complex.js';
import { inverseNorm } from './triangular-inverse.js';

/**
 * Orthonormal basis (columns, n × nullity) of the right singular vectors of an m × n matrix whose singular values are at
 * most `tolerance`, an absolute bound: multiply it by the scale of the problem. Pivoted QR of A* settles a clear case; when
 * the triangular factor does not prove the rank, its singular values decide. Throws `not-finite`.
 */
export function nullSpace(a: ComplexMatrix, tolerance: number): ComplexMatrix {
  const n = a.cols;
  // A = P R* Q*, so null(A) is spanned by columns of Q.
  const factors = packedComplexQR(adjoint(a), true);
  const r = upperTriangleComplex(factors);
  const rank = provenRank(r, tolerance);
  if (rank !== null) return unitaryColumns(factors, rank, n);
  const { u, s } = svdComplex(r);
  const kept = s.filter((value) => value > tolerance).length;
  const inside = multiply(unitaryColumns(factors, 0, r.rows), columns(u, kept, r.rows));
  return beside(inside, unitaryColumns(factors, r.rows, n));
}

/** `nullSpace` of a real m × n matrix, as a row-major n × dimension matrix. */
export function nullSpaceReal(
  a: Float64Array,
  m: number,
  n: number,
  tolerance: number,
): { basis: Float64Array; dimension: number } {
  const factors = packedQR(transposeReal(a, m, n), n, m, true);
  const r = upperTriangle(factors);
  const k = Math.min(m, n);
  const complex = { rows: k, cols: m, re: r, im: new Float64Array(k * m) };
  const rank = provenRank(complex, tolerance);
  if (rank !== null) return { basis: orthogonalColumns(factors, rank, n), dimension: n - rank };
  const basis = nullSpace({ rows: m, cols: n, re: a, im: new Float64Array(m * n) }, tolerance);
  return { basis: basis.re, dimension: basis.cols };
}

/**
 * The number of singular values of R above the tolerance, if the pivoted factor proves it: with R = [R11 R12; 0 R22] the
 * leading ones are at least 1/‖R11⁻¹‖_F and the others at most ‖R22‖_F. Null when neither bound is conclusive.
 */
function provenRank(r: ComplexMatrix, tolerance: number): number | null {
  const { rows, cols } = r;
  let rank = 0;
  while (rank < rows && Math.hypot(r.re[rank * cols + rank], r.im[rank * cols + rank]) > tolerance) rank++;
  if (frobeniusNorm(block(r, rank, rows, rank, cols)) > tolerance) return null;
  return rank === 0 || 1 / inverseNorm(block(r, 0, rank, 0, rank)) > tolerance ? rank : null;
}

function block(a: ComplexMatrix, top: number, bottom: number, left: number, right: number): ComplexMatrix {
  const c = zeros(bottom - top, right - left);
  for (let i = top; i < bottom; i++) {
    c.re.set(a.re.subarray(i * a.cols + left, i * a.cols + right), (i - top) * c.cols);
    c.im.set(a.im.subarray(i * a.cols + left, i * a.cols + right), (i - top) * c.cols);
  }
  return c;
}

function columns(a: ComplexMatrix, from: number, to: number): ComplexMatrix {
  return block(a, 0, a.rows, from, to);
}

/** [A B]. */
function beside(a: ComplexMatrix, b: ComplexMatrix): ComplexMatrix {
  const c = zeros(a.rows, a.cols + b.cols);
  for (let i = 0; i < a.rows; i++) {
    for (const [part, from, offset] of [
      [a, i * a.cols, 0],
      [b, i * b.cols, a.cols],
    ] as const) {
      c.re.set(part.re.subarray(from, from + part.cols), i * c.cols + offset);
      c.im.set(part.im.subarray(from, from + part.cols), i * c.cols + offset);
    }
  }
  return c;
}
