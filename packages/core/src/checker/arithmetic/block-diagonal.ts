import { ThalwegError } from '../../errors.js';
import type { ComplexMatrix } from '../../linalg/complex-matrix.js';

/** Throws `dimension-mismatch` unless x is square of side Σ blocks and exactly zero outside the diagonal blocks. */
export function requireBlockDiagonal(blocks: readonly number[], x: ComplexMatrix, what: string): void {
  const owner = blocks.flatMap((size, b) => new Array<number>(size).fill(b));
  const n = owner.length;
  if (x.rows !== n || x.cols !== n) {
    throw new ThalwegError('dimension-mismatch', `expected ${what} to be ${n} × ${n}, got ${x.rows} × ${x.cols}`);
  }
  for (let i = 0; i < n; i++) {
    for (let j = 0; j < n; j++) {
      const k = i * n + j;
      if (owner[i] === owner[j] || (x.re[k] === 0 && x.im[k] === 0)) continue;
      throw new ThalwegError(
        'dimension-mismatch',
        `expected ${what} to vanish outside the blocks [${blocks.join(', ')}], got a non-zero entry (${i}, ${j})`,
      );
    }
  }
}
