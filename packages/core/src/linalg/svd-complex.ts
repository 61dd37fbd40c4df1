import { ThalwegError } from '../errors.js';
import { EPSILON, JACOBI_SWEEPS, SVD_FLUSH } from '../tolerances.js';
import {
  adjoint,
  conjugate,
  identity,
  maxAbs,
  multiply,
  scale,
  transpose,
  zeros,
  type ComplexMatrix,
} from './complex-matrix.js';
import { packedComplexQR, unitaryColumns, upperTriangleComplex } from './qr-complex.js';
import { completeOrthonormal } from './orthonormal-completion.js';
import { safeUnit } from './safe-unit.js';

/** A = u diag(s) v*: u is m × k and v is n × k with orthonormal columns, k = min(m, n), s descending and ≥ 0. */
export interface ComplexSVD {
  readonly u: ComplexMatrix;
  readonly s: Float64Array;
  readonly v: ComplexMatrix;
}

/**
 * Singular value decomposition by one-sided Jacobi rotations on the triangular factor of a pivoted QR (Drmač & Veselić,
 * SIAM J. Matrix Anal. Appl. 29 (2008)): small singular values are as accurate as the data allow; those below 1e-150 of the
 * largest come out as zero. Throws `not-finite`,
 * `no-convergence`.
 */
export function svdComplex(a: ComplexMatrix): ComplexSVD {
  if (a.rows < a.cols) {
    const { u, s, v } = svdComplex(adjoint(a));
    return { u: v, s, v: u };
  }
  const unit = Math.max(safeUnit(a.re, a.re.length), safeUnit(a.im, a.im.length));
  const factors = packedComplexQR(scale(a, 1 / unit), true);
  const n = a.cols;
  // R = V S U* for X = R* = U S V*; the rows of conj(R) are the columns of X.
  const x = flush(conjugate(upperTriangleComplex(factors)));
  const rotations = identity(n);
  orthogonaliseRows(x, rotations);
  const { order, s } = singularValues(x);
  const left = pickColumns(transpose(rotations), order);
  return {
    u: multiply(unitaryColumns(factors, 0, n), left),
    s: s.map((value) => value * unit),
    v: rightVectors(x, order, s, factors.pivots),
  };
}

/** Drops entries whose squares would underflow beside the largest: a backward error of 1e-150. */
function flush(x: ComplexMatrix): ComplexMatrix {
  const least = SVD_FLUSH * maxAbs(x);
  const keep = (value: number): number => (Math.abs(value) < least ? 0 : value);
  return { rows: x.rows, cols: x.cols, re: x.re.map(keep), im: x.im.map(keep) };
}

/** Rotates pairs of rows until all are orthogonal to rounding, applying the same rotations to the rows of `v`. */
function orthogonaliseRows(x: ComplexMatrix, v: ComplexMatrix): void {
  const n = x.rows;
  for (let sweep = 0; sweep < JACOBI_SWEEPS; sweep++) {
    let rotated = false;
    for (let p = 0; p < n - 1; p++) {
      for (let q = p + 1; q < n; q++) if (rotatePair(x, v, p, q)) rotated = true;
    }
    if (!rotated) return;
  }
  throw new ThalwegError(
    'no-convergence',
    `expected Jacobi rotations to converge within ${JACOBI_SWEEPS} sweeps at size ${n}`,
  );
}

function rotatePair(x: ComplexMatrix, v: ComplexMatrix, p: number, q: number): boolean {
  const { cols, re, im } = x;
  let alpha = 0;
  let beta = 0;
  let gr = 0;
  let gi = 0;
  for (let j = 0, a = p * cols, b = q * cols; j < cols; j++, a++, b++) {
    alpha += re[a] * re[a] + im[a] * im[a];
    beta += re[b] * re[b] + im[b] * im[b];
    gr += re[a] * re[b] + im[a] * im[b];
    gi += re[a] * im[b] - im[a] * re[b];
  }
  const gamma = Math.hypot(gr, gi);
  if (gamma <= EPSILON * Math.sqrt(cols) * Math.sqrt(alpha) * Math.sqrt(beta)) return false;
  const zeta = (beta - alpha) / (2 * gamma);
  const t = (zeta >= 0 ? 1 : -1) / (Math.abs(zeta) + Math.sqrt(1 + zeta * zeta));
  const c = 1 / Math.sqrt(1 + t * t);
  for (const m of [x, v]) rotateRows(m, p, q, c, c * t, gr / gamma, gi / gamma);
  return true;
}

/** (x_p, x_q) ← (c x_p − s w x_q, s x_p + c w x_q) with w the conjugate of the phase. */
function rotateRows(x: ComplexMatrix, p: number, q: number, c: number, s: number, cos: number, sin: number): void {
  const { cols, re, im } = x;
  for (let j = 0, a = p * cols, b = q * cols; j < cols; j++, a++, b++) {
    const br = re[b] * cos + im[b] * sin;
    const bi = im[b] * cos - re[b] * sin;
    const ar = re[a];
    const ai = im[a];
    re[a] = c * ar - s * br;
    im[a] = c * ai - s * bi;
    re[b] = s * ar + c * br;
    im[b] = s * ai + c * bi;
  }
}

function singularValues(x: ComplexMatrix): { order: number[]; s: Float64Array } {
  const norms = Array.from({ length: x.rows }, (_, i) => {
    let sum = 0;
    for (let p = i * x.cols; p < (i + 1) * x.cols; p++) sum += x.re[p] * x.re[p] + x.im[p] * x.im[p];
    return Math.sqrt(sum);
  });
  const order = norms.map((_, i) => i).sort((i, k) => norms[k] - norms[i]);
  return { order, s: Float64Array.from(order, (i) => norms[i]) };
}

function pickColumns(a: ComplexMatrix, order: readonly number[]): ComplexMatrix {
  const c = zeros(a.rows, order.length);
  for (let i = 0, k = 0; i < a.rows; i++) {
    for (const j of order) {
      c.re[k] = a.re[i * a.cols + j];
      c.im[k++] = a.im[i * a.cols + j];
    }
  }
  return c;
}

/** P U with U the normalised columns of X, completed to a unitary where a singular value is zero. */
function rightVectors(x: ComplexMatrix, order: readonly number[], s: Float64Array, pivots: Int32Array): ComplexMatrix {
  const n = x.cols;
  const v = zeros(n);
  let rank = 0;
  for (; rank < n && s[rank] > 0; rank++) {
    for (let i = 0; i < n; i++) {
      v.re[pivots[i] * n + rank] = x.re[order[rank] * n + i] / s[rank];
      v.im[pivots[i] * n + rank] = x.im[order[rank] * n + i] / s[rank];
    }
  }
  completeOrthonormal(v, rank);
  return v;
}
