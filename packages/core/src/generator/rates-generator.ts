import { blockAlgebra } from '../algebra/block-algebra.js';
import { ThalwegError } from '../errors.js';
import { sparseFromTriplets } from '../linalg/sparse-matrix.js';
import { INPUT_TOLERANCE } from '../tolerances.js';
import type { Generator, Jump } from './generator.js';

/**
 * The generator of a Markov chain on N points, (Lf)(x) = Σ_y Q_xy (f(y) − f(x)), on the algebra [1,…,1]; jumps √Q_xy e_yx.
 * `rates` is N×N, row x, column y, rate x→y; diagonal entries are 0 or minus the sum of the others in the row.
 * Reversibility is not required here. Throws `ragged-matrix`, `not-finite`, `negative-rate`, `row-sum-mismatch`.
 */
export function ratesGenerator(rates: readonly (readonly number[])[]): Generator {
  const n = rates.length;
  const algebra = blockAlgebra(new Array<number>(n).fill(1));
  const jumps: Jump[] = [];
  for (let x = 0; x < n; x++) {
    requireRow(rates[x], x, n);
    for (let y = 0; y < n; y++) {
      if (x === y || rates[x][y] <= 0) continue;
      jumps.push({ label: `${x}→${y}`, matrix: sparseFromTriplets(n, n, [[y, x, Math.sqrt(rates[x][y]), 0]]) });
    }
  }
  return { algebra, hamiltonian: null, jumps, superoperator: null, declaredState: null, origin: { kind: 'rates' } };
}

function requireRow(row: readonly number[], x: number, n: number): void {
  const pointer = `/generator/rates/${x}`;
  if (row.length !== n) {
    throw new ThalwegError(
      'ragged-matrix',
      `expected ${n} rates in row ${x}, got ${row.length}; make the matrix square`,
      { pointer },
    );
  }
  let leaving = 0;
  for (let y = 0; y < n; y++) {
    if (!Number.isFinite(row[y])) {
      throw new ThalwegError('not-finite', `expected a finite rate from ${x} to ${y}, got ${row[y]}; correct it`, {
        pointer: `${pointer}/${y}`,
      });
    }
    if (x === y) continue;
    if (row[y] < 0) {
      throw new ThalwegError(
        'negative-rate',
        `expected a rate of at least 0 from ${x} to ${y}, got ${row[y]}; change its sign`,
        {
          pointer: `${pointer}/${y}`,
          details: { from: x, to: y, value: row[y] },
        },
      );
    }
    leaving += row[y];
  }
  if (Math.min(Math.abs(row[x]), Math.abs(row[x] + leaving)) > INPUT_TOLERANCE * leaving) {
    throw new ThalwegError(
      'row-sum-mismatch',
      `expected the diagonal entry of row ${x} to be 0 or minus the sum of the others, ${-leaving}, got ${row[x]}; write 0 to have it filled in`,
      { pointer: `${pointer}/${x}`, details: { expected: -leaving, got: row[x] } },
    );
  }
}
