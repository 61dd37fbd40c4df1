import { fromCoordinates } from '../algebra/block-algebra.js';
import { relativeEntropy } from '../entropy/relative-entropy.js';
import { generatorMatrix } from '../generator/apply-generator.js';
import { COMPARISON_ACCURACY, COMPARISON_FINEST, COMPARISON_TIMES } from './tolerances.js';
import type { ComparisonStart } from './comparison-starts.js';
import { convexityAlong } from './convexity.js';
import { eviConstant } from './evi.js';
import { flowed, timesTransposed } from './flowed.js';
import { onGeodesics } from './geodesic-solver.js';
import { type ObservedConstant, isLower } from './observed-constant.js';
import type { TransportModel } from './transport-model.js';
import { type Endpoints, endpointsOf } from './transport-states.js';

/** What one pair of states shows of the curvature of its model; plain data. */
export interface PairComparison {
  readonly start: ComparisonStart;
  /** Convexity of entropy along the geodesic from the second state to the first; null where none was found. */
  readonly convexity: ObservedConstant | null;
  /** EVI along the trajectory of the first state against the second; its state is P_t†ρ. */
  readonly evi: ObservedConstant | null;
}

/**
 * Geodesic convexity and the evolution variational inequality on one pair of states, on meshes refined until their errors are a
 * small part of `rate`, which also sets the times of the trajectory: the gap, for example.
 */
export function comparePair(
  model: TransportModel,
  start: ComparisonStart,
  rate: number,
  stop: () => boolean = () => false,
): PairComparison {
  const endpoints = endpointsOf(model, start.to, start.from);
  if (endpoints.relation !== 'apart') return { start, convexity: null, evi: null };
  const entropy = entropyTo(model, endpoints);
  // Short geodesics are smooth, and their values are to be compared with each other.
  const accuracy = start.kind === 'random' ? COMPARISON_ACCURACY.random : COMPARISON_ACCURACY.short;
  const limits = { tolerance: accuracy * rate, finest: COMPARISON_FINEST, stop };
  const convexity = onGeodesics(model, endpoints, limits, (path) => convexityAlong(path, path.states.map(entropy)));
  const generator = generatorMatrix(model.structure.generator);
  let evi: ObservedConstant | null = null;
  for (const t of start.kind === 'random' ? COMPARISON_TIMES : [0]) {
    if (evi && stop()) break;
    const state = flowed(generator, endpoints.to, t / rate);
    const flow = timesTransposed(generator, state);
    const entropies = { start: entropy(endpoints.from), end: entropy(state) };
    const found = onGeodesics(model, { ...endpoints, to: state }, limits, (path): ObservedConstant => {
      return { value: eviConstant(model.space, path, flow, entropies), error: 0, time: t / rate, state };
    });
    if (found && (!evi || isLower(found, evi))) evi = found;
  }
  return { start, convexity, evi };
}

/** D(·‖E†ρ) on states in coordinates. */
function entropyTo({ structure: { algebra } }: TransportModel, { centre }: Endpoints): (x: Float64Array) => number {
  const reference = fromCoordinates(algebra, centre);
  return (x) => relativeEntropy(fromCoordinates(algebra, x), reference);
}
