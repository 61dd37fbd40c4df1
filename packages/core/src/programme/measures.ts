import { dot } from '../linalg/real-vector.js';
import { type NewtonSystem } from './newton-system.js';

/** Where a point of the scaled programme stands; ‖b‖ = ‖C‖ = 1 there. */
export interface Measures {
  readonly primalObjective: number;
  readonly dualObjective: number;
  /** <X, S>. */
  readonly complementarity: number;
  /** max(|primal − dual|, <X, S>) / (1 + |primal| + |dual|). */
  readonly gap: number;
  readonly primalInfeasibility: number;
  readonly dualInfeasibility: number;
  /** The largest of the last three. */
  readonly worst: number;
}

/** Measures the present point; its residuals must be up to date. */
export function measure({ form, x, y, s, primalResidual, dualResidual }: NewtonSystem): Measures {
  const primalObjective = dot(form.constant, x);
  const dualObjective = dot(form.objective, y);
  const complementarity = dot(x, s);
  const gap =
    Math.max(Math.abs(primalObjective - dualObjective), complementarity) /
    (1 + Math.abs(primalObjective) + Math.abs(dualObjective));
  const primalInfeasibility = Math.sqrt(dot(primalResidual, primalResidual));
  const dualInfeasibility = Math.sqrt(dot(dualResidual, dualResidual));
  const worst = Math.max(gap, primalInfeasibility, dualInfeasibility);
  return {
    primalObjective,
    dualObjective,
    complementarity,
    gap,
    primalInfeasibility,
    dualInfeasibility,
    // NaN compares false with everything: make it the worst there is.
    worst: worst >= 0 ? worst : Infinity,
  };
}
