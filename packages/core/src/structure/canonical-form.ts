import type { BlockAlgebra } from '../algebra/block-algebra.js';
import { ThalwegError } from '../errors.js';
import type { Generator } from '../generator/generator.js';
import { MAX_DENSE_DIMENSION } from '../generator/superoperator-parts.js';
import type { ComplexMatrix } from '../linalg/complex-matrix.js';
import { type SparseMatrix, denseFromSparse } from '../linalg/sparse-matrix.js';
import { canonicalResidual } from './canonical-residual.js';
import { extractJumps } from './extract-jumps.js';
import { givenJumps } from './given-jumps.js';
import type { ReferenceState } from './reference-state.js';
import { symmetryTolerance } from './symmetry.js';

/** One V_j of the canonical form. */
export interface CanonicalJump {
  readonly label: string;
  /** V_j, N×N, in the basis of the document, inside one corner (block × block). A new matrix at every reading. */
  readonly matrix: ComplexMatrix;
  /** The same, stored. */
  readonly sparse: SparseMatrix;
  /** ω_j, dimensionless: σV_jσ⁻¹ = e^{−ω_j}V_j. */
  readonly frequency: number;
  /** Index of V_j*, which is j itself when V_j is self-adjoint. */
  readonly partner: number;
  /** ‖V_j‖_F, units 1/√time. */
  readonly norm: number;
}

/**
 * L(A) = Σ_j e^{−ω_j/2}(2V_j*AV_j − {V_j*V_j,A}) with {V_j} closed under adjoints, traceless in each block and orthogonal
 * (Alicki 1976; Carlen & Maas, J. Funct. Anal. 273 (2017), Theorem 3.1).
 */
export interface CanonicalForm {
  readonly algebra: BlockAlgebra;
  readonly state: ReferenceState;
  readonly jumps: readonly CanonicalJump[];
  /** ‖L − L rebuilt from the jumps‖/‖L‖, over the algebra, or on random observables where that is large. */
  readonly residual: number;
}

/**
 * The canonical form of a GNS-symmetric generator. Jumps that are already canonical are kept with their labels, split into
 * corners; otherwise the jumps are extracted by diagonalising the Kossakowski matrix frequency by frequency.
 * Throws `not-symmetric` when the rebuilt generator misses L by more than `symmetryTolerance`, `not-completely-positive` when an
 * eigenvalue is negative, `too-large` when jumps would have to be extracted on an algebra too large for it.
 */
export function canonicalForm(g: Generator, state: ReferenceState): CanonicalForm {
  const { algebra } = g;
  const tolerance = symmetryTolerance(state);
  const given = givenJumps(g, state);
  if (given) {
    const residual = canonicalResidual(g, state, given);
    if (residual <= tolerance) return { algebra, state, jumps: given.map(withMatrix), residual };
  }
  if (algebra.dimension > MAX_DENSE_DIMENSION) {
    throw new ThalwegError(
      'too-large',
      `expected jumps in canonical form on an algebra of dimension ${algebra.dimension} (above ${MAX_DENSE_DIMENSION} none are extracted), ` +
        'got others; give modular, traceless, orthogonal jumps closed under adjoints',
    );
  }
  const extracted = extractJumps(g, state);
  const residual = canonicalResidual(g, state, extracted);
  if (residual <= tolerance) return { algebra, state, jumps: extracted.map(withMatrix), residual };
  throw new ThalwegError(
    'not-symmetric',
    `expected a GNS-symmetric generator, got one that its canonical jumps rebuild only to ${residual.toPrecision(3)} of its size`,
    { details: { residual } },
  );
}

/** A canonical jump before its dense matrix is offered. */
export type StoredJump = Omit<CanonicalJump, 'matrix'>;

/** Densely stored jumps of a chain of hundreds of points would not fit into memory together, so each is made when read. */
function withMatrix(jump: StoredJump): CanonicalJump {
  return {
    ...jump,
    get matrix() {
      return denseFromSparse(jump.sparse);
    },
  };
}
