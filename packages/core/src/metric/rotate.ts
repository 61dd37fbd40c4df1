import type { ComplexMatrix } from '../linalg/complex-matrix.js';

/** out = U* V U for N×N U, V (U null: V itself); scratch holds at least 2N² numbers. */
export function rotateInto(
  out: { readonly re: Float64Array; readonly im: Float64Array },
  v: ComplexMatrix,
  u: ComplexMatrix | null,
  scratch: Float64Array,
): void {
  if (!u) {
    out.re.set(v.re);
    out.im.set(v.im);
    return;
  }
  const n = v.rows;
  const nn = n * n;
  for (let i = 0; i < n; i++) {
    for (let j = 0; j < n; j++) {
      let re = 0;
      let im = 0;
      for (let k = 0; k < n; k++) {
        const ar = v.re[i * n + k];
        const ai = v.im[i * n + k];
        const br = u.re[k * n + j];
        const bi = u.im[k * n + j];
        re += ar * br - ai * bi;
        im += ar * bi + ai * br;
      }
      scratch[i * n + j] = re;
      scratch[nn + i * n + j] = im;
    }
  }
  for (let i = 0; i < n; i++) {
    for (let j = 0; j < n; j++) {
      let re = 0;
      let im = 0;
      for (let k = 0; k < n; k++) {
        const ar = u.re[k * n + i];
        const ai = -u.im[k * n + i];
        const br = scratch[k * n + j];
        const bi = scratch[nn + k * n + j];
        re += ar * br - ai * bi;
        im += ar * bi + ai * br;
      }
      out.re[i * n + j] = re;
      out.im[i * n + j] = im;
    }
  }
}
