import { type ComplexMatrix, zeros } from '../linalg/complex-matrix.js';
import { smallestPencilWork, symmetricPencilSmallestInto } from '../linalg/symmetric-pencil.js';
import { FLOW_STEP } from '../tolerances.js';
import type { CurvaturePencil } from './curvature-pencil.js';
import { deflateSymmetric, deflation, inflate } from './deflate.js';
import type { MetricModel } from './metric-model.js';
import { type MeanName, type OperatorMean, operatorMean } from './operator-mean.js';

/** One jump of a chain: V = v e_xy. */
interface Edge {
  readonly x: number;
  readonly y: number;
  /** |v|². */
  readonly weight: number;
  /** e^{ω/2}. */
  readonly up: number;
  readonly frequency: number;
}

/**
 * `curvaturePencil` on a commutative algebra, where a jump is a directed edge x→y and ∂f = f(y) − f(x) (Maas 2011; Erbar &
 * Maas 2012): O(J) to set up instead of O(J N⁵). The observable is a function; means need not be symmetric.
 */
export function chainPencil(model: MetricModel, mean: MeanName): CurvaturePencil {
  const operator = operatorMean(mean);
  const n = model.algebra.size;
  const edges = edgesOf(model);
  const rates = rateMatrix(n, edges);
  const kernel = model.fixed.length;
  const m = n - kernel;
  const fixed = new Float64Array(kernel * n);
  model.fixed.forEach((f, k) => {
    for (let i = 0; i < n; i++) fixed[k * n + i] = f.re[i * n + i];
  });
  const deflated = deflation(fixed, kernel, n);
  const [metric, curvature] = [new Float64Array(n * n), new Float64Array(n * n)];
  const [g, q] = [new Float64Array(m * m), new Float64Array(m * m)];
  const work = new Float64Array(n);
  const vector = new Float64Array(m);
  const pencil = smallestPencilWork(m);
  const observable = new Float64Array(n);

  function solve(lambda: Float64Array): number {
    if (m === 0) return Infinity;
    fillForms(operator, edges, rates, lambda, metric, curvature);
    deflateSymmetric(deflated, metric, g, work);
    deflateSymmetric(deflated, curvature, q, work);
    const kappa = symmetricPencilSmallestInto(q, g, m, vector, pencil);
    inflate(deflated, vector, observable);
    return kappa;
  }

  return {
    model,
    mean,
    at: ({ lambda }) => ({ kappa: solve(lambda), observable: diagonalOf(observable) }),
    withGradient: ({ lambda }, out) => {
      const kappa = solve(lambda);
      const slope = gradient(operator, edges, rates, lambda, observable, kappa);
      out.re.fill(0);
      out.im.fill(0);
      for (let i = 0; i < n; i++) out.re[i * n + i] = slope[i];
      return kappa;
    },
  };
}

function edgesOf({ jumps, algebra }: MetricModel): Edge[] {
  const n = algebra.size;
  return jumps.map(({ matrix, frequency }) => {
    let at = 0;
    let weight = 0;
    for (let p = 0; p < n * n; p++) {
      const size = matrix.re[p] ** 2 + matrix.im[p] ** 2;
      if (size > weight) [weight, at] = [size, p];
    }
    return { x: Math.floor(at / n), y: at % n, weight, up: Math.exp(frequency / 2), frequency };
  });
}

/** L as a matrix on functions: V = v e_xy moves y to x's value, 2 e^{−ω/2}|v|² being the rate y→x. */
function rateMatrix(n: number, edges: readonly Edge[]): Float64Array {
  const l = new Float64Array(n * n);
  for (const { x, y, weight, up } of edges) {
    const rate = (2 * weight) / up;
    l[y * n + x] += rate;
    l[y * n + y] -= rate;
  }
  return l;
}

function fillForms(
  mean: OperatorMean,
  edges: readonly Edge[],
  l: Float64Array,
  lambda: Float64Array,
  metric: Float64Array,
  curvature: Float64Array,
): void {
  const n = lambda.length;
  const eta = flowOf(l, lambda);
  metric.fill(0);
  curvature.fill(0);
  for (const { x, y, weight, up } of edges) {
    const a = up * lambda[x];
    const b = lambda[y] / up;
    addEdge(metric, n, x, y, weight * mean.value(a, b));
    const slope = up * mean.firstDifference(a, a, b) * eta[x] + (mean.secondDifference(a, b, b) / up) * eta[y];
    addEdge(curvature, n, x, y, (weight / 2) * slope);
  }
  for (let i = 0; i < n; i++) {
    for (let k = 0; k < n; k++) {
      const half = metric[i * n + k] / 2;
      if (half === 0) continue;
      for (let j = 0; j < n; j++) {
        const t = half * l[k * n + j];
        curvature[i * n + j] -= t;
        curvature[j * n + i] -= t;
      }
    }
  }
}

/** form += c (e_y − e_x)(e_y − e_x)ᵀ. */
function addEdge(form: Float64Array, n: number, x: number, y: number, c: number): void {
  form[x * n + x] += c;
  form[y * n + y] += c;
  form[x * n + y] -= c;
  form[y * n + x] -= c;
}

/** L†λ. */
function flowOf(l: Float64Array, lambda: Float64Array): Float64Array {
  const n = lambda.length;
  const eta = new Float64Array(n);
  for (let i = 0; i < n; i++) for (let j = 0; j < n; j++) eta[j] += lambda[i] * l[i * n + j];
  return eta;
}

function apply(l: Float64Array, a: Float64Array): Float64Array {
  const n = a.length;
  const out = new Float64Array(n);
  for (let i = 0; i < n; i++) for (let j = 0; j < n; j++) out[i] += l[i * n + j] * a[j];
  return out;
}

/** Gradient in λ of q − κ‖a‖² at fixed a with ‖a‖² = 1, by the eigenvector formula. */
function gradient(
  mean: OperatorMean,
  edges: readonly Edge[],
  l: Float64Array,
  lambda: Float64Array,
  a: Float64Array,
  kappa: number,
): Float64Array {
  const la = apply(l, a);
  const norm = formGradient(mean, edges, lambda, a, a);
  const cross = formGradient(mean, edges, lambda, a, la);
  const out = apply(l, norm);
  const eta = flowOf(l, lambda);
  let speed = 0;
  eta.forEach((x, i) => (speed = Math.max(speed, Math.abs(x) / lambda[i])));
  const step = FLOW_STEP / speed;
  if (Number.isFinite(step)) {
    const ahead = formGradient(
      mean,
      edges,
      lambda.map((x, i) => x + step * eta[i]),
      a,
      a,
    );
    const behind = formGradient(
      mean,
      edges,
      lambda.map((x, i) => x - step * eta[i]),
      a,
      a,
    );
    out.forEach((_, i) => (out[i] += (ahead[i] - behind[i]) / (2 * step)));
  }
  return out.map((x, i) => x / 2 - cross[i] - kappa * norm[i]);
}

/** Gradient in λ of Σ |v|² F ∂a ∂b. */
function formGradient(
  mean: OperatorMean,
  edges: readonly Edge[],
  lambda: Float64Array,
  a: Float64Array,
  b: Float64Array,
): Float64Array {
  const out = new Float64Array(lambda.length);
  for (const { x, y, weight, up } of edges) {
    const c = weight * (a[y] - a[x]) * (b[y] - b[x]);
    const p = up * lambda[x];
    const r = lambda[y] / up;
    out[x] += c * up * mean.firstDifference(p, p, r);
    out[y] += (c / up) * mean.secondDifference(p, r, r);
  }
  return out;
}

function diagonalOf(a: Float64Array): ComplexMatrix {
  const n = a.length;
  const out = zeros(n);
  for (let i = 0; i < n; i++) out.re[i * n + i] = a[i];
  return out;
}
