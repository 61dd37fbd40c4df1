import { ThalwegError } from '../../errors.js';
import { type ComplexIntervalMatrix, type IntervalMatrix, intervalZeros } from './interval-matrix.js';

/** A real symmetric interval matrix with the spectrum of a Hermitian one, each eigenvalue `copies` times. */
export interface SymmetricEmbedding {
  readonly matrix: IntervalMatrix;
  readonly copies: 1 | 2;
}

/**
 * The Hermitian matrices in A as real symmetric ones: the real part alone when every imaginary part is zero (unless
 * `doubled`), else [[Re, −Im], [Im, Re]]. Entries (i,j) and (j,i) are intersected. Throws `dimension-mismatch` for a matrix
 * that is not square and `not-hermitian` when A contains no Hermitian matrix.
 */
export function symmetricEmbedding(a: ComplexIntervalMatrix, doubled = !isReal(a)): SymmetricEmbedding {
  const n = a.rows;
  if (a.cols !== n) {
    throw new ThalwegError('dimension-mismatch', `expected a square matrix, got ${n} × ${a.cols}`);
  }
  const m = doubled ? 2 * n : n;
  const matrix = intervalZeros(m);
  const put = (i: number, j: number, lo: number, hi: number): void => {
    matrix.lo[i * m + j] = lo;
    matrix.hi[i * m + j] = hi;
    matrix.lo[j * m + i] = lo;
    matrix.hi[j * m + i] = hi;
  };
  for (let i = 0; i < n; i++) {
    for (let j = 0; j <= i; j++) {
      const p = i * n + j;
      const q = j * n + i;
      const lo = Math.max(a.re.lo[p], a.re.lo[q]);
      const hi = Math.min(a.re.hi[p], a.re.hi[q]);
      let low = Math.max(a.im.lo[p], -a.im.hi[q]);
      let high = Math.min(a.im.hi[p], -a.im.lo[q]);
      if (!(lo <= hi && low <= high)) throw notHermitian(i, j);
      if (i === j) low = high = 0;
      put(i, j, lo, hi);
      if (!doubled) continue;
      put(n + i, n + j, lo, hi);
      put(n + i, j, low, high);
      if (i !== j) put(n + j, i, 0 - high, 0 - low);
    }
  }
  return { matrix, copies: doubled ? 2 : 1 };
}

/** True when every imaginary part is exactly zero. */
export function isReal(a: ComplexIntervalMatrix): boolean {
  return a.im.lo.every((y) => y === 0) && a.im.hi.every((y) => y === 0);
}

function notHermitian(i: number, j: number): ThalwegError {
  return new ThalwegError(
    'not-hermitian',
    `expected a matrix that can be Hermitian, got entries (${i}, ${j}) and (${j}, ${i}) that are not adjoint`,
  );
}
