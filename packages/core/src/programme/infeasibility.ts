import { INFEASIBILITY_CANDIDATE, INFEASIBILITY_TOLERANCE } from '../tolerances.js';
import { solveLower, solveLowerAdjoint } from './kernels/triangular-solve.js';
import { dot } from '../linalg/real-vector.js';
import { type Measures } from './measures.js';
import { type NewtonSystem } from './newton-system.js';

/** A scaled y with −Aᵀ y ⪰ 0 and b·y = 1, or a scaled flat X ⪰ 0 with A(X) = 0 and <C, X> = −1. */
export type Ray =
  { readonly kind: 'primal'; readonly y: Float64Array } | { readonly kind: 'dual'; readonly x: Float64Array };

export interface InfeasibilitySearch {
  readonly ray: Ray | null;
  /** By how much the better of the two candidates misses its equations, per unit of gain; +∞ without a candidate. */
  readonly defect: number;
}

/**
 * Looks for a proof of infeasibility in the present point. Strict proofs (−Aᵀ y positive definite; X projected onto
 * A(X) = 0 and still positive definite) are taken at once; others when they hold to `INFEASIBILITY_TOLERANCE`.
 */
export function searchInfeasibility(
  newton: NewtonSystem,
  measures: Measures,
  gramFactor: Float64Array,
): InfeasibilitySearch {
  const primal = primalRay(newton, measures);
  if (primal.ray) return primal;
  const dual = dualRay(newton, measures, gramFactor);
  return { ray: dual.ray, defect: Math.min(primal.defect, dual.defect) };
}

const NONE: InfeasibilitySearch = { ray: null, defect: Infinity };

function primalRay(newton: NewtonSystem, { dualObjective }: Measures): InfeasibilitySearch {
  if (!(dualObjective > 0)) return NONE;
  const y = newton.y.map((value) => value / dualObjective);
  const slack = new Float64Array(newton.s.length);
  newton.addAdjoint(y, -1, slack);
  if (newton.isPositive(slack)) return { ray: { kind: 'primal', y }, defect: 0 };
  for (let i = 0; i < slack.length; i++) slack[i] -= newton.s[i] / dualObjective;
  const defect = Math.sqrt(dot(slack, slack));
  return { ray: defect <= INFEASIBILITY_TOLERANCE ? { kind: 'primal', y } : null, defect };
}

function dualRay(newton: NewtonSystem, { primalObjective }: Measures, gramFactor: Float64Array): InfeasibilitySearch {
  if (!(primalObjective < 0)) return NONE;
  const m = newton.y.length;
  const x = newton.x.map((value) => value / -primalObjective);
  const values = new Float64Array(m);
  newton.addValues(x, 1, values);
  const defect = Math.sqrt(dot(values, values));
  if (!(defect <= INFEASIBILITY_CANDIDATE)) return { ray: null, defect };
  const limit: Ray | null = defect <= INFEASIBILITY_TOLERANCE ? { kind: 'dual', x: x.slice() } : null;
  solveLower(gramFactor, m, false, values);
  solveLowerAdjoint(gramFactor, m, false, values);
  newton.addAdjoint(values, -1, x);
  const gain = -dot(newton.form.constant, x);
  if (!(gain > 0) || !newton.isPositive(x)) return { ray: limit, defect };
  return { ray: { kind: 'dual', x: x.map((value) => value / gain) }, defect: 0 };
}
