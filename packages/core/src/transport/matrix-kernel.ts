import { type BlockAlgebra, fromCoordinates, toCoordinates } from '../algebra/block-algebra.js';
import { blockEigen } from '../algebra/block-eigen.js';
import { type ComplexMatrix, zeros } from '../linalg/complex-matrix.js';
import { emptyMeanTable, fillMeanTable } from '../metric/mean-table.js';
import type { MetricModel } from '../metric/metric-model.js';
import { operatorMean } from '../metric/operator-mean.js';
import { rotateInto } from '../metric/rotate.js';
import { type FrameJump, gradientInFrame, hessianInFrame, mixedInFrame } from './frame-derivatives.js';
import type { MetricKernel } from './metric-kernel.js';

/**
 * The metric on any block algebra, in the eigenbasis of ρ where [ρ]_ω multiplies entries by Λ(e^{ω/2}λ_a, e^{−ω/2}λ_b) (Carlen
 * & Maas 2017, §5): O(J D² N²) an evaluation. One jump stands for each adjoint pair, as observables are Hermitian.
 */
export function matrixKernel(model: MetricModel): MetricKernel {
  const { algebra } = model;
  const used = model.jumps.flatMap(({ matrix, group, pairWeight }) =>
    pairWeight > 0 ? [{ matrix: { ...matrix }, group, weight: pairWeight }] : [],
  );
  const mean = operatorMean('logarithmic');
  return {
    model,
    barrier: (rho) => barrierOf(algebra, rho),
    isFaithful: (rho) => blockEigen(algebra, fromCoordinates(algebra, rho)).values.every((x) => x > 0),
    at(rho) {
      const { values: lambda, vectors, exact } = blockEigen(algebra, fromCoordinates(algebra, rho));
      const smallest = Math.min(...lambda);
      if (!(smallest > 0)) return null;
      const u = exact ? null : vectors;
      const tables = model.frequencies.map((omega) => {
        const table = emptyMeanTable(algebra.size);
        fillMeanTable(table, mean, lambda, omega);
        return table;
      });
      const jumps = used.map(({ matrix, group, weight }): FrameJump => {
        const images = derivationImages(algebra, rotated(matrix, u));
        return { images, table: tables[group], frequency: model.frequencies[group], weight };
      });
      const turn = u ? coordinateRotation(algebra, u) : null;
      const d = algebra.dimension;
      const inFrame = (a: Float64Array): Float64Array => (turn ? multiplyVector(turn, a, d) : a);
      const back = (a: Float64Array): Float64Array => (turn ? multiplyTransposed(turn, a, d) : a);
      const backMatrix = (m: Float64Array): Float64Array => (turn ? conjugate(turn, m, d) : m);
      return {
        smallest,
        metric: () => backMatrix(metricInFrame(jumps, algebra)),
        gradient: (a) => back(gradientInFrame(algebra, jumps, inFrame(a))),
        mixed: (a) => backMatrix(mixedInFrame(algebra, jumps, inFrame(a))),
        hessian: (a) => backMatrix(hessianInFrame(algebra, jumps, lambda, inFrame(a))),
      };
    },
  };
}

/** In the eigenbasis the map divides the entry of a pair by λ_aλ_b, on all three kinds of Hermitian elements alike. */
function barrierOf(algebra: BlockAlgebra, rho: Float64Array): Float64Array {
  const { values, vectors, exact } = blockEigen(algebra, fromCoordinates(algebra, rho));
  const d = algebra.dimension;
  const out = new Float64Array(d * d);
  for (let k = 0; k < d; k++) out[k * d + k] = 1 / (values[algebra.row[k]] * values[algebra.col[k]]);
  return exact ? out : conjugate(coordinateRotation(algebra, vectors), out, d);
}

function rotated(v: ComplexMatrix, u: ComplexMatrix | null): ComplexMatrix {
  const n = v.rows;
  const out = zeros(n);
  rotateInto(out, v, u, n, new Float64Array(2 * n * n));
  return out;
}

/** [W, E_k] for every element of the Hermitian basis, one N×N matrix after another. */
function derivationImages(algebra: BlockAlgebra, w: ComplexMatrix): FrameJump['images'] {
  const { dimension: d, size: n, row, col } = algebra;
  const re = new Float64Array(d * n * n);
  const im = new Float64Array(d * n * n);
  const add = (k: number, i: number, j: number, x: number, y: number): void => {
    // (x + iy)[W, e_ij]: column j takes W's column i, row i loses W's row j.
    const base = k * n * n;
    for (let a = 0; a < n; a++) {
      const [wr, wi] = [w.re[a * n + i], w.im[a * n + i]];
      re[base + a * n + j] += x * wr - y * wi;
      im[base + a * n + j] += x * wi + y * wr;
      const [vr, vi] = [w.re[j * n + a], w.im[j * n + a]];
      re[base + i * n + a] -= x * vr - y * vi;
      im[base + i * n + a] -= x * vi + y * vr;
    }
  };
  for (let k = 0; k < d; k++) {
    const [i, j] = [row[k], col[k]];
    if (i === j) add(k, i, i, 1, 0);
    else if (i < j) {
      add(k, i, j, Math.SQRT1_2, 0);
      add(k, j, i, Math.SQRT1_2, 0);
    } else {
      add(k, j, i, 0, Math.SQRT1_2);
      add(k, i, j, 0, -Math.SQRT1_2);
    }
  }
  return { re, im };
}

/** Σ_j weight Re <X_k, F∘X_l>, symmetric D×D. */
function metricInFrame(jumps: readonly FrameJump[], { dimension: d, size: n }: BlockAlgebra): Float64Array {
  const out = new Float64Array(d * d);
  const nn = n * n;
  const scaled = new Float64Array(2 * nn);
  for (const { images, table, weight } of jumps) {
    for (let k = 0; k < d; k++) {
      for (let p = 0; p < nn; p++) {
        const f = weight * table.f[p];
        scaled[p] = f * images.re[k * nn + p];
        scaled[nn + p] = f * images.im[k * nn + p];
      }
      for (let l = k; l < d; l++) {
        let sum = 0;
        for (let p = 0, q = l * nn; p < nn; p++, q++) sum += scaled[p] * images.re[q] + scaled[nn + p] * images.im[q];
        out[k * d + l] += sum;
      }
    }
  }
  for (let k = 0; k < d; k++) for (let l = 0; l < k; l++) out[k * d + l] = out[l * d + k];
  return out;
}

/** R with coordinates of U*AU = R · coordinates of A, D×D orthogonal. */
function coordinateRotation(algebra: BlockAlgebra, u: ComplexMatrix): Float64Array {
  const { dimension: d, size: n } = algebra;
  const out = new Float64Array(d * d);
  const unit = new Float64Array(d);
  const [element, turned] = [zeros(n), zeros(n)];
  const scratch = new Float64Array(2 * n * n);
  const column = new Float64Array(d);
  for (let k = 0; k < d; k++) {
    unit.fill(0);
    unit[k] = 1;
    rotateInto(turned, fromCoordinates(algebra, unit, element), u, n, scratch);
    toCoordinates(algebra, turned, column);
    for (let l = 0; l < d; l++) out[l * d + k] = column[l];
  }
  return out;
}

function multiplyVector(r: Float64Array, x: Float64Array, d: number): Float64Array {
  const out = new Float64Array(d);
  for (let i = 0; i < d; i++) for (let j = 0; j < d; j++) out[i] += r[i * d + j] * x[j];
  return out;
}

function multiplyTransposed(r: Float64Array, x: Float64Array, d: number): Float64Array {
  const out = new Float64Array(d);
  for (let i = 0; i < d; i++) for (let j = 0; j < d; j++) out[j] += r[i * d + j] * x[i];
  return out;
}

/** Rᵀ M R. */
function conjugate(r: Float64Array, m: Float64Array, d: number): Float64Array {
  const half = new Float64Array(d * d);
  for (let i = 0; i < d; i++) {
    for (let k = 0; k < d; k++) {
      const x = m[i * d + k];
      if (x === 0) continue;
      for (let j = 0; j < d; j++) half[i * d + j] += x * r[k * d + j];
    }
  }
  const out = new Float64Array(d * d);
  for (let k = 0; k < d; k++) {
    for (let i = 0; i < d; i++) {
      const x = r[k * d + i];
      for (let j = 0; j < d; j++) out[i * d + j] += x * half[k * d + j];
    }
  }
  return out;
}
