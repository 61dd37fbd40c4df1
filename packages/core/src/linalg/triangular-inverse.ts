import { frobeniusNorm, zeros, type ComplexMatrix } from './complex-matrix.js';

/** ‖R⁻¹‖_F of an upper triangular matrix. */
export function inverseNorm(r: ComplexMatrix): number {
  const n = r.rows;
  const x = zeros(n);
  for (let i = n - 1; i >= 0; i--) {
    const dr = r.re[i * n + i];
    const di = r.im[i * n + i];
    x.re[i * n + i] = 1;
    for (let k = i + 1; k < n; k++) {
      const ur = r.re[i * n + k];
      const ui = r.im[i * n + k];
      for (let j = k, p = i * n + k, q = k * n + k; j < n; j++, p++, q++) {
        x.re[p] -= ur * x.re[q] - ui * x.im[q];
        x.im[p] -= ur * x.im[q] + ui * x.re[q];
      }
    }
    const size = dr * dr + di * di;
    for (let p = i * n + i; p < (i + 1) * n; p++) {
      const re = x.re[p];
      x.re[p] = (re * dr + x.im[p] * di) / size;
      x.im[p] = (x.im[p] * dr - re * di) / size;
    }
  }
  return frobeniusNorm(x);
}
