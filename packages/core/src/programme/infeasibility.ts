import { INFEASIBILITY_CANDIDATE, INFEASIBILITY_TOLERANCE } from '../tolerances.js';
import { solveLower, solveLowerAdjoint } from './kernels/triangular-solve.js';
import { dot, type Measures } from './measures.js';
import { type NewtonSystem } from './newton-system.js';

/** A scaled y with −Aᵀ y ⪰ 0 and b·y = 1, or a scaled flat X ⪰ 0 with A(X) = 0 and <C, X> = −1. */
export type Ray =
  { readonly kind: 'primal'; readonly y: Float64Array } | { readonly kind: 'dual'; readonly x: Float64Array };

/**
 * Looks for a proof of infeasibility in the present point. Strict proofs (−Aᵀ y positive definite; X projected onto
 * A(X) = 0 and still positive definite) are taken at once; others when they hold to `INFEASIBILITY_TOLERANCE`.
 */
export function infeasibilityRay(newton: NewtonSystem, measures: Measures, gramFactor: Float64Array): Ray | null {
  return primalRay(newton, measures) ?? dualRay(newton, measures, gramFactor);
}

function primalRay(newton: NewtonSystem, { dualObjective }: Measures): Ray | null {
  if (!(dualObjective > 0)) return null;
  const y = newton.y.map((value) => value / dualObjective);
  const slack = new Float64Array(newton.s.length);
  newton.addAdjoint(y, -1, slack);
  if (newton.isPositive(slack)) return { kind: 'primal', y };
  for (let i = 0; i < slack.length; i++) slack[i] -= newton.s[i] / dualObjective;
  return Math.sqrt(dot(slack, slack)) <= INFEASIBILITY_TOLERANCE ? { kind: 'primal', y } : null;
}

function dualRay(newton: NewtonSystem, { primalObjective }: Measures, gramFactor: Float64Array): Ray | null {
  if (!(primalObjective < 0)) return null;
  const m = newton.y.length;
  const x = newton.x.map((value) => value / -primalObjective);
  const values = new Float64Array(m);
  newton.addValues(x, 1, values);
  const defect = Math.sqrt(dot(values, values));
  if (!(defect <= INFEASIBILITY_CANDIDATE)) return null;
  const limit: Ray | null = defect <= INFEASIBILITY_TOLERANCE ? { kind: 'dual', x: x.slice() } : null;
  solveLower(gramFactor, m, false, values);
  solveLowerAdjoint(gramFactor, m, false, values);
  newton.addAdjoint(values, -1, x);
  const gain = -dot(newton.form.constant, x);
  if (!(gain > 0) || !newton.isPositive(x)) return limit;
  return { kind: 'dual', x: x.map((value) => value / gain) };
}
