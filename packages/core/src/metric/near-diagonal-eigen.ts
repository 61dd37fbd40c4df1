import { EPSILON } from '../tolerances.js';

/**
 * Cyclic complex Jacobi on a Hermitian matrix that is nearly diagonal, in place and without allocation: a (n×n, re and
 * im) ends diagonal, v (n×n) holds the eigenvectors in columns, close to the identity; values are left unsorted on the
 * diagonal of `re`. Keeps small eigenvalues of graded matrices accurate (Demmel & Veselić, SIAM J. Matrix Anal. 13 (1992)).
 */
export function nearDiagonalEigen(
  re: Float64Array,
  im: Float64Array,
  n: number,
  vr: Float64Array,
  vi: Float64Array,
): void {
  vr.fill(0);
  vi.fill(0);
  for (let i = 0; i < n; i++) vr[i * n + i] = 1;
  for (let sweep = 0; sweep < 12; sweep++) {
    let rotated = false;
    for (let p = 0; p < n; p++) {
      for (let q = p + 1; q < n; q++) {
        const size = Math.hypot(re[p * n + q], im[p * n + q]);
        if (size <= EPSILON * Math.sqrt(Math.abs(re[p * n + p] * re[q * n + q])) || size === 0) continue;
        rotated = true;
        rotate(re, im, n, p, q, size, vr, vi);
      }
    }
    if (!rotated) return;
  }
}

function rotate(
  re: Float64Array,
  im: Float64Array,
  n: number,
  p: number,
  q: number,
  size: number,
  vr: Float64Array,
  vi: Float64Array,
): void {
  const theta = (re[q * n + q] - re[p * n + p]) / (2 * size);
  const t = (theta >= 0 ? 1 : -1) / (Math.abs(theta) + Math.sqrt(theta * theta + 1));
  const c = 1 / Math.sqrt(t * t + 1);
  const s = t * c;
  // Phase of a_pq: column p ← c·col_p − s·e^{−iφ} col_q, column q ← s·e^{iφ} col_p + c·col_q.
  const er = re[p * n + q] / size;
  const ei = im[p * n + q] / size;
  columns(re, im, n, p, q, c, s, er, ei);
  columns(vr, vi, n, p, q, c, s, er, ei);
  for (let k = 0; k < n; k++) {
    const xr = re[p * n + k];
    const xi = im[p * n + k];
    const yr = re[q * n + k];
    const yi = im[q * n + k];
    re[p * n + k] = c * xr - s * (er * yr - ei * yi);
    im[p * n + k] = c * xi - s * (er * yi + ei * yr);
    re[q * n + k] = s * (er * xr + ei * xi) + c * yr;
    im[q * n + k] = s * (er * xi - ei * xr) + c * yi;
  }
}

function columns(
  ar: Float64Array,
  ai: Float64Array,
  n: number,
  p: number,
  q: number,
  c: number,
  s: number,
  er: number,
  ei: number,
): void {
  for (let k = 0; k < n; k++) {
    const xr = ar[k * n + p];
    const xi = ai[k * n + p];
    const yr = ar[k * n + q];
    const yi = ai[k * n + q];
    ar[k * n + p] = c * xr - s * (er * yr + ei * yi);
    ai[k * n + p] = c * xi - s * (er * yi - ei * yr);
    ar[k * n + q] = s * (er * xr - ei * xi) + c * yr;
    ai[k * n + q] = s * (er * xi + ei * xr) + c * yi;
  }
}
