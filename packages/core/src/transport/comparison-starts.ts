import { toCoordinates } from '../algebra/block-algebra.js';
import { exponentialState, matrixOf } from '../entropy/log-state.js';
import { fromCoordinates } from '../algebra/block-algebra.js';
import type { ComplexMatrix } from '../linalg/complex-matrix.js';
import { type Random, seededRandom } from '../random.js';
import { COMPARISON_SPREAD, WITNESS_REACH } from './tolerances.js';
import type { TransportModel } from './transport-model.js';

/** Two states to join by a geodesic, matrices of plain data. */
export interface ComparisonStart {
  readonly kind: 'witness' | 'half' | 'random';
  /** State ρ whose trajectory is followed. */
  readonly from: ComplexMatrix;
  /** Reference state ν, with E†ν = E†ρ. */
  readonly to: ComplexMatrix;
}

/**
 * Pairs of states: a short geodesic through the witness of the gradient estimate along its observable, the same of half the length,
 * and `count` random ones. The witness pairs are left out where there is none.
 */
export function comparisonStarts(
  model: TransportModel,
  witness: { readonly state: ComplexMatrix; readonly observable: ComplexMatrix } | null,
  count: number,
  seed: number | string,
): ComparisonStart[] {
  const random = seededRandom(`compare ${seed}`);
  const starts: ComparisonStart[] = [];
  if (witness) {
    for (const kind of ['witness', 'half'] as const) {
      const pair = acrossWitness(model, witness, kind === 'half' ? WITNESS_REACH / 2 : WITNESS_REACH);
      if (pair) starts.push({ kind, ...pair });
    }
  }
  for (let k = 0; k < count; k++) starts.push({ kind: 'random', ...randomPair(model, random) });
  return starts;
}

/** ρ ± s𝒟_ρA with s such that no eigenvalue changes by more than `reach` of itself. */
function acrossWitness(
  model: TransportModel,
  { state, observable }: { readonly state: ComplexMatrix; readonly observable: ComplexMatrix },
  reach: number,
): { from: ComplexMatrix; to: ComplexMatrix } | null {
  const { kernel, structure } = model;
  const { algebra } = structure;
  const rho = toCoordinates(algebra, state);
  const at = kernel.at(rho);
  if (!at) return null;
  const d = rho.length;
  const a = toCoordinates(algebra, observable);
  const metric = at.metric();
  const eta = rho.map((_, i) => {
    let sum = 0;
    for (let j = 0; j < d; j++) sum += metric[i * d + j] * a[j];
    return sum;
  });
  const step = reach * largestStep(model, rho, eta);
  if (!Number.isFinite(step) || !(step > 0)) return null;
  const shifted = (s: number): ComplexMatrix =>
    fromCoordinates(
      algebra,
      rho.map((x, i) => x + s * eta[i]),
    );
  return { from: shifted(step), to: shifted(-step) };
}

/** Largest s for which ρ ± sη are both states, by bisection. */
function largestStep({ kernel }: TransportModel, rho: Float64Array, eta: Float64Array): number {
  const isInside = (s: number): boolean =>
    kernel.isFaithful(rho.map((x, i) => x + s * eta[i])) && kernel.isFaithful(rho.map((x, i) => x - s * eta[i]));
  const size = Math.hypot(...eta);
  if (!(size > 0)) return NaN;
  let [low, high] = [0, 2 / size];
  for (let k = 0; k < 60; k++) {
    const middle = (low + high) / 2;
    if (isInside(middle)) low = middle;
    else high = middle;
  }
  return low;
}

/** A random state, and another with the same conserved part. */
function randomPair(model: TransportModel, random: Random): { from: ComplexMatrix; to: ComplexMatrix } {
  const { kernel, space, structure } = model;
  const { algebra } = structure;
  const draw = (): Float64Array => {
    const h = Float64Array.from({ length: algebra.dimension }, () => COMPARISON_SPREAD * random.normal());
    return toCoordinates(algebra, matrixOf(exponentialState(algebra, fromCoordinates(algebra, h))));
  };
  const [rho, other] = [draw(), draw()];
  const move = space.expand(space.reduce(other.map((x, i) => x - rho[i])));
  let share = 1;
  while (!kernel.isFaithful(rho.map((x, i) => x + share * move[i]))) share *= 0.75;
  // Off the boundary again where the conserved part cut the way short.
  const end = share < 1 ? 0.9 * share : 1;
  return {
    from: fromCoordinates(algebra, rho),
    to: fromCoordinates(
      algebra,
      rho.map((x, i) => x + end * move[i]),
    ),
  };
}
