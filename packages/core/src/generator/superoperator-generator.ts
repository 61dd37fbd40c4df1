import { type BlockAlgebra, basisElement, offBlockResidual } from '../algebra/block-algebra.js';
import { ThalwegError } from '../errors.js';
import { type ComplexMatrix, frobeniusNorm, hermiticityResidual, zeros } from '../linalg/complex-matrix.js';
import { type SparseMatrix } from '../linalg/sparse-matrix.js';
import { INPUT_TOLERANCE } from '../tolerances.js';
import type { Generator } from './generator.js';
import { type MatrixInput, squareSparse } from './matrix-input.js';
import { requireDenseDimension, superoperatorOf } from './superoperator-parts.js';

export interface SuperoperatorForm {
  readonly algebra: BlockAlgebra;
  /** N²×N² matrix on stacked N×N matrices. */
  readonly matrix: MatrixInput;
  /** Whether it acts on observables or on states. */
  readonly picture: 'heisenberg' | 'schrodinger';
  /** Entry (i,j) of a matrix sits at iN+j ("rows") or i+jN ("columns"). */
  readonly stacking: 'rows' | 'columns';
}

const POINTER = '/generator/matrix';

/**
 * L given as a matrix. Only its action on the algebra is used; that must send Hermitian elements to Hermitian elements of the
 * algebra. Whether it generates a Markov semigroup is not asked here. Throws `not-hermitian`, `algebra-not-preserved`,
 * `dimension-mismatch`, `not-finite`, `too-large`.
 */
export function superoperatorGenerator(form: SuperoperatorForm): Generator {
  const { algebra } = form;
  requireDenseDimension(algebra, 'a superoperator');
  const matrix = squareSparse(form.matrix, algebra.size ** 2, POINTER);
  const map = stackedMap(algebra.size, matrix, form.stacking);
  requireWellBehaved(algebra, map, matrix);
  const given = superoperatorOf(algebra, map);
  return {
    algebra,
    hamiltonian: null,
    jumps: [],
    superoperator: form.picture === 'schrodinger' ? transposed(given, algebra.dimension) : given,
    declaredState: null,
    origin: { kind: 'superoperator' },
  };
}

function stackedMap(
  n: number,
  matrix: SparseMatrix,
  stacking: 'rows' | 'columns',
): (a: ComplexMatrix) => ComplexMatrix {
  const place = stacking === 'rows' ? (k: number) => k : (k: number) => (k % n) * n + Math.floor(k / n);
  return (a) => {
    const out = zeros(n);
    for (let row = 0; row < n * n; row++) {
      const to = place(row);
      for (let s = matrix.rowStart[row]; s < matrix.rowStart[row + 1]; s++) {
        const from = place(matrix.colIndex[s]);
        out.re[to] += matrix.re[s] * a.re[from] - matrix.im[s] * a.im[from];
        out.im[to] += matrix.re[s] * a.im[from] + matrix.im[s] * a.re[from];
      }
    }
    return out;
  };
}

function requireWellBehaved(
  algebra: BlockAlgebra,
  map: (a: ComplexMatrix) => ComplexMatrix,
  matrix: SparseMatrix,
): void {
  let skew = 0;
  let off = 0;
  for (let k = 0; k < algebra.dimension; k++) {
    const image = map(basisElement(algebra, k));
    skew = Math.hypot(skew, hermiticityResidual(image));
    off = Math.max(off, offBlockResidual(algebra, image));
  }
  const size = frobeniusNorm({ rows: 1, cols: matrix.re.length, re: matrix.re, im: matrix.im });
  if (skew > INPUT_TOLERANCE * size) {
    throw new ThalwegError(
      'not-hermitian',
      `expected a superoperator that sends Hermitian matrices to Hermitian ones, got ‖L(A)−L(A)*‖ = ${skew.toPrecision(3)}; ` +
        'check "stacking" and "picture"',
      { pointer: POINTER, details: { residual: skew, scale: size } },
    );
  }
  if (off > INPUT_TOLERANCE * size) {
    throw new ThalwegError(
      'algebra-not-preserved',
      `expected a superoperator that maps the algebra with blocks [${algebra.blocks.join(', ')}] into itself, got an entry of ` +
        `modulus ${off.toPrecision(3)} outside the blocks`,
      { pointer: POINTER, details: { residual: off, scale: size } },
    );
  }
}

/** For a map that preserves Hermiticity, Tr ρL(A) = Tr L†(ρ)A makes L the transpose of L† in an orthonormal Hermitian basis. */
function transposed(a: Float64Array, d: number): Float64Array {
  const out = new Float64Array(d * d);
  for (let k = 0; k < d; k++) for (let l = 0; l < d; l++) out[k * d + l] = a[l * d + k];
  return out;
}
