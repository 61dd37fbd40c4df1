import { type BlockAlgebra, blockAlgebra } from '../algebra/block-algebra.js';
import { ThalwegError } from '../errors.js';
import { sparseFromTriplets } from '../linalg/sparse-matrix.js';
import type { Generator, Jump } from './generator.js';
import { requireFiniteNumber, requireSize } from './matrix-input.js';

export interface SchurForm {
  /** a_1, …, a_N, vectors of one length, units 1/√time. */
  readonly points: readonly (readonly number[])[];
  /** Of size N; [N] when left out. */
  readonly algebra?: BlockAlgebra;
}

/**
 * The generator of the Schur multipliers A_ij ↦ e^{−t‖a_i−a_j‖²} A_ij: jumps R_k = √2 diag(a^k), one for each coordinate, with
 * the points moved so that their mean is 0, which leaves L as it is. The maximally mixed state is invariant.
 * Throws `ragged-matrix`, `not-finite`, `dimension-mismatch`.
 */
export function schurGenerator(form: SchurForm): Generator {
  const { points } = form;
  const n = points.length;
  const algebra = form.algebra ?? blockAlgebra([n]);
  requireSize(algebra, n, `${n} points`);
  const width = points[0].length;
  points.forEach((point, i) => requirePoint(point, i, width));
  const jumps: Jump[] = [];
  for (let k = 0; k < width; k++) {
    const mean = points.reduce((sum, point) => sum + point[k], 0) / n;
    const entries = points.map((point, i) => [i, i, Math.SQRT2 * (point[k] - mean), 0] as const);
    jumps.push({ label: `a${k + 1}`, matrix: sparseFromTriplets(n, n, entries) });
  }
  return { algebra, hamiltonian: null, jumps, superoperator: null, declaredState: null, origin: { kind: 'schur' } };
}

function requirePoint(point: readonly number[], i: number, width: number): void {
  const pointer = `/generator/points/${i}`;
  if (point.length !== width) {
    throw new ThalwegError(
      'ragged-matrix',
      `expected ${width} coordinates of point ${i}, got ${point.length}; give every point as many`,
      {
        pointer,
      },
    );
  }
  point.forEach((x, k) => requireFiniteNumber(x, `${pointer}/${k}`, `coordinate ${k} of point ${i}`));
}
