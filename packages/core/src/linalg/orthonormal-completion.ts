import type { ComplexMatrix } from './complex-matrix.js';

/**
 * Fills columns from … cols − 1 of q (rows ≥ cols) so that all columns are orthonormal, given that the first `from` are.
 * Each new column is a unit vector of largest remaining length, orthogonalised twice.
 */
export function completeOrthonormal(q: ComplexMatrix, from: number): void {
  const { rows, cols, re, im } = q;
  for (let j = from; j < cols; j++) {
    const start = leastCoveredRow(q, j);
    for (let i = 0; i < rows; i++) re[i * cols + j] = im[i * cols + j] = 0;
    re[start * cols + j] = 1;
    removeEarlier(q, j);
    normaliseColumn(q, j);
    removeEarlier(q, j);
    normaliseColumn(q, j);
  }
}

/** The unit vector whose projection on the first j columns is smallest: at least 1 − j/rows of it remains. */
function leastCoveredRow({ rows, cols, re, im }: ComplexMatrix, j: number): number {
  let best = 0;
  let least = Infinity;
  for (let i = 0; i < rows; i++) {
    let sum = 0;
    for (let p = i * cols; p < i * cols + j; p++) sum += re[p] * re[p] + im[p] * im[p];
    if (sum < least) {
      least = sum;
      best = i;
    }
  }
  return best;
}

function removeEarlier({ rows, cols, re, im }: ComplexMatrix, j: number): void {
  for (let k = 0; k < j; k++) {
    let x = 0;
    let y = 0;
    for (let p = k, r = j; p < rows * cols; p += cols, r += cols) {
      x += re[p] * re[r] + im[p] * im[r];
      y += re[p] * im[r] - im[p] * re[r];
    }
    for (let p = k, r = j; p < rows * cols; p += cols, r += cols) {
      re[r] -= re[p] * x - im[p] * y;
      im[r] -= re[p] * y + im[p] * x;
    }
  }
}

function normaliseColumn({ rows, cols, re, im }: ComplexMatrix, j: number): void {
  let sum = 0;
  for (let p = j; p < rows * cols; p += cols) sum += re[p] * re[p] + im[p] * im[p];
  const norm = Math.sqrt(sum);
  for (let p = j; p < rows * cols; p += cols) {
    re[p] /= norm;
    im[p] /= norm;
  }
}
