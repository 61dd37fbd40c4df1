import { toCoordinates } from '../algebra/block-algebra.js';
import { completeOrthonormal } from '../linalg/orthonormal-completion.js';
import { zeros } from '../linalg/complex-matrix.js';
import type { MetricModel } from '../metric/metric-model.js';

/**
 * The directions in which states can move at finite cost: B, D×d with orthonormal columns, spans the orthogonal complement of
 * the fixed points (the range of every 𝒟_ρ with faithful ρ), in coordinates of the Hermitian basis.
 */
export interface TangentSpace {
  /** D. */
  readonly dimension: number;
  /** d = D − dim F. */
  readonly count: number;
  /** Bᵀx, length d. */
  reduce(x: Float64Array): Float64Array;
  /** Bᵀ M B of a D×D matrix, d×d. */
  reduceMatrix(m: Float64Array): Float64Array;
  /** B y, length D. */
  expand(y: Float64Array): Float64Array;
  /** The part of x among the fixed points. */
  fixedPart(x: Float64Array): Float64Array;
}

/** B and its products for the fixed points of a model. */
export function tangentSpace(model: MetricModel): TangentSpace {
  const { algebra, fixed } = model;
  const d = algebra.dimension;
  const kernel = fixed.length;
  const count = d - kernel;
  const q = zeros(d, d);
  fixed.forEach((f, k) => {
    const x = toCoordinates(algebra, f);
    for (let i = 0; i < d; i++) q.re[i * d + k] = x[i];
  });
  completeOrthonormal(q, kernel);
  const b = new Float64Array(d * count);
  for (let i = 0; i < d; i++) for (let k = 0; k < count; k++) b[i * count + k] = q.re[i * d + kernel + k];
  const reduce = (x: Float64Array): Float64Array => {
    const out = new Float64Array(count);
    for (let i = 0; i < d; i++) for (let k = 0; k < count; k++) out[k] += b[i * count + k] * x[i];
    return out;
  };
  const expand = (y: Float64Array): Float64Array => {
    const out = new Float64Array(d);
    for (let i = 0; i < d; i++) for (let k = 0; k < count; k++) out[i] += b[i * count + k] * y[k];
    return out;
  };
  return {
    dimension: d,
    count,
    reduce,
    expand,
    reduceMatrix: (m) => conjugate(m, b, d, count),
    fixedPart: (x) => {
      const moving = expand(reduce(x));
      return x.map((value, i) => value - moving[i]);
    },
  };
}

function conjugate(m: Float64Array, b: Float64Array, d: number, count: number): Float64Array {
  const half = new Float64Array(d * count);
  for (let i = 0; i < d; i++) {
    for (let k = 0; k < d; k++) {
      const x = m[i * d + k];
      if (x === 0) continue;
      for (let j = 0; j < count; j++) half[i * count + j] += x * b[k * count + j];
    }
  }
  const out = new Float64Array(count * count);
  for (let k = 0; k < d; k++) {
    for (let i = 0; i < count; i++) {
      const x = b[k * count + i];
      if (x === 0) continue;
      for (let j = 0; j < count; j++) out[i * count + j] += x * half[k * count + j];
    }
  }
  return out;
}
