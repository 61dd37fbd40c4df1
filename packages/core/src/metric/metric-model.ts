import type { BlockAlgebra } from '../algebra/block-algebra.js';
import { isCommutative } from '../algebra/block-algebra.js';
import type { CanonicalForm } from '../structure/canonical-form.js';
import type { FixedPoints } from '../structure/fixed-points.js';
import { FREQUENCY_TOLERANCE } from '../tolerances.js';
import type { ComplexMatrix } from '../linalg/complex-matrix.js';

/** A jump of the canonical form as the metric uses it. */
export interface MetricJump {
  /** V_j, N×N. */
  readonly matrix: ComplexMatrix;
  /** ω_j. */
  readonly frequency: number;
  /** Index into the list of distinct frequencies. */
  readonly group: number;
  /** 1, or 2 where V_j stands for the pair V_j, V_j* on self-adjoint observables, or 0 for the partner left out. */
  readonly pairWeight: number;
}

/** All that the gradient-flow metric of a GNS-symmetric generator needs (Carlen & Maas 2017, §§3–5). */
export interface MetricModel {
  readonly algebra: BlockAlgebra;
  readonly jumps: readonly MetricJump[];
  readonly frequencies: readonly number[];
  /** Reference state σ. */
  readonly sigma: ComplexMatrix;
  /** Orthonormal Hermitian basis of the fixed points. */
  readonly fixed: readonly ComplexMatrix[];
  readonly commutative: boolean;
}

/** Collect the metric's data from a canonical form and its fixed points; kept while the form lives, with what is prepared on it. */
export function metricModel(canonical: CanonicalForm, fixed: FixedPoints): MetricModel {
  const known = models.get(canonical);
  if (known?.fixed === fixed.basis) return known;
  const model = collect(canonical, fixed);
  models.set(canonical, model);
  return model;
}

const models = new WeakMap<CanonicalForm, MetricModel>();

function collect(canonical: CanonicalForm, fixed: FixedPoints): MetricModel {
  const frequencies: number[] = [];
  const jumps = canonical.jumps.map((jump, j): MetricJump => {
    let group = frequencies.findIndex((w) => Math.abs(w - jump.frequency) <= FREQUENCY_TOLERANCE * (1 + Math.abs(w)));
    if (group < 0) group = frequencies.push(jump.frequency) - 1;
    const pairWeight = jump.partner === j ? 1 : j < jump.partner ? 2 : 0;
    return { matrix: jump.matrix, frequency: frequencies[group], group, pairWeight };
  });
  return {
    algebra: canonical.algebra,
    jumps,
    frequencies,
    sigma: canonical.state.sigma,
    fixed: fixed.basis,
    commutative: isCommutative(canonical.algebra),
  };
}
