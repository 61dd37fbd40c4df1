import type { MetricModel } from '../metric/metric-model.js';
import { chainKernel } from './chain-kernel.js';
import { matrixKernel } from './matrix-kernel.js';

/**
 * The transport metric at one faithful state, in the D real coordinates of the Hermitian basis (`toCoordinates`): the form
 * ‖A‖²_ρ = Σ_j <∂_jA,[ρ]_j∂_jA> and its derivatives in ρ.
 */
export interface MetricAt {
  /** Smallest eigenvalue of ρ. */
  readonly smallest: number;
  /** 𝒟_ρ as a D×D matrix: ‖A‖²_ρ = aᵀ𝒟a. */
  metric(): Float64Array;
  /** Gradient in ρ of ‖A‖²_ρ, length D; by homogeneity its product with ρ is ‖A‖²_ρ. */
  gradient(a: Float64Array): Float64Array;
  /** Derivative η ↦ 𝒟′_ρ[η]A, D×D: rows observables, columns directions. */
  mixed(a: Float64Array): Float64Array;
  /** Hessian of ρ ↦ ‖A‖²_ρ, D×D, negative semidefinite. */
  hessian(a: Float64Array): Float64Array;
}

/** Evaluates the metric of one model. */
export interface MetricKernel {
  readonly model: MetricModel;
  /** Null when ρ (coordinates, any scale) is not positive definite. */
  at(rho: Float64Array): MetricAt | null;
  isFaithful(rho: Float64Array): boolean;
  /** D²(−log det ρ), η ↦ ρ⁻¹ηρ⁻¹ as a D×D matrix, for faithful ρ. */
  barrier(rho: Float64Array): Float64Array;
}

/** The kernel of a model; on commutative algebras the one that knows that a jump is an edge. */
export function metricKernel(model: MetricModel): MetricKernel {
  return model.commutative ? chainKernel(model) : matrixKernel(model);
}
