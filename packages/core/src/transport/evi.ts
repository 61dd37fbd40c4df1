import type { MinimisedPath } from './minimise-action.js';
import type { TangentSpace } from './tangent-space.js';

/**
 * The largest K with ½ d⁺/dt W²(P_t†ρ,ν) + (K/2)W² + D(ρ) − D(ν) ≤ 0 at t = 0 (evolution variational inequality: Daneri & Savaré,
 * SIAM J. Math. Anal. 40 (2008); Carlen & Maas 2017), for a discretised geodesic from ν to ρ. The derivative is Tr A₁L†ρ with the
 * potential A₁ at the end of the geodesic, by the first variation of W²/2; its error is of second order in the step.
 */
export function eviConstant(
  space: TangentSpace,
  { action }: MinimisedPath,
  flow: Float64Array,
  entropies: { readonly start: number; readonly end: number },
): number {
  const last = action.pieces[action.pieces.length - 1];
  const a = space.expand(last.potential);
  const slope = last.at.gradient(a);
  let derivative = 0;
  for (let i = 0; i < a.length; i++) derivative += (a[i] - (last.step * slope[i]) / 4) * flow[i];
  return (2 * (entropies.start - entropies.end - derivative)) / action.value;
}
