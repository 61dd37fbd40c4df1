import { blockEigen } from '../algebra/block-eigen.js';
import { ThalwegError } from '../errors.js';
import { curvaturePencil, type CurvaturePencil } from '../metric/curvature-pencil.js';
import type { MetricModel } from '../metric/metric-model.js';
import { type MeanName, operatorMean } from '../metric/operator-mean.js';
import { quotientAt, quotientError } from '../metric/quotient.js';
import { type StateFrame, fromFrame } from '../metric/state-frame.js';
import { type StateParameters, diagonalParameters, hermitianParameters } from '../metric/state-parameters.js';
import { minimiseBfgs } from '../search/bfgs.js';
import { minimiseScalar } from '../search/brent.js';
import { type ComplexMatrix, frobeniusNorm, zeros } from '../linalg/complex-matrix.js';
import { LOG_EIGENVALUE_RANGE, STATE_FLOORS } from '../tolerances.js';
import type { SearchStart } from './search-starts.js';

/** Outcome of one start of a search for inf κ(ρ). */
export interface GradientEstimateResult {
  /** q_ρ(A)/‖A‖²_ρ re-evaluated plainly at the best state and observable. */
  readonly value: number;
  /** Bound on the rounding error of `value`. */
  readonly error: number;
  readonly state: ComplexMatrix;
  readonly observable: ComplexMatrix;
  /** Smallest eigenvalue of the best state: tiny when the infimum sits at the boundary of state space. */
  readonly smallestEigenvalue: number;
  readonly evaluations: number;
}

export interface GradientEstimateProblem {
  readonly model: MetricModel;
  readonly mean: MeanName;
  /** The generator commutes with the unitaries of its algebra, so eigenvalues alone move. */
  readonly covariant: boolean;
}

/** Run one start of the search for `ge` (§5): BFGS on ρ = exp(H), or Brent's method on two-level spectra. */
export function runGradientEstimateStart(
  problem: GradientEstimateProblem,
  start: SearchStart,
  stop?: () => boolean,
): GradientEstimateResult {
  const pencil = curvaturePencil(problem.model, problem.mean);
  const parameters = parametersOf(problem);
  const counter = { evaluations: 0 };
  let x0: Float64Array = Float64Array.from(start.x);
  if (start.kind === 'ray') x0 = alongRay(pencil, parameters, x0, counter, stop);
  const found = minimiseBfgs(objective(pencil, parameters, counter), x0, { maxIterations: 400, stop });
  return witnessAt(problem, parameters.frame(found.x), pencil, counter.evaluations);
}

/**
 * The witness at a state, as it can be written down: the state is rounded to a matrix of doubles first, its eigenvalues
 * raised to the floor among STATE_FLOORS that gives the lowest value, then κ is taken there and re-evaluated plainly.
 */
function witnessAt(
  problem: GradientEstimateProblem,
  frame: StateFrame,
  pencil = curvaturePencil(problem.model, problem.mean),
  evaluations = 1,
): GradientEstimateResult {
  let best: GradientEstimateResult | null = null;
  for (const floor of STATE_FLOORS) {
    const raised = raisedFrame(frame, floor);
    if (best && raised === frame) continue;
    const found = writtenWitness(problem, fromFrame(raised), pencil, evaluations);
    if (found && (!best || found.value + found.error < best.value + best.error)) best = found;
  }
  if (!best)
    throw new ThalwegError(
      'internal',
      'expected a state whose metric doubles can resolve, found none; report the model',
    );
  return best;
}

/** κ at a density matrix of doubles; throws `state-not-positive` when it is not faithful. */
export function gradientEstimateAt(problem: GradientEstimateProblem, rho: ComplexMatrix): GradientEstimateResult {
  const found = writtenWitness(problem, rho, curvaturePencil(problem.model, problem.mean), 1);
  if (!found) {
    throw new ThalwegError(
      'state-not-positive',
      `expected a state with all eigenvalues above ${STATE_FLOORS[1]}, got a smallest eigenvalue of ${smallestOf(problem, rho)}; mix in a little of the reference state`,
    );
  }
  return found;
}

function writtenWitness(
  problem: GradientEstimateProblem,
  rho: ComplexMatrix,
  pencil: CurvaturePencil,
  evaluations: number,
): GradientEstimateResult | null {
  const frame = frameOf(problem, rho);
  const smallestEigenvalue = Math.min(...frame.lambda);
  if (!(smallestEigenvalue > STATE_FLOORS[1] / 2)) return null;
  const { observable, kappa } = pencil.at(frame);
  if (!Number.isFinite(kappa)) return null;
  const q = quotientAt(problem.model, operatorMean(problem.mean), frame, observable);
  return {
    value: q.curvature / q.metric,
    error: quotientError(problem.model, q),
    state: rho,
    observable,
    smallestEigenvalue,
    evaluations,
  };
}

function frameOf(problem: GradientEstimateProblem, rho: ComplexMatrix): StateFrame {
  const { values, vectors } = blockEigen(problem.model.algebra, rho);
  return { lambda: values, u: problem.model.commutative ? null : vectors };
}

function smallestOf(problem: GradientEstimateProblem, rho: ComplexMatrix): number {
  return Math.min(...frameOf(problem, rho).lambda);
}

function raisedFrame(frame: StateFrame, floor: number): StateFrame {
  if (Math.min(...frame.lambda) >= floor) return frame;
  const raised = frame.lambda.map((x) => Math.max(x, floor));
  const sum = raised.reduce((total, x) => total + x, 0);
  return { lambda: raised.map((x) => x / sum), u: frame.u };
}

function parametersOf(problem: GradientEstimateProblem): StateParameters {
  const { algebra, commutative } = problem.model;
  return commutative || problem.covariant ? diagonalParameters(algebra.size) : hermitianParameters(algebra);
}

/**
 * κ and its gradient in the parameters, in units of the generator's rates, so that the tolerances of the search do not depend
 * on the unit of time; +∞ outside the range of eigenvalues where doubles resolve the forms.
 */
function objective(pencil: CurvaturePencil, parameters: StateParameters, counter: { evaluations: number }) {
  const unit = meanRate(pencil.model);
  const slope = zeros(pencil.model.algebra.size);
  return (x: Float64Array, gradient: Float64Array): number => {
    const frame = parameters.frame(x);
    counter.evaluations++;
    if (!(Math.min(...frame.lambda) > Math.exp(-LOG_EIGENVALUE_RANGE))) return Infinity;
    const kappa = pencil.withGradient(frame, slope);
    if (!Number.isFinite(kappa)) return Infinity;
    parameters.pullBack(frame, slope, gradient);
    for (let k = 0; k < gradient.length; k++) gradient[k] /= unit;
    return kappa / unit;
  };
}

/** Tr Σ e^{−ω_j/2} 2V_j*V_j / N, the mean rate at which the jumps leave a level. */
function meanRate({ jumps, algebra }: MetricModel): number {
  let sum = 0;
  for (const { matrix, frequency } of jumps) sum += 2 * Math.exp(-frequency / 2) * frobeniusNorm(matrix) ** 2;
  return sum > 0 ? sum / algebra.size : 1;
}

/** Minimise along the ray s·x from the maximally mixed state first: two-level spectra often carry the minimum. */
function alongRay(
  pencil: CurvaturePencil,
  parameters: StateParameters,
  direction: Float64Array,
  counter: { evaluations: number },
  stop?: () => boolean,
): Float64Array {
  const at = (s: number): number => {
    if (stop?.()) return Infinity;
    counter.evaluations++;
    const { kappa } = pencil.at(parameters.frame(direction.map((v) => v * s)));
    return Number.isFinite(kappa) ? kappa : Infinity;
  };
  let best = 0.1;
  let lowest = Infinity;
  for (const s of RAY_GRID) {
    const value = at(s);
    if (value < lowest) [lowest, best] = [value, s];
  }
  const { x } = minimiseScalar(at, best - RAY_STEP, best + RAY_STEP, 1e-9);
  return direction.map((v) => v * x);
}

const RAY_STEP = 1;
const RAY_GRID = Array.from({ length: 25 }, (_, k) => (k - 12) * RAY_STEP + 0.05);
