import { fromCoordinates, toCoordinates } from '../algebra/block-algebra.js';
import { applyGeneratorAdjoint, generatorMatrix } from '../generator/apply-generator.js';
import { generatorNormBound } from '../generator/generator-norm.js';
import { MAX_DENSE_DIMENSION, QUICK_DENSE_DIMENSION } from '../generator/superoperator-parts.js';
import { ThalwegError } from '../errors.js';
import { type ComplexMatrix, addScaledInto, copy, frobeniusNorm } from '../linalg/complex-matrix.js';
import { expmAction } from '../linalg/expm-action.js';
import { expmReal } from '../linalg/expm-real.js';
import { realTimesVector, transposeReal } from '../linalg/real-matrix.js';
import { norm } from '../linalg/real-vector.js';
import type { Structure } from '../structure/structure.js';
import { EPSILON, FLOW_RESIDUAL, FLOW_STEPS_LIMIT } from '../tolerances.js';
import type { FlowLimit } from './flow-limit.js';
import { type FlowStep, type FlowTimes, timeOf } from './flow-times.js';
import { spectralPropagation } from './spectral-propagation.js';

/** How states were moved: along eigenvectors of −L, by a matrix exponential of one step, or by Taylor steps on the state. */
export type PropagationMethod = 'eigenvectors' | 'matrix exponential' | 'Taylor steps';

export interface Propagation {
  readonly method: PropagationMethod;
  readonly steps: readonly FlowStep[];
}

/** Moves ρ along the flow; `deviation` is ρ − E†ρ. Throws `too-large` when it would take more than FLOW_STEPS_LIMIT steps. */
export function propagate(
  structure: Structure,
  limit: FlowLimit,
  deviation: ComplexMatrix,
  times: FlowTimes,
): Propagation {
  const { algebra, symmetry } = structure;
  const quick = algebra.dimension <= QUICK_DENSE_DIMENSION;
  if (symmetry.kind !== 'none' && algebra.dimension <= MAX_DENSE_DIMENSION) {
    const steps = spectralPropagation(structure, limit, deviation, times);
    // A symmetry accepted with a visible residual, because σ is inexact, is not good enough to propagate by.
    const exact = steps.every(({ error }) => error <= FLOW_RESIDUAL * frobeniusNorm(deviation));
    if (exact || !quick) return { method: 'eigenvectors', steps };
  }
  return quick
    ? { method: 'matrix exponential', steps: exponentialSteps(structure, limit, deviation, times) }
    : { method: 'Taylor steps', steps: taylorSteps(structure, limit, deviation, times) };
}

/**
 * e^{hL†} once, then one product a step; the error of a step is estimated by two half steps, and since the trace norm
 * contracts, errors of steps add up at most.
 */
function exponentialSteps(
  structure: Structure,
  limit: FlowLimit,
  start: ComplexMatrix,
  times: FlowTimes,
): readonly FlowStep[] {
  const { generator, algebra } = structure;
  const d = algebra.dimension;
  const adjoint = transposeReal(generatorMatrix(generator), d, d);
  const h = timeOf(times, 1);
  const whole = expmReal(
    adjoint.map((x) => h * x),
    d,
  );
  const half = expmReal(
    adjoint.map((x) => (h / 2) * x),
    d,
  );
  const advance = (x: Float64Array): { next: Float64Array; error: number } => {
    const next = realTimesVector(whole, d, d, x);
    const twice = realTimesVector(half, d, d, realTimesVector(half, d, d, x));
    return { next, error: norm(next.map((value, k) => value - twice[k])) + EPSILON * norm(x) };
  };
  return stepThrough(structure, limit, start, times, advance);
}

function taylorSteps(
  structure: Structure,
  limit: FlowLimit,
  start: ComplexMatrix,
  times: FlowTimes,
): readonly FlowStep[] {
  const { generator, algebra } = structure;
  const bound = generatorNormBound(generator);
  const h = timeOf(times, 1);
  if (!(times.until * bound <= FLOW_STEPS_LIMIT)) {
    throw new ThalwegError(
      'too-large',
      `expected a time of at most ${(FLOW_STEPS_LIMIT / bound).toPrecision(3)} for a generator of this size and norm, got ${times.until}; give a shorter one with --until`,
    );
  }
  const apply = (x: Float64Array): Float64Array =>
    toCoordinates(algebra, applyGeneratorAdjoint(generator, fromCoordinates(algebra, x)));
  const advance = (x: Float64Array): { next: Float64Array; error: number } => ({
    next: expmAction(apply, h, x, bound),
    error: EPSILON * (1 + h * bound) * norm(x),
  });
  return stepThrough(structure, limit, start, times, advance);
}

/** One step after the other; what rounding puts among the fixed points, where nothing decays, is taken out again. */
function stepThrough(
  { generator, algebra }: Structure,
  limit: FlowLimit,
  start: ComplexMatrix,
  times: FlowTimes,
  advance: (x: Float64Array) => { next: Float64Array; error: number },
): readonly FlowStep[] {
  const steps: FlowStep[] = [];
  const toTraceNorm = Math.sqrt(algebra.size);
  let deviation = copy(start);
  let error = 0;
  for (let k = 0; k < times.points; k++) {
    steps.push({
      time: timeOf(times, k),
      deviation,
      velocity: applyGeneratorAdjoint(generator, deviation),
      error,
    });
    const { next, error: added } = advance(toCoordinates(algebra, deviation));
    error += toTraceNorm * added;
    const moved = fromCoordinates(algebra, next);
    deviation = addScaledInto(moved, limit.of(moved), -1);
  }
  return steps;
}
