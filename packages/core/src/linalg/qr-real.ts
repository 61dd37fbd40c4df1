import { safeUnit } from './safe-unit.js';
import { requireFinite, requireLength } from './shape-checks.js';

/**
 * Householder factors of a P = Q R for a real m × n matrix: R in the upper triangle of `packed` (m × n), reflector k below
 * the diagonal of column k with leading entry 1, and scale[k] so that H_k = 1 − scale[k] v vᵀ. Column k of a P is column
 * pivots[k] of a.
 */
export interface PackedQR {
  readonly m: number;
  readonly n: number;
  readonly packed: Float64Array;
  readonly scale: Float64Array;
  readonly pivots: Int32Array;
}

/** Thin factors a = q r without pivoting: q is m × k with orthonormal columns, r is k × n upper triangular, k = min(m, n). */
export function qrReal(a: Float64Array, m: number, n: number): { q: Float64Array; r: Float64Array } {
  const factors = packedQR(a, m, n, false);
  const k = Math.min(m, n);
  return { q: orthogonalColumns(factors, 0, k), r: upperTriangle(factors) };
}

/**
 * Householder QR; with `pivoting` the column of largest remaining norm comes next, so that |r_kk| does not increase
 * (Businger & Golub, Numer. Math. 7 (1965)). Throws `dimension-mismatch`, `not-finite`.
 */
export function packedQR(a: Float64Array, m: number, n: number, pivoting: boolean): PackedQR {
  requireLength(a, m * n);
  requireFinite(a);
  const inverse = 1 / safeUnit(a, a.length);
  const packed = a.slice();
  const steps = Math.min(m, n);
  const scale = new Float64Array(steps);
  const pivots = Int32Array.from({ length: n }, (_, j) => j);
  const work = new Float64Array(n);
  for (let k = 0; k < steps; k++) {
    if (pivoting) {
      // Norms are recomputed, not downdated: one more pass over the block, and no cancellation.
      const best = largestColumn(packed, m, n, k, work, inverse);
      if (best !== k) swapColumns(packed, m, n, pivots, k, best);
    }
    scale[k] = formReflector(packed, m, n, k);
    if (scale[k] > 0) reflectColumns(packed, m, n, k, k + 1, scale[k], work);
  }
  return { m, n, packed, scale, pivots };
}

/** Columns from … to − 1 of the full m × m factor Q, as a row-major m × (to − from) matrix. */
export function orthogonalColumns({ m, n, packed, scale }: PackedQR, from: number, to: number): Float64Array {
  const width = to - from;
  const q = new Float64Array(m * width);
  for (let j = 0; j < width; j++) q[(from + j) * width + j] = 1;
  const work = new Float64Array(width);
  for (let k = scale.length - 1; k >= 0; k--) {
    // q ← (1 − scale v vᵀ) q on rows k … m − 1.
    work.set(q.subarray(k * width, (k + 1) * width));
    for (let i = k + 1; i < m; i++) {
      const v = packed[i * n + k];
      for (let j = 0, p = i * width; j < width; j++, p++) work[j] += v * q[p];
    }
    for (let i = k; i < m; i++) {
      const v = scale[k] * (i === k ? 1 : packed[i * n + k]);
      for (let j = 0, p = i * width; j < width; j++, p++) q[p] -= v * work[j];
    }
  }
  return q;
}

/** R as a min(m, n) × n matrix. */
export function upperTriangle({ m, n, packed }: PackedQR): Float64Array {
  const r = packed.slice(0, Math.min(m, n) * n);
  for (let i = 1; i < Math.min(m, n); i++) r.fill(0, i * n, i * n + i);
  return r;
}

function largestColumn(a: Float64Array, m: number, n: number, k: number, sums: Float64Array, inverse: number): number {
  sums.fill(0);
  for (let i = k; i < m; i++) {
    for (let j = k, p = i * n + k; j < n; j++, p++) sums[j] += (a[p] * inverse) ** 2;
  }
  let best = k;
  for (let j = k + 1; j < n; j++) if (sums[j] > sums[best]) best = j;
  return best;
}

function swapColumns(a: Float64Array, m: number, n: number, pivots: Int32Array, k: number, j: number): void {
  for (let p = 0; p < m * n; p += n) {
    const x = a[p + k];
    a[p + k] = a[p + j];
    a[p + j] = x;
  }
  const index = pivots[k];
  pivots[k] = pivots[j];
  pivots[j] = index;
}

/** Turns column k from row k into r_kk and a reflector with leading entry 1; returns its scale, 0 for none. */
function formReflector(a: Float64Array, m: number, n: number, k: number): number {
  let top = 0;
  for (let i = k + 1; i < m; i++) top = Math.max(top, Math.abs(a[i * n + k]));
  if (top === 0) return 0;
  const diagonal = a[k * n + k];
  const unit = Math.max(top, Math.abs(diagonal));
  let sum = 0;
  for (let i = k; i < m; i++) sum += (a[i * n + k] / unit) ** 2;
  const norm = unit * Math.sqrt(sum);
  const r = diagonal > 0 ? -norm : norm;
  const lead = diagonal - r;
  for (let i = k + 1; i < m; i++) a[i * n + k] /= lead;
  a[k * n + k] = r;
  return -lead / r;
}

/** Applies H_k to columns from … n − 1. */
function reflectColumns(
  a: Float64Array,
  m: number,
  n: number,
  k: number,
  from: number,
  scale: number,
  work: Float64Array,
): void {
  for (let j = from; j < n; j++) work[j] = a[k * n + j];
  for (let i = k + 1; i < m; i++) {
    const v = a[i * n + k];
    for (let j = from, p = i * n + from; j < n; j++, p++) work[j] += v * a[p];
  }
  for (let j = from; j < n; j++) {
    work[j] *= scale;
    a[k * n + j] -= work[j];
  }
  for (let i = k + 1; i < m; i++) {
    const v = a[i * n + k];
    for (let j = from, p = i * n + from; j < n; j++, p++) a[p] -= v * work[j];
  }
}
