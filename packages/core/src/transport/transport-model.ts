import { isCommutative } from '../algebra/block-algebra.js';
import { ThalwegError } from '../errors.js';
import { hasGradientMetric } from '../sheet/hypotheses.js';
import { metricOf } from '../sheet/run-sheet-task.js';
import type { Structure } from '../structure/structure.js';
import { CHAIN_TRANSPORT_LIMIT, TRANSPORT_LIMIT } from './tolerances.js';
import { type MetricKernel, metricKernel } from './metric-kernel.js';
import { type TangentSpace, tangentSpace } from './tangent-space.js';

/** What the transport metric of a model needs, prepared once. */
export interface TransportModel {
  readonly structure: Structure;
  readonly kernel: MetricKernel;
  readonly space: TangentSpace;
}

/**
 * Prepare the transport metric. Throws `not-symmetric` without GNS symmetry, on which the metric rests, and `too-large` above
 * TRANSPORT_LIMIT.
 */
export function transportModel(structure: Structure): TransportModel {
  const known = models.get(structure);
  if (known) return known;
  if (!hasGradientMetric(structure)) {
    throw new ThalwegError(
      'not-symmetric',
      'expected a generator that is GNS-symmetric for a faithful state, got one that is not; the transport distance is that of its gradient-flow metric, which needs this symmetry (thalweg inspect tells more)',
    );
  }
  const { dimension } = structure.algebra;
  const isChain = isCommutative(structure.algebra);
  const limit = isChain ? CHAIN_TRANSPORT_LIMIT : TRANSPORT_LIMIT;
  if (dimension > limit || !structure.fixedPoints) {
    throw new ThalwegError(
      'too-large',
      `expected ${isChain ? 'a chain of' : 'an algebra of dimension'} ${limit} ${isChain ? 'points ' : ''}at most for a transport distance, got ${dimension}; reduce the model`,
    );
  }
  const metric = metricOf(structure);
  const model = { structure, kernel: metricKernel(metric), space: tangentSpace(metric) };
  models.set(structure, model);
  return model;
}

const models = new WeakMap<Structure, TransportModel>();
