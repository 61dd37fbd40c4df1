import {
  type ComplexMatrix,
  adjoint,
  diagonal,
  fromEntries,
  fromRows,
  hermitianPart,
  kronecker,
  multiply,
  scale,
} from '../../../src/linalg/complex-matrix.js';
import type { Random } from '../../../src/random.js';

/** The discrete Fourier transform on four points, entries ±1, ±i. */
export const FOURIER4 = fromEntries(4, 4, (i, j) => [[1, 0, -1, 0][(i * j) % 4], [0, 1, 0, -1][(i * j) % 4]]);
const HADAMARD = fromRows([
  [1, 1],
  [1, -1],
]);

/** An exact Hermitian matrix of doubles with the given whole eigenvalues: n⁻¹F diag(d) F^* with entries ±1, ±i in F. */
export function withSpectrum(d: readonly number[], real: boolean): ComplexMatrix {
  let f = real ? kronecker(HADAMARD, HADAMARD) : FOURIER4;
  while (f.rows < d.length) f = kronecker(f, HADAMARD);
  return scale(multiply(multiply(f, diagonal(d)), adjoint(f)), 1 / f.rows);
}

export function randomHermitian(random: Random, n: number, real: boolean): ComplexMatrix {
  return hermitianPart(fromEntries(n, n, () => [random.normal(), real ? 0 : random.normal()]));
}
