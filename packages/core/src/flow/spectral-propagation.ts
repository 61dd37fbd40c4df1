import { fromCoordinates, toCoordinates } from '../algebra/block-algebra.js';
import { applyGeneratorAdjoint } from '../generator/apply-generator.js';
import { superoperatorOf } from '../generator/superoperator-parts.js';
import {
  type ComplexMatrix,
  addScaledInto,
  frobeniusNorm,
  multiply,
  scale,
  subtract,
} from '../linalg/complex-matrix.js';
import { matrixFunction } from '../linalg/matrix-function.js';
import { realTimesVector, transposeReal } from '../linalg/real-matrix.js';
import { symmetricEigen } from '../linalg/symmetric-eigen.js';
import type { Structure } from '../structure/structure.js';
import { KERNEL_TOLERANCE } from '../tolerances.js';
import type { FlowLimit } from './flow-limit.js';
import { type FlowStep, type FlowTimes, timeOf } from './flow-times.js';

/**
 * The flow of a KMS-symmetric generator: X ↦ σ^{-1/4} L†(σ^{1/4}Xσ^{1/4}) σ^{-1/4} is self-adjoint in Tr X*Y, so that
 * ρ_t − E†ρ = Σ_k c_k e^{−μ_k t} w_k with its eigenvectors v_k, w_k = σ^{1/4}v_kσ^{1/4}, and the kernel left out. The error
 * stated is a bound: the trace norm contracts, so an error grows by no more than the residuals Σ |c_k| e^{−μ_k s} ‖L†w_k + μ_kw_k‖₁
 * of what is computed, integrated over time.
 */
export function spectralPropagation(
  structure: Structure,
  limit: FlowLimit,
  start: ComplexMatrix,
  times: FlowTimes,
): FlowStep[] {
  const { modes, fromModes, startError } = decompose(structure, limit, start);
  return Array.from({ length: times.points }, (_, k) => {
    const time = timeOf(times, k);
    const amplitudes = modes.map(({ amplitude, rate }) => amplitude * Math.exp(-rate * time));
    const speeds = amplitudes.map((x, m) => -modes[m].rate * x);
    const grown = modes.reduce((sum, { residual, rate }) => sum + (residual * -Math.expm1(-rate * time)) / rate, 0);
    return { time, deviation: fromModes(amplitudes), velocity: fromModes(speeds), error: startError + grown };
  });
}

interface Mode {
  /** μ_k > 0. */
  readonly rate: number;
  /** c_k. */
  readonly amplitude: number;
  /** |c_k| ‖L†w_k + μ_kw_k‖, as a bound on the trace norm. */
  readonly residual: number;
}

interface Decomposition {
  readonly modes: readonly Mode[];
  /** Σ_k x_k w_k. */
  readonly fromModes: (x: readonly number[]) => ComplexMatrix;
  /** ‖start − Σ c_k w_k‖, as a bound on the trace norm. */
  readonly startError: number;
}

function decompose({ generator, algebra }: Structure, { state }: FlowLimit, start: ComplexMatrix): Decomposition {
  const d = algebra.dimension;
  const [quarter, inverse] = [0.25, -0.25].map((p) => matrixFunction(state, (x) => x ** p));
  const around = (s: ComplexMatrix, a: ComplexMatrix): ComplexMatrix => multiply(s, multiply(a, s));
  const step = (x: ComplexMatrix): ComplexMatrix =>
    around(inverse, applyGeneratorAdjoint(generator, around(quarter, x)));
  const { values, vectors } = symmetricEigen(superoperatorOf(algebra, step), d);
  const rows = transposeReal(vectors, d, d);
  const top = Math.max(Math.abs(values[0]), Math.abs(values[d - 1]));
  const kept = Array.from(values.keys()).filter((k) => -values[k] > KERNEL_TOLERANCE * top);
  const coefficients = realTimesVector(rows, d, d, toCoordinates(algebra, around(inverse, start)));
  const fromModes = (x: readonly number[]): ComplexMatrix => {
    const full = new Float64Array(d);
    kept.forEach((k, m) => (full[k] = x[m]));
    return around(quarter, fromCoordinates(algebra, realTimesVector(vectors, d, d, full)));
  };
  const toTraceNorm = Math.sqrt(algebra.size);
  const modes = kept.map((k): Mode => {
    const [rate, amplitude] = [-values[k], coefficients[k]];
    const w = around(quarter, fromCoordinates(algebra, rows.subarray(k * d, (k + 1) * d)));
    const image = addScaledInto(scale(w, rate), applyGeneratorAdjoint(generator, w), 1);
    return { rate, amplitude, residual: toTraceNorm * Math.abs(amplitude) * frobeniusNorm(image) };
  });
  const rebuilt = fromModes(modes.map(({ amplitude }) => amplitude));
  return { modes, fromModes, startError: toTraceNorm * frobeniusNorm(subtract(start, rebuilt)) };
}
