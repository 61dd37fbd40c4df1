import { logarithmicMean, logarithmicMeanDifference } from '../metric/logarithmic-mean.js';
import type { MetricModel } from '../metric/metric-model.js';
import type { MetricKernel } from './metric-kernel.js';
import { secondSlope } from './second-differences.js';

/** One edge of a chain: V = v e_xy, its adjoint counted with it. */
interface Edge {
  readonly x: number;
  readonly y: number;
  /** |v|² times the number of jumps it stands for. */
  readonly weight: number;
  /** e^{ω/2}. */
  readonly up: number;
}

/** The metric on functions on N points (Maas 2011): ‖f‖²_λ = Σ_edges w Λ(e^{ω/2}λ_x, e^{−ω/2}λ_y)(f_y − f_x)²; O(J) an evaluation. */
export function chainKernel(model: MetricModel): MetricKernel {
  const edges = edgesOf(model);
  return {
    model,
    barrier: (lambda) => {
      const n = lambda.length;
      const out = new Float64Array(n * n);
      for (let i = 0; i < n; i++) out[i * n + i] = 1 / lambda[i] ** 2;
      return out;
    },
    isFaithful: (lambda) => lambda.every((x) => x > 0),
    at(lambda) {
      let smallest = Infinity;
      for (const x of lambda) smallest = Math.min(smallest, x);
      if (!(smallest > 0)) return null;
      return {
        smallest,
        metric: () => metricOf(edges, lambda),
        gradient: (a) => gradientOf(edges, lambda, a),
        mixed: (a) => mixedOf(edges, lambda, a),
        hessian: (a) => hessianOf(edges, lambda, a),
      };
    },
  };
}

function edgesOf({ jumps, algebra }: MetricModel): Edge[] {
  const n = algebra.size;
  return jumps.flatMap(({ matrix, frequency, pairWeight }) => {
    if (pairWeight === 0) return [];
    let at = 0;
    let weight = 0;
    for (let p = 0; p < n * n; p++) {
      const size = matrix.re[p] ** 2 + matrix.im[p] ** 2;
      if (size > weight) [weight, at] = [size, p];
    }
    return [{ x: Math.floor(at / n), y: at % n, weight: weight * pairWeight, up: Math.exp(frequency / 2) }];
  });
}

function metricOf(edges: readonly Edge[], lambda: Float64Array): Float64Array {
  const n = lambda.length;
  const out = new Float64Array(n * n);
  for (const { x, y, weight, up } of edges) {
    const c = weight * logarithmicMean(up * lambda[x], lambda[y] / up);
    out[x * n + x] += c;
    out[y * n + y] += c;
    out[x * n + y] -= c;
    out[y * n + x] -= c;
  }
  return out;
}

function gradientOf(edges: readonly Edge[], lambda: Float64Array, a: Float64Array): Float64Array {
  const out = new Float64Array(lambda.length);
  for (const { x, y, weight, up } of edges) {
    const c = weight * (a[y] - a[x]) ** 2;
    const [p, q] = [up * lambda[x], lambda[y] / up];
    out[x] += c * up * logarithmicMeanDifference(p, p, q);
    out[y] += (c / up) * logarithmicMeanDifference(q, q, p);
  }
  return out;
}

function mixedOf(edges: readonly Edge[], lambda: Float64Array, a: Float64Array): Float64Array {
  const n = lambda.length;
  const out = new Float64Array(n * n);
  for (const { x, y, weight, up } of edges) {
    const step = weight * (a[y] - a[x]);
    const [p, q] = [up * lambda[x], lambda[y] / up];
    const slopeX = step * up * logarithmicMeanDifference(p, p, q);
    const slopeY = (step / up) * logarithmicMeanDifference(q, q, p);
    out[y * n + x] += slopeX;
    out[x * n + x] -= slopeX;
    out[y * n + y] += slopeY;
    out[x * n + y] -= slopeY;
  }
  return out;
}

function hessianOf(edges: readonly Edge[], lambda: Float64Array, a: Float64Array): Float64Array {
  const n = lambda.length;
  const out = new Float64Array(n * n);
  for (const { x, y, weight, up } of edges) {
    // Λ is homogeneous: its Hessian is Λ_xx (1, −p/q)ᵀ(1, −p/q).
    const c = weight * (a[y] - a[x]) ** 2 * up * up * secondSlope(up * lambda[x], lambda[y] / up);
    const ratio = lambda[x] / lambda[y];
    out[x * n + x] += c;
    out[x * n + y] -= c * ratio;
    out[y * n + x] -= c * ratio;
    out[y * n + y] += c * ratio * ratio;
  }
  return out;
}
