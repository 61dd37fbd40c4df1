import { type BlockAlgebra, basisElement, fromCoordinates, toCoordinates } from '../algebra/block-algebra.js';
import { type ComplexMatrix, addScaledInto } from '../linalg/complex-matrix.js';

/**
 * The complex-linear map of the algebra with real D×D matrix m (row-major), or its transpose, in the orthonormal Hermitian
 * basis; on Hermitian matrices one real product.
 */
export function matrixAction(
  algebra: BlockAlgebra,
  m: Float64Array,
  transposed: boolean,
): (a: ComplexMatrix) => ComplexMatrix {
  const times = transposed ? transposedTimes : plainTimes;
  return (a) => {
    const out = fromCoordinates(algebra, times(m, toCoordinates(algebra, a)));
    const antiHermitian = toCoordinates(algebra, { rows: a.rows, cols: a.cols, re: a.im, im: a.re.map((x) => -x) });
    if (antiHermitian.some((x) => x !== 0)) {
      addScaledInto(out, fromCoordinates(algebra, times(m, antiHermitian)), 0, 1);
    }
    return out;
  };
}

/** The same on Hermitian matrices alone. */
export function hermitianAction(
  algebra: BlockAlgebra,
  m: Float64Array,
  transposed: boolean,
): (a: ComplexMatrix) => ComplexMatrix {
  const times = transposed ? transposedTimes : plainTimes;
  return (a) => fromCoordinates(algebra, times(m, toCoordinates(algebra, a)));
}

/** The real D×D matrix of a map of Hermitian elements, in the orthonormal Hermitian basis. */
export function matrixOfMap(algebra: BlockAlgebra, map: (a: ComplexMatrix) => ComplexMatrix): Float64Array {
  const d = algebra.dimension;
  const out = new Float64Array(d * d);
  for (let q = 0; q < d; q++) {
    const column = toCoordinates(algebra, map(basisElement(algebra, q)));
    for (let p = 0; p < d; p++) out[p * d + q] = column[p];
  }
  return out;
}

function plainTimes(m: Float64Array, x: Float64Array): Float64Array {
  const d = x.length;
  const y = new Float64Array(d);
  for (let p = 0; p < d; p++) {
    let sum = 0;
    for (let q = 0, k = p * d; q < d; q++, k++) sum += m[k] * x[q];
    y[p] = sum;
  }
  return y;
}

function transposedTimes(m: Float64Array, x: Float64Array): Float64Array {
  const d = x.length;
  const y = new Float64Array(d);
  for (let p = 0; p < d; p++) {
    const xp = x[p];
    for (let q = 0, k = p * d; q < d; q++, k++) y[q] += m[k] * xp;
  }
  return y;
}
