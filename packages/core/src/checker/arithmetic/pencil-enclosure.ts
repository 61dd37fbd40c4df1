import { ThalwegError } from '../../errors.js';
import { choleskyProof } from './cholesky-bound.js';
import {
  type ComplexIntervalMatrix,
  type IntervalMatrix,
  pointMatrix,
  scaleIntervalMatrix,
  subIntervalMatrix,
  transposeIntervalMatrix,
} from './interval-matrix.js';
import { type Interval, div, point } from './interval.js';
import { multiplyIntervalMatrix } from './interval-product.js';
import { jacobiEigen } from './jacobi-eigen.js';
import { midpointRadius, plainProduct } from './midpoint-radius.js';
import { addDown, divDown } from './rounding.js';
import { embeddedEigenvalueBound } from './smallest-eigenvalue-bound.js';
import { isReal, symmetricEmbedding } from './symmetric-embedding.js';

/**
 * Enclosure of the smallest λ with Ax = λBx over all Hermitian A, B in the two interval matrices, B being proved positive
 * definite. With an approximate B-orthonormal eigenbasis X the pencil is congruent to (XᵀAX, XᵀBX) ≈ (D, 1): its smallest
 * eigenvalue is at most the first Rayleigh quotient, and at least s + min(0, e)/b when A − sB ⪰ e and B ⪰ b > 0.
 * Throws `not-positive-definite` when B cannot be proved to be, `not-hermitian`, `dimension-mismatch`.
 */
export function encloseSmallestPencil(a: ComplexIntervalMatrix, b: ComplexIntervalMatrix): Interval {
  if (a.rows !== b.rows || a.rows === 0) {
    throw new ThalwegError('dimension-mismatch', `expected two matrices of one side ≥ 1, got ${a.rows} and ${b.rows}`);
  }
  const doubled = !(isReal(a) && isReal(b));
  const left = symmetricEmbedding(a, doubled).matrix;
  const right = symmetricEmbedding(b, doubled).matrix;
  const n = left.rows;
  const x = approximateEigenbasis(midpointRadius(left).mid, midpointRadius(right).mid, n);
  const d = congruent(left, x);
  const one = congruent(right, x);
  const b0 = embeddedEigenvalueBound({ matrix: one, copies: 1 });
  if (!(b0 > 0)) throw notDefinite();
  const quotient = div({ lo: d.lo[0], hi: d.hi[0] }, { lo: one.lo[0], hi: one.hi[0] });
  const shift = quotient.lo / 2 + quotient.hi / 2;
  if (!Number.isFinite(shift)) return { lo: -Infinity, hi: quotient.hi };
  const shifted = subIntervalMatrix(d, scaleIntervalMatrix(one, point(shift)));
  const e = embeddedEigenvalueBound({ matrix: shifted, copies: 1 });
  return { lo: Math.min(addDown(shift, Math.min(0, divDown(e, b0))), quotient.hi), hi: quotient.hi };
}

/** Columns x_k with x_jᵀBx_k ≈ δ_jk and x_jᵀAx_k ≈ d_kδ_jk, d ascending. */
function approximateEigenbasis(a: Float64Array, b: Float64Array, n: number): Float64Array {
  const proof = choleskyProof(b, n, 0);
  if (!proof) throw notDefinite();
  const inverse = invertLower(proof.factor, n);
  const inverseTransposed = transposed(inverse, n);
  const c = plainProduct(plainProduct(inverse, a, n, n, n), inverseTransposed, n, n, n);
  for (let i = 0; i < n; i++) {
    for (let j = 0; j < i; j++) c[j * n + i] = c[i * n + j];
  }
  const x = plainProduct(inverseTransposed, jacobiEigen(c, n).vectors, n, n, n);
  if (!x.every(Number.isFinite)) throw notDefinite();
  return x;
}

/** XᵀMX for a real matrix X. */
function congruent(m: IntervalMatrix, x: Float64Array): IntervalMatrix {
  const right = pointMatrix(x, m.rows);
  const product = multiplyIntervalMatrix(transposeIntervalMatrix(right), multiplyIntervalMatrix(m, right));
  // The matrices meant are symmetric: intersect the triangles.
  return symmetricEmbedding({ ...product, re: product, im: scaleIntervalMatrix(product, point(0)) }, false).matrix;
}

function invertLower(l: Float64Array, n: number): Float64Array {
  const out = new Float64Array(n * n);
  for (let j = 0; j < n; j++) {
    out[j * n + j] = 1 / l[j * n + j];
    for (let i = j + 1; i < n; i++) {
      let sum = 0;
      for (let k = j; k < i; k++) sum -= l[i * n + k] * out[k * n + j];
      out[i * n + j] = sum / l[i * n + i];
    }
  }
  return out;
}

function transposed(a: Float64Array, n: number): Float64Array {
  return Float64Array.from(a, (_, k) => a[(k % n) * n + Math.floor(k / n)]);
}

function notDefinite(): ThalwegError {
  return new ThalwegError(
    'not-positive-definite',
    'expected a matrix B that can be proved positive definite, got one that is singular or indefinite to rounding',
  );
}
