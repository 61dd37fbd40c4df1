import { ThalwegError } from '../errors.js';
import { matrixAction } from '../entropy/matrix-action.js';
import { MAX_DENSE_DIMENSION } from '../generator/superoperator-parts.js';
import { type ComplexMatrix, hermitianPart, scale, trace } from '../linalg/complex-matrix.js';
import type { ReferenceState } from '../structure/reference-state.js';
import { krylovLimit } from '../structure/krylov-limit.js';
import type { Structure } from '../structure/structure.js';

/** Where the flow ends: ρ ↦ E†ρ, which is σ Tr ρ for a primitive generator. N×N Hermitian to N×N Hermitian. */
export interface FlowLimit {
  /** σ, faithful. */
  readonly state: ReferenceState;
  readonly primitive: boolean;
  readonly of: (rho: ComplexMatrix) => ComplexMatrix;
}

/**
 * The limit of the flow of a structure. Throws `not-supported` without a faithful invariant state, to which entropies refer,
 * and `too-large` where the fixed points were not found.
 */
export function flowLimit({ generator, algebra, state, fixedPoints }: Structure): FlowLimit {
  if (!state?.faithful) {
    throw new ThalwegError(
      'not-supported',
      'expected a generator with a faithful invariant state, got one without; relative entropy to the limit would be infinite',
    );
  }
  if (!fixedPoints) {
    throw new ThalwegError(
      'too-large',
      `expected an algebra whose fixed points could be found, got dimension ${algebra.dimension}; the flow is shown relative to its limit among them`,
    );
  }
  const { primitive } = fixedPoints;
  if (primitive) return { state, primitive, of: (rho) => scale(state.sigma, trace(rho).re) };
  if (algebra.dimension > MAX_DENSE_DIMENSION) return { state, primitive, of: (rho) => krylovLimit(generator, rho) };
  const project = matrixAction(algebra, fixedPoints.expectation, true);
  return { state, primitive, of: (rho) => hermitianPart(project(rho)) };
}
