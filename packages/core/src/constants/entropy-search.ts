import { fromCoordinates, toCoordinates } from '../algebra/block-algebra.js';
import type { EntropyModel } from '../entropy/entropy-model.js';
import { type LogState, exponentialState, matrixOf, stateOfLogs } from '../entropy/log-state.js';
import { ThalwegError } from '../errors.js';
import { type ComplexMatrix, identity } from '../linalg/complex-matrix.js';
import { type BfgsOptions, type BfgsReason, minimiseBfgs } from '../search/bfgs.js';
import { SEARCH_NEARNESS, WITNESS_FLOORS } from '../tolerances.js';
import type { EntropyQuotient } from './mlsi-quotient.js';

/** Where one run of a search for an entropy constant begins: plain data, for any thread. */
export interface EntropyStart {
  readonly constant: 'mlsi' | 'clsi' | 'lsi';
  /** k of M ⊗ M_k. */
  readonly amplification: number;
  /** Only eigenvalues move, in the given basis: the generator is unitarily covariant, or the algebra commutative. */
  readonly diagonal: boolean;
  /** What kind of start it is. */
  readonly label: string;
  /** H of ρ = exp(H)/Tr exp(H): coordinates in the Hermitian basis of M ⊗ M_k, or the diagonal when `diagonal`. */
  readonly x: readonly number[];
}

/** Outcome of one start; plain data. */
export interface EntropyResult extends EntropyQuotient {
  readonly constant: EntropyStart['constant'];
  readonly label: string;
  readonly amplification: number;
  /** Density matrix of M ⊗ M_k at which `value` was evaluated afresh. */
  readonly state: ComplexMatrix;
  readonly evaluations: number;
  readonly reason: BfgsReason;
}

/** A quotient at one state. */
export interface EntropyEvaluation {
  readonly value: number;
  /** D(ρ‖E†ρ). */
  readonly entropy: number;
  /** Derivative in H, ρ = exp(H)/Tr exp(H). */
  readonly gradient: () => ComplexMatrix;
}

/** What tells the entropy constants apart in a search. */
export interface EntropyQuotientProblem {
  readonly model: EntropyModel;
  /** Null where the state is too near its projection. */
  readonly evaluate: (state: LogState) => EntropyEvaluation | null;
  /** Plain re-evaluation at a matrix; throws where it cannot be resolved. */
  readonly at: (rho: ComplexMatrix) => EntropyQuotient;
}

/** BFGS from one start, then the best state that a matrix of doubles can hold; null when no state could be evaluated. */
export function runEntropyStart(
  problem: EntropyQuotientProblem,
  start: EntropyStart,
  options: BfgsOptions = {},
): EntropyResult | null {
  const { algebra } = problem.model;
  const stateAt = (x: Float64Array): LogState =>
    start.diagonal
      ? stateOfLogs(algebra, x, identity(algebra.size))
      : exponentialState(algebra, fromCoordinates(algebra, x));
  let lowest = Infinity;
  let entropyAtLowest = Infinity;
  const x0 = Float64Array.from(start.x);
  const first = problem.evaluate(stateAt(x0));
  if (!first) return null;
  // In units of the first value, so that the tolerances of the search do not depend on the unit of time.
  const unit = first.value > 0 ? first.value : 1;
  const objective = (x: Float64Array, gradient: Float64Array): number => {
    const found = problem.evaluate(stateAt(x));
    if (!found) return Infinity;
    if (found.value < lowest) [lowest, entropyAtLowest] = [found.value, found.entropy];
    const h = found.gradient();
    if (start.diagonal) for (let a = 0; a < x.length; a++) gradient[a] = h.re[a * x.length + a];
    else toCoordinates(algebra, h, gradient);
    for (let k = 0; k < gradient.length; k++) gradient[k] /= unit;
    return found.value / unit;
  };
  const found = minimiseBfgs(objective, x0, {
    maxIterations: 400,
    valueTolerance: 1e-12,
    ...options,
    stop: () => entropyAtLowest < SEARCH_NEARNESS || (options.stop?.() ?? false),
  });
  const witness = bestMatrix(problem, stateAt(found.x));
  if (!witness) return null;
  const { constant, label, amplification } = start;
  return { constant, label, amplification, ...witness, evaluations: found.evaluations, reason: found.reason };
}

/**
 * The least result, value and margin together; of equals the earliest in the list, so that the order in which tasks were
 * handed out decides and not the order in which they ended.
 */
export function bestOf(results: readonly (EntropyResult | null)[]): EntropyResult | null {
  let best: EntropyResult | null = null;
  for (const result of results) {
    if (result && (!best || result.value + result.margin < best.value + best.margin)) best = result;
  }
  return best;
}

/** Raise eigenvalues to several floors and keep the matrix with the lowest value and margin: tiny ones cost accuracy. */
function bestMatrix(
  problem: EntropyQuotientProblem,
  state: LogState,
): (EntropyQuotient & { readonly state: ComplexMatrix }) | null {
  let best: (EntropyQuotient & { readonly state: ComplexMatrix }) | null = null;
  const lowest = Math.min(...state.logs);
  for (const [index, floor] of WITNESS_FLOORS.entries()) {
    const bound = Math.log(floor);
    if (index > 0 && bound <= lowest) continue;
    const logs = state.logs.map((p) => Math.max(p, bound));
    const matrix = matrixOf(stateOfLogs(state.algebra, logs, state.u));
    const found = evaluated(problem, matrix);
    if (found && (!best || found.value + found.margin < best.value + best.margin)) best = { ...found, state: matrix };
  }
  return best;
}

function evaluated(problem: EntropyQuotientProblem, matrix: ComplexMatrix): EntropyQuotient | null {
  try {
    const found = problem.at(matrix);
    return Number.isFinite(found.value + found.margin) ? found : null;
  } catch (error) {
    if (error instanceof ThalwegError && (error.code === 'state-not-positive' || error.code === 'usage')) return null;
    throw error;
  }
}
