import { zeros, copy, type ComplexMatrix } from './complex-matrix.js';
import { safeUnit } from './safe-unit.js';
import { requireFinite } from './shape-checks.js';

/**
 * Householder factors of A P = Q R for a complex m × n matrix, stored as in the real `PackedQR`; the reflectors
 * H_k = 1 − scale[k] v v* have a real scale, and the diagonal of R is complex.
 */
export interface PackedComplexQR {
  readonly packed: ComplexMatrix;
  readonly scale: Float64Array;
  readonly pivots: Int32Array;
}

/** Thin factors A = Q R without pivoting: Q is m × k with orthonormal columns, R is k × n upper triangular, k = min(m, n). */
export function qrComplex(a: ComplexMatrix): { q: ComplexMatrix; r: ComplexMatrix } {
  const factors = packedComplexQR(a, false);
  return { q: unitaryColumns(factors, 0, Math.min(a.rows, a.cols)), r: upperTriangleComplex(factors) };
}

/** Householder QR, with column pivoting by largest remaining norm if wanted. Throws `not-finite`. */
export function packedComplexQR(a: ComplexMatrix, pivoting: boolean): PackedComplexQR {
  requireFinite(a.re);
  requireFinite(a.im);
  const inverse = 1 / Math.max(safeUnit(a.re, a.re.length), safeUnit(a.im, a.im.length));
  const packed = copy(a);
  const steps = Math.min(a.rows, a.cols);
  const scale = new Float64Array(steps);
  const pivots = Int32Array.from({ length: a.cols }, (_, j) => j);
  const work = zeros(1, a.cols);
  for (let k = 0; k < steps; k++) {
    if (pivoting) swapColumns(packed, pivots, k, largestColumn(packed, k, work.re, inverse));
    scale[k] = formReflector(packed, k);
    if (scale[k] > 0) reflectColumns(packed, k, scale[k], work);
  }
  return { packed, scale, pivots };
}

/** Columns from … to − 1 of the full m × m factor Q. */
export function unitaryColumns({ packed, scale }: PackedComplexQR, from: number, to: number): ComplexMatrix {
  const { rows: m, cols: n } = packed;
  const width = to - from;
  const q = zeros(m, width);
  for (let j = 0; j < width; j++) q.re[(from + j) * width + j] = 1;
  const work = zeros(1, width);
  for (let k = scale.length - 1; k >= 0; k--) {
    if (scale[k] === 0) continue;
    work.re.set(q.re.subarray(k * width, (k + 1) * width));
    work.im.set(q.im.subarray(k * width, (k + 1) * width));
    for (let i = k + 1; i < m; i++) addConjugate(work, q, i, packed.re[i * n + k], packed.im[i * n + k], 0);
    subtractRow(q, k, scale[k], 0, work, 0);
    for (let i = k + 1; i < m; i++) {
      subtractRow(q, i, scale[k] * packed.re[i * n + k], scale[k] * packed.im[i * n + k], work, 0);
    }
  }
  return q;
}

/** R as a min(m, n) × n matrix. */
export function upperTriangleComplex({ packed }: PackedComplexQR): ComplexMatrix {
  const k = Math.min(packed.rows, packed.cols);
  const n = packed.cols;
  const r = { rows: k, cols: n, re: packed.re.slice(0, k * n), im: packed.im.slice(0, k * n) };
  for (let i = 1; i < k; i++) {
    r.re.fill(0, i * n, i * n + i);
    r.im.fill(0, i * n, i * n + i);
  }
  return r;
}

function largestColumn(a: ComplexMatrix, k: number, sums: Float64Array, inverse: number): number {
  sums.fill(0);
  for (let i = k; i < a.rows; i++) {
    for (let j = k, p = i * a.cols + k; j < a.cols; j++, p++)
      sums[j] += (a.re[p] * inverse) ** 2 + (a.im[p] * inverse) ** 2;
  }
  let best = k;
  for (let j = k + 1; j < a.cols; j++) if (sums[j] > sums[best]) best = j;
  return best;
}

function swapColumns(a: ComplexMatrix, pivots: Int32Array, k: number, j: number): void {
  if (k === j) return;
  for (const part of [a.re, a.im]) {
    for (let p = 0; p < part.length; p += a.cols) {
      const x = part[p + k];
      part[p + k] = part[p + j];
      part[p + j] = x;
    }
  }
  const index = pivots[k];
  pivots[k] = pivots[j];
  pivots[j] = index;
}

/** As in the real case; r_kk = −(a_kk/|a_kk|) ‖column‖. */
function formReflector(a: ComplexMatrix, k: number): number {
  const { rows: m, cols: n, re, im } = a;
  let top = 0;
  for (let i = k + 1; i < m; i++) top = Math.max(top, Math.abs(re[i * n + k]), Math.abs(im[i * n + k]));
  if (top === 0) return 0;
  const d = k * n + k;
  const size = Math.hypot(re[d], im[d]);
  const unit = Math.max(top, size);
  let sum = 0;
  for (let p = d; p < m * n; p += n) sum += (re[p] / unit) ** 2 + (im[p] / unit) ** 2;
  const norm = unit * Math.sqrt(sum);
  const cos = size > 0 ? re[d] / size : 1;
  const sin = size > 0 ? im[d] / size : 0;
  // v = column / ((a_kk/|a_kk|)(|a_kk| + norm)), with leading entry 1.
  const lead = size + norm;
  for (let p = d + n; p < m * n; p += n) {
    const x = re[p] / lead;
    const y = im[p] / lead;
    re[p] = x * cos + y * sin;
    im[p] = y * cos - x * sin;
  }
  re[d] = -cos * norm;
  im[d] = -sin * norm;
  return lead / norm;
}

/** Applies H_k to columns k + 1 … n − 1. */
function reflectColumns(a: ComplexMatrix, k: number, scale: number, work: ComplexMatrix): void {
  const { rows: m, cols: n } = a;
  work.re.set(a.re.subarray(k * n, (k + 1) * n));
  work.im.set(a.im.subarray(k * n, (k + 1) * n));
  for (let i = k + 1; i < m; i++) addConjugate(work, a, i, a.re[i * n + k], a.im[i * n + k], k + 1);
  subtractRow(a, k, scale, 0, work, k + 1);
  for (let i = k + 1; i < m; i++) subtractRow(a, i, scale * a.re[i * n + k], scale * a.im[i * n + k], work, k + 1);
}

/** work += conj(v) · row i of a, from column `from`. */
function addConjugate(work: ComplexMatrix, a: ComplexMatrix, i: number, re: number, im: number, from: number): void {
  for (let j = from, p = i * a.cols + from; j < a.cols; j++, p++) {
    work.re[j] += re * a.re[p] + im * a.im[p];
    work.im[j] += re * a.im[p] - im * a.re[p];
  }
}

/** Row i of a −= v · work, from column `from`. */
function subtractRow(a: ComplexMatrix, i: number, re: number, im: number, work: ComplexMatrix, from: number): void {
  for (let j = from, p = i * a.cols + from; j < a.cols; j++, p++) {
    a.re[p] -= re * work.re[j] - im * work.im[j];
    a.im[p] -= re * work.im[j] + im * work.re[j];
  }
}
