import type { ComplexMatrix } from './complex-matrix.js';

/** target += A B for shapes that fit (not checked). Exactly zero entries of A are skipped: matrix units are common. */
export function multiplyInto(target: ComplexMatrix, a: ComplexMatrix, b: ComplexMatrix): void {
  const { rows, cols: inner, re: ar, im: ai } = a;
  const { cols, re: br, im: bi } = b;
  const { re: cr, im: ci } = target;
  for (let i = 0; i < rows; i++) {
    const row = i * cols;
    for (let k = 0; k < inner; k++) {
      const x = ar[i * inner + k];
      const y = ai[i * inner + k];
      if (x === 0 && y === 0) continue;
      for (let j = 0, q = k * cols, p = row; j < cols; j++, q++, p++) {
        cr[p] += x * br[q] - y * bi[q];
        ci[p] += x * bi[q] + y * br[q];
      }
    }
  }
}
