import type { BlockAlgebra } from '../algebra/block-algebra.js';
import { blockEigen } from '../algebra/block-eigen.js';
import { ThalwegError } from '../errors.js';
import { applyGenerator, applyGeneratorAdjoint, generatorMatrix } from '../generator/apply-generator.js';
import type { Generator } from '../generator/generator.js';
import { type ComplexMatrix, identity, kronecker } from '../linalg/complex-matrix.js';
import { hermitianEigen } from '../linalg/hermitian-eigen.js';
import { type SparseMatrix, sparseFromDense, sparseKronecker } from '../linalg/sparse-matrix.js';
import { fromFrame } from '../metric/state-frame.js';
import type { ReferenceState } from '../structure/reference-state.js';
import type { Structure } from '../structure/structure.js';
import {
  AMPLIFIED_ACTION_LIMIT,
  ENTROPY_FLOOR,
  ENTROPY_FLOOR_PLAIN,
  EPSILON,
  MATRIX_ACTION_LIMIT,
} from '../tolerances.js';
import { amplifiedAlgebra, amplifyMap, amplifyOperator, ancillaTrace } from './amplify.js';
import { type LogState, stateOfLogs } from './log-state.js';
import { hermitianAction, matrixAction, matrixOfMap } from './matrix-action.js';

/** What entropies of states of M ⊗ M_k under L ⊗ id_k need, prepared once. */
export interface EntropyModel {
  /** M ⊗ M_k. */
  readonly algebra: BlockAlgebra;
  /** k ≥ 1. */
  readonly amplification: number;
  /** V_j ⊗ 1 of the canonical form, one of each adjoint pair; null without GNS symmetry. */
  readonly jumps: readonly EntropyJump[] | null;
  /** log σ ⊗ 1. */
  readonly logSigma: ComplexMatrix;
  /** States with D(ρ‖E†ρ) below this are not evaluated: the quotient would be rounding. */
  readonly entropyFloor: number;
  /** (L ⊗ id)(A) for Hermitian A. */
  readonly apply: (a: ComplexMatrix) => ComplexMatrix;
  /** (L† ⊗ id)(ρ) for Hermitian ρ. */
  readonly applyAdjoint: (rho: ComplexMatrix) => ComplexMatrix;
  /** E†ρ in log form; eigenvalues below rounding are raised to it, which only lowers D(ρ‖E†ρ). */
  readonly reference: (rho: LogState) => LogState;
}

export interface EntropyJump {
  readonly matrix: SparseMatrix;
  /** ω_j. */
  readonly frequency: number;
  /** 2 for a pair V_j ≠ V_j*, else 1. */
  readonly weight: number;
}

/**
 * Prepare entropies for the amplification by M_k. Throws `not-supported` without a faithful invariant state, to which
 * every entropy refers, and `too-large` where its fixed points were not found.
 */
export function entropyModel(structure: Structure, amplification = 1): EntropyModel {
  const known = models.get(structure)?.get(amplification);
  if (known) return known;
  const { generator, algebra: base, state, fixedPoints, canonical } = structure;
  if (state?.faithful && !fixedPoints) {
    throw new ThalwegError(
      'too-large',
      `expected an algebra whose fixed points could be found, got dimension ${base.dimension}; entropies refer to them`,
    );
  }
  if (!state?.faithful || !fixedPoints) {
    throw new ThalwegError(
      'not-supported',
      'expected a generator with a faithful invariant state, got one without; entropy constants are not defined for it',
    );
  }
  const k = amplification;
  const algebra = amplifiedAlgebra(base, k);
  const model: EntropyModel = {
    algebra,
    amplification: k,
    jumps: canonical ? pairedJumps(canonical.jumps, k) : null,
    logSigma: amplifyOperator(fromFrame({ lambda: state.values.map(Math.log), u: state.vectors }), k),
    entropyFloor: canonical ? ENTROPY_FLOOR : ENTROPY_FLOOR_PLAIN,
    ...actions(generator, algebra, k),
    reference: fixedPoints.primitive
      ? productReference(base, state, k)
      : conditionedReference(base, fixedPoints.expectation, k),
  };
  if (!models.has(structure)) models.set(structure, new Map());
  models.get(structure)?.set(k, model);
  return model;
}

const models = new WeakMap<Structure, Map<number, EntropyModel>>();

/** L ⊗ id and L† ⊗ id on Hermitian matrices: by a real matrix where it is small, which is quicker than many jumps. */
function actions(
  generator: Generator,
  amplified: BlockAlgebra,
  k: number,
): Pick<EntropyModel, 'apply' | 'applyAdjoint'> {
  const { algebra } = generator;
  const n = algebra.size;
  if (algebra.dimension > MATRIX_ACTION_LIMIT) {
    return {
      apply: (a) => amplifyMap((x) => applyGenerator(generator, x), n, k, a),
      applyAdjoint: (rho) => amplifyMap((x) => applyGeneratorAdjoint(generator, x), n, k, rho),
    };
  }
  const l = generatorMatrix(generator);
  if (k === 1) return { apply: hermitianAction(algebra, l, false), applyAdjoint: hermitianAction(algebra, l, true) };
  const heisenberg = matrixAction(algebra, l, false);
  const schroedinger = matrixAction(algebra, l, true);
  const apply = (a: ComplexMatrix): ComplexMatrix => amplifyMap(heisenberg, n, k, a);
  if (amplified.dimension > AMPLIFIED_ACTION_LIMIT)
    return { apply, applyAdjoint: (rho) => amplifyMap(schroedinger, n, k, rho) };
  const whole = matrixOfMap(amplified, apply);
  return { apply: hermitianAction(amplified, whole, false), applyAdjoint: hermitianAction(amplified, whole, true) };
}

function pairedJumps(
  jumps: readonly { readonly matrix: ComplexMatrix; readonly frequency: number; readonly partner: number }[],
  k: number,
): EntropyJump[] {
  const ancilla = sparseFromDense(identity(k));
  return jumps.flatMap(({ matrix, frequency, partner }, j) => {
    if (partner < j) return [];
    const v = sparseFromDense(matrix);
    return [{ matrix: k === 1 ? v : sparseKronecker(v, ancilla), frequency, weight: partner === j ? 1 : 2 }];
  });
}

/** E†ρ = σ ⊗ Tr_M ρ, the primitive case. */
function productReference(base: BlockAlgebra, state: ReferenceState, k: number): (rho: LogState) => LogState {
  const algebra = amplifiedAlgebra(base, k);
  const logSigma = state.values.map(Math.log);
  const fixed = stateOfLogs(algebra, logSigma, state.vectors);
  if (k === 1) return () => fixed;
  return (rho) => {
    const { values, vectors } = hermitianEigen(ancillaTrace(fromFrame(rho), base.size, k));
    const logAncilla = values.map((x) => Math.log(Math.max(x, k * EPSILON)));
    const logs = new Float64Array(algebra.size);
    for (let i = 0; i < base.size; i++) {
      for (let c = 0; c < k; c++) logs[i * k + c] = logSigma[i] + logAncilla[c];
    }
    return stateOfLogs(algebra, logs, kronecker(state.vectors, vectors));
  };
}

/** E†ρ from the matrix of E on observables, D×D in the Hermitian basis. */
function conditionedReference(base: BlockAlgebra, expectation: Float64Array, k: number): (rho: LogState) => LogState {
  const algebra = amplifiedAlgebra(base, k);
  const onStates = matrixAction(base, expectation, true);
  return (rho) => {
    const { values, vectors } = blockEigen(algebra, amplifyMap(onStates, base.size, k, fromFrame(rho)));
    const logs = values.map((x) => Math.log(Math.max(x, algebra.size * EPSILON)));
    return stateOfLogs(algebra, logs, vectors);
  };
}
