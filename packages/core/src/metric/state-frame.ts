import { type ComplexMatrix, zeros } from '../linalg/complex-matrix.js';

/** A positive matrix through its eigenvalues and a block-diagonal unitary: ρ = U diag(λ) U*; U null stands for the identity. */
export interface StateFrame {
  readonly lambda: Float64Array;
  readonly u: ComplexMatrix | null;
}

/** The matrix U diag(values) U*. */
export function fromFrame({ lambda, u }: StateFrame): ComplexMatrix {
  const n = lambda.length;
  const out = zeros(n);
  if (!u) {
    for (let i = 0; i < n; i++) out.re[i * n + i] = lambda[i];
    return out;
  }
  for (let i = 0; i < n; i++) {
    for (let j = i; j < n; j++) {
      let re = 0;
      let im = 0;
      for (let k = 0; k < n; k++) {
        const ar = u.re[i * n + k];
        const ai = u.im[i * n + k];
        const br = u.re[j * n + k];
        const bi = u.im[j * n + k];
        re += lambda[k] * (ar * br + ai * bi);
        im += lambda[k] * (ai * br - ar * bi);
      }
      out.re[i * n + j] = re;
      out.re[j * n + i] = re;
      out.im[i * n + j] = i === j ? 0 : im;
      out.im[j * n + i] = i === j ? 0 : -im;
    }
  }
  return out;
}
