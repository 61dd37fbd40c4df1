import { type BlockAlgebra, basisElement, toCoordinates } from '../algebra/block-algebra.js';
import { ThalwegError } from '../errors.js';
import { memoryText } from '../memory-text.js';
import type { ComplexMatrix } from '../linalg/complex-matrix.js';

/** Largest algebra dimension D for which D×D matrices are stored; 1024 is five qubits, 8 MiB a matrix. */
export const MAX_DENSE_DIMENSION = 1024;

/** Algebra dimension up to which D×D factorisations take well under a second; above it cheaper ways are tried first. */
export const QUICK_DENSE_DIMENSION = 256;

/** Throws `too-large` when D×D matrices of the algebra would not be stored. */
export function requireDenseDimension(algebra: BlockAlgebra, what: string): void {
  if (algebra.dimension <= MAX_DENSE_DIMENSION) return;
  throw new ThalwegError(
    'too-large',
    `expected an algebra of dimension at most ${MAX_DENSE_DIMENSION} for ${what}, got ${algebra.dimension} (a matrix would take ${memoryText(8 * algebra.dimension ** 2)}); ` +
      'give it by jumps (form "lindblad" or "balanced") instead',
    { details: { limit: MAX_DENSE_DIMENSION, dimension: algebra.dimension } },
  );
}

/** The D×D real matrix, in the orthonormal Hermitian basis, of a linear map that sends Hermitian elements to Hermitian ones. */
export function superoperatorOf(algebra: BlockAlgebra, map: (a: ComplexMatrix) => ComplexMatrix): Float64Array {
  const d = algebra.dimension;
  const out = new Float64Array(d * d);
  const column = new Float64Array(d);
  for (let l = 0; l < d; l++) {
    toCoordinates(algebra, map(basisElement(algebra, l)), column);
    for (let k = 0; k < d; k++) out[k * d + l] = column[k];
  }
  return out;
}
