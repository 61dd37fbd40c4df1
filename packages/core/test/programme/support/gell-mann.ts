import { scale, zeros, type ComplexMatrix } from '../../../src/linalg/complex-matrix.js';

/** Hermitian traceless basis of M_n (generalised Gell-Mann matrices), Tr λ_aλ_b = 2δ_ab. */
export function gellMann(n: number): ComplexMatrix[] {
  const list: ComplexMatrix[] = [];
  for (let i = 0; i < n; i++) {
    for (let j = 0; j < i; j++) {
      const real = zeros(n);
      real.re[i * n + j] = real.re[j * n + i] = 1;
      const imaginary = zeros(n);
      imaginary.im[j * n + i] = -1;
      imaginary.im[i * n + j] = 1;
      list.push(real, imaginary);
    }
  }
  for (let k = 1; k < n; k++) {
    const diagonal = zeros(n);
    const factor = Math.sqrt(2 / (k * (k + 1)));
    for (let i = 0; i < k; i++) diagonal.re[i * n + i] = factor;
    diagonal.re[k * n + k] = -k * factor;
    list.push(diagonal);
  }
  return list;
}

/** Jumps of L(A) = Tr(A)/n − A: Σ λ_a A λ_a = 2 Tr(A) − (2/n) A, so R_a = λ_a/√(2n). */
export function depolarisingJumps(n: number): ComplexMatrix[] {
  return gellMann(n).map((a) => scale(a, 1 / Math.sqrt(2 * n)));
}
