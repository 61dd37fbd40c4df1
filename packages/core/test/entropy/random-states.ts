import { type BlockAlgebra, projectToAlgebra } from '../../src/algebra/block-algebra.js';
import { exponentialState, matrixOf } from '../../src/entropy/log-state.js';
import { type ComplexMatrix, fromEntries, hermitianPart, scale } from '../../src/linalg/complex-matrix.js';
import type { Random } from '../../src/random.js';

export function randomHermitianMatrix(n: number, random: Random): ComplexMatrix {
  return hermitianPart(fromEntries(n, n, () => [random.normal(), random.normal()]));
}

export function randomHermitian(algebra: BlockAlgebra, random: Random): ComplexMatrix {
  return projectToAlgebra(algebra, randomHermitianMatrix(algebra.size, random));
}

/** exp(s·G)/Tr for a Gaussian Hermitian G. */
export function randomState(algebra: BlockAlgebra, random: Random, spread = 1): ComplexMatrix {
  return matrixOf(exponentialState(algebra, scale(randomHermitian(algebra, random), spread)));
}
