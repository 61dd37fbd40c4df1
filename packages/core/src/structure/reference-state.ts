import { fromCoordinates, toCoordinates } from '../algebra/block-algebra.js';
import { blockEigen } from '../algebra/block-eigen.js';
import { ThalwegError } from '../errors.js';
import { applyGeneratorAdjoint, generatorMatrix } from '../generator/apply-generator.js';
import { densityMatrix } from '../generator/declared-state.js';
import { generatorNormBound } from '../generator/generator-norm.js';
import type { Generator } from '../generator/generator.js';
import { MAX_DENSE_DIMENSION, QUICK_DENSE_DIMENSION } from '../generator/superoperator-parts.js';
import { tensorAlgebra, tensorElement } from '../generator/tensor-algebra.js';
import {
  type ComplexMatrix,
  diagonal,
  frobeniusNorm,
  hermitianPart,
  identity,
  scale,
  trace,
} from '../linalg/complex-matrix.js';
import { EPSILON, FAITHFUL_TOLERANCE, INPUT_TOLERANCE, STATE_ROUNDING } from '../tolerances.js';
import { diagonalRates } from './diagonal-rates.js';
import { kernelPair, projectionFactor } from './kernel.js';
import { krylovLimit } from './krylov-limit.js';
import { limitDistribution } from './limit-distribution.js';

/** An invariant state with its eigenvectors. */
export interface ReferenceState {
  /** σ, N×N. */
  readonly sigma: ComplexMatrix;
  /** Eigenvalues; values[k] belongs to column k of `vectors`. */
  readonly values: Float64Array;
  /** Block-diagonal unitary; column k lies in block blockOf[k]. */
  readonly vectors: ComplexMatrix;
  /** Smallest eigenvalue. */
  readonly smallest: number;
  readonly faithful: boolean;
  /** ‖L†σ‖_F / (‖L‖·‖σ‖_F), with an upper bound for ‖L‖. */
  readonly residual: number;
  /** Given with the model, rather than computed. */
  readonly declared: boolean;
  /** Exactly diagonal with eigenvalues of full relative accuracy, so that small ones and their logarithms can be trusted. */
  readonly exact: boolean;
}

/**
 * The declared state, or else E†(1/N) = lim e^{tL†}(1/N). Throws `state-not-positive` or `state-not-invariant` for a declared state
 * that is none, `no-convergence` when the limit is not reached. L must be Hermiticity-preserving with L(1) = 0.
 */
export function referenceState(g: Generator): ReferenceState {
  const known = states.get(g);
  if (known) return known;
  const state = g.declaredState ? declaredState(g, g.declaredState) : computedState(g);
  states.set(g, state);
  return state;
}

const states = new WeakMap<Generator, ReferenceState>();

function declaredState(g: Generator, given: ComplexMatrix): ReferenceState {
  const sigma = densityMatrix(g.algebra, given);
  const state = describe(g, sigma, true, true);
  if (state.residual <= INPUT_TOLERANCE) return state;
  throw new ThalwegError(
    'state-not-invariant',
    `expected the declared state to be invariant, got ‖L†σ‖ = ${state.residual.toPrecision(3)} ‖L‖‖σ‖; leave "state" out to have an invariant state computed`,
    { pointer: '/state', details: { residual: state.residual } },
  );
}

function computedState(g: Generator): ReferenceState {
  const { algebra } = g;
  const n = algebra.size;
  const mixed = scale(identity(n), 1 / n);
  if (invarianceResidual(g, mixed) <= STATE_ROUNDING * n * EPSILON) return describe(g, mixed, false, true);
  if (g.origin.kind === 'tensor') {
    const states = g.origin.factors.map(referenceState);
    const tensor = tensorAlgebra(g.origin.factors.map((f) => f.algebra));
    return describe(
      g,
      tensorElement(
        tensor,
        states.map((s) => s.sigma),
      ),
      false,
      states.every((s) => s.exact),
    );
  }
  const rates = diagonalRates(g);
  if (rates) return describe(g, diagonal(limitDistribution(rates, n)), false, true);
  const sigma = hermitianPart(limitOf(g, mixed));
  return describe(g, scale(sigma, 1 / trace(sigma).re), false, false);
}

/** E†(ρ): by null vectors where that is quick, or where a Krylov space fails because rates differ too much. */
function limitOf(g: Generator, rho: ComplexMatrix): ComplexMatrix {
  const d = g.algebra.dimension;
  if (d <= QUICK_DENSE_DIMENSION) return limitFromKernel(g, rho);
  try {
    return krylovLimit(g, rho);
  } catch (error) {
    if (!(error instanceof ThalwegError) || error.code !== 'no-convergence' || d > MAX_DENSE_DIMENSION) throw error;
    return limitFromKernel(g, rho);
  }
}

/** E†(ρ) = Yᵀ-part of X(YᵀX)⁻¹Yᵀ transposed: the coordinates of ρ against X, spread over the left null vectors. */
function limitFromKernel(g: Generator, rho: ComplexMatrix): ComplexMatrix {
  const d = g.algebra.dimension;
  const { right, left } = kernelPair(generatorMatrix(g), d);
  const factor = projectionFactor(right, left);
  const x = toCoordinates(g.algebra, rho);
  const out = new Float64Array(d);
  right.forEach((r, i) => {
    let weight = 0;
    for (let k = 0; k < d; k++) weight += r[k] * x[k];
    for (let k = 0; k < d; k++) out[k] += weight * factor[i * d + k];
  });
  return fromCoordinates(g.algebra, out);
}

function describe(g: Generator, sigma: ComplexMatrix, declared: boolean, accurate: boolean): ReferenceState {
  const { values, vectors, exact: isDiagonal } = blockEigen(g.algebra, sigma);
  const exact = accurate && isDiagonal;
  const smallest = values.reduce((a, b) => Math.min(a, b), Infinity);
  return {
    sigma,
    values,
    vectors,
    smallest,
    faithful: exact ? smallest > 0 : smallest > FAITHFUL_TOLERANCE,
    residual: invarianceResidual(g, sigma),
    declared,
    exact,
  };
}

function invarianceResidual(g: Generator, sigma: ComplexMatrix): number {
  const bound = generatorNormBound(g);
  return bound > 0 ? frobeniusNorm(applyGeneratorAdjoint(g, sigma)) / (bound * frobeniusNorm(sigma)) : 0;
}
