/**
 * Householder reflections that move given orthonormal vectors (rows of `vectors`, count × n) to the last coordinates,
 * so that a symmetric matrix with those vectors in its kernel keeps only its leading block.
 */
export interface Deflation {
  readonly reflectors: Float64Array;
  readonly count: number;
  readonly n: number;
}

/** Compute the reflections; `vectors` is overwritten. */
export function deflation(vectors: Float64Array, count: number, n: number): Deflation {
  for (let k = 0; k < count; k++) {
    const pivot = n - 1 - k;
    const v = vectors.subarray(k * n, (k + 1) * n);
    for (let j = 0; j < k; j++) reflect(v, vectors.subarray(j * n, (j + 1) * n), n - j);
    let norm = 0;
    for (let i = 0; i <= pivot; i++) norm += v[i] * v[i];
    norm = Math.sqrt(norm);
    v[pivot] += v[pivot] >= 0 ? norm : -norm;
    let length = 0;
    for (let i = 0; i <= pivot; i++) length += v[i] * v[i];
    const scale = Math.SQRT2 / Math.sqrt(length);
    for (let i = 0; i < n; i++) v[i] = i <= pivot ? v[i] * scale : 0;
  }
  return { reflectors: vectors, count, n };
}

/** Leading (n−count)×(n−count) block of H A H for symmetric A; A is overwritten, the block is written to out. */
export function deflateSymmetric(d: Deflation, a: Float64Array, out: Float64Array, work: Float64Array): void {
  const { n, count } = d;
  for (let k = 0; k < count; k++) reflectSymmetric(a, n, d.reflectors.subarray(k * n, (k + 1) * n), work);
  const m = n - count;
  for (let i = 0; i < m; i++) {
    for (let j = 0; j < m; j++) out[i * m + j] = a[i * n + j];
  }
}

/** Full vector (length n) of a vector of the leading block, written to out. */
export function inflate(d: Deflation, x: Float64Array, out: Float64Array): Float64Array {
  out.fill(0);
  out.set(x);
  for (let k = d.count - 1; k >= 0; k--) reflect(out, d.reflectors.subarray(k * d.n, (k + 1) * d.n), d.n);
  return out;
}

/** x −= v (v·x) with |v|² = 2. */
function reflect(x: Float64Array, v: Float64Array, length: number): void {
  let dot = 0;
  for (let i = 0; i < length; i++) dot += v[i] * x[i];
  for (let i = 0; i < length; i++) x[i] -= dot * v[i];
}

/** A ← (1−vvᵀ)A(1−vvᵀ) with |v|² = 2: rank-two update. */
function reflectSymmetric(a: Float64Array, n: number, v: Float64Array, w: Float64Array): void {
  let vav = 0;
  for (let i = 0; i < n; i++) {
    let sum = 0;
    for (let j = 0; j < n; j++) sum += a[i * n + j] * v[j];
    w[i] = sum;
    vav += v[i] * sum;
  }
  for (let i = 0; i < n; i++) w[i] -= (vav / 2) * v[i];
  for (let i = 0; i < n; i++) {
    for (let j = 0; j < n; j++) a[i * n + j] -= v[i] * w[j] + w[i] * v[j];
  }
}
