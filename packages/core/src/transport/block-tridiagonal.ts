import { choleskyRealInto } from '../linalg/cholesky-real.js';

/** A symmetric block tridiagonal matrix: n diagonal d×d blocks, and the n − 1 blocks (k+1, k) below them, row-major. */
export interface BlockTridiagonal {
  readonly diagonal: Float64Array[];
  readonly below: Float64Array[];
}

/**
 * x with T x = b for positive definite T, by block Cholesky in O(n d³); null when T is not positive definite. `b` holds one
 * vector of length d a block and is not changed.
 */
export function solveBlockTridiagonal(
  { diagonal, below }: BlockTridiagonal,
  b: readonly Float64Array[],
  d: number,
): Float64Array[] | null {
  const n = diagonal.length;
  const x = b.map((part) => part.slice());
  const factors: Float64Array[] = [];
  const couplings: Float64Array[] = [];
  for (let k = 0; k < n; k++) {
    const block = diagonal[k].slice();
    if (k > 0) {
      // W = L⁻¹ Cᵀ for C = T_{k,k−1}; the Schur complement is T_kk − WᵀW.
      const w = solvedTransposed(factors[k - 1], below[k - 1], d);
      subtractSquare(block, w, d);
      couplings.push(w);
      const z = x[k - 1];
      for (let i = 0; i < d; i++) for (let j = 0; j < d; j++) x[k][j] -= w[i * d + j] * z[i];
    }
    if (choleskyRealInto(block, d, block) >= 0) return null;
    factors.push(block);
    solveLower(block, d, x[k]);
  }
  for (let k = n - 1; k >= 0; k--) {
    if (k < n - 1) {
      const w = couplings[k];
      for (let i = 0; i < d; i++) for (let j = 0; j < d; j++) x[k][i] -= w[i * d + j] * x[k + 1][j];
    }
    solveUpper(factors[k], d, x[k]);
  }
  return x;
}

/** L⁻¹ Cᵀ. */
function solvedTransposed(l: Float64Array, c: Float64Array, d: number): Float64Array {
  const w = new Float64Array(d * d);
  for (let i = 0; i < d; i++) {
    for (let j = 0; j < d; j++) w[i * d + j] = c[j * d + i];
    for (let k = 0; k < i; k++) {
      const x = l[i * d + k];
      for (let j = 0; j < d; j++) w[i * d + j] -= x * w[k * d + j];
    }
    for (let j = 0; j < d; j++) w[i * d + j] /= l[i * d + i];
  }
  return w;
}

/** block −= WᵀW. */
function subtractSquare(block: Float64Array, w: Float64Array, d: number): void {
  for (let k = 0; k < d; k++) {
    for (let i = 0; i < d; i++) {
      const x = w[k * d + i];
      if (x === 0) continue;
      for (let j = 0; j < d; j++) block[i * d + j] -= x * w[k * d + j];
    }
  }
}

function solveLower(l: Float64Array, d: number, x: Float64Array): void {
  for (let i = 0; i < d; i++) {
    for (let k = 0; k < i; k++) x[i] -= l[i * d + k] * x[k];
    x[i] /= l[i * d + i];
  }
}

function solveUpper(l: Float64Array, d: number, x: Float64Array): void {
  for (let i = d - 1; i >= 0; i--) {
    x[i] /= l[i * d + i];
    for (let k = 0; k < i; k++) x[k] -= l[i * d + k] * x[i];
  }
}
