import type { BlockAlgebra } from '../algebra/block-algebra.js';
import type { MatrixUnits } from '../algebra/matrix-units.js';

/** Turns a Hermitian form over matrix units into one over the algebra's orthonormal Hermitian basis. */
export interface HermitianFormConverter {
  /** Real part of the form on Hermitian observables: D×D symmetric, row-major. */
  realPart(re: Float64Array, im: Float64Array, out: Float64Array): void;
  /** The form on complex combinations X+iY as a real 2D×2D symmetric matrix over (X,Y). */
  doubled(re: Float64Array, im: Float64Array, out: Float64Array): void;
}

// eslint-disable-next-line max-lines-per-function -- two conversions over one workspace
export function hermitianFormConverter(algebra: BlockAlgebra, units: MatrixUnits): HermitianFormConverter {
  const d = units.count;
  const n = algebra.size;
  const tr = new Float64Array(d * d);
  const ti = new Float64Array(d * d);
  const sr = new Float64Array(d * d);
  const si = new Float64Array(d * d);
  // Coordinate k uses unit `unit[k]` and its adjoint; kind 0 diagonal, 1 real, 2 imaginary.
  const unit = new Int32Array(d);
  const kind = new Uint8Array(d);
  for (let k = 0; k < d; k++) {
    const i = algebra.row[k];
    const j = algebra.col[k];
    unit[k] = units.index[Math.min(i, j) * n + Math.max(i, j)];
    kind[k] = i === j ? 0 : i < j ? 1 : 2;
  }

  function convert(re: Float64Array, im: Float64Array): void {
    for (let p = 0; p < d; p++) {
      for (let k = 0; k < d; k++) {
        const a = p * d + unit[k];
        const b = p * d + units.adjoint[unit[k]];
        const t = p * d + k;
        if (kind[k] === 0) {
          tr[t] = re[a];
          ti[t] = im[a];
        } else if (kind[k] === 1) {
          tr[t] = (re[a] + re[b]) * Math.SQRT1_2;
          ti[t] = (im[a] + im[b]) * Math.SQRT1_2;
        } else {
          tr[t] = (im[b] - im[a]) * Math.SQRT1_2;
          ti[t] = (re[a] - re[b]) * Math.SQRT1_2;
        }
      }
    }
    for (let k = 0; k < d; k++) {
      const a = unit[k] * d;
      const b = units.adjoint[unit[k]] * d;
      for (let l = 0; l < d; l++) {
        const s = k * d + l;
        if (kind[k] === 0) {
          sr[s] = tr[a + l];
          si[s] = ti[a + l];
        } else if (kind[k] === 1) {
          sr[s] = (tr[a + l] + tr[b + l]) * Math.SQRT1_2;
          si[s] = (ti[a + l] + ti[b + l]) * Math.SQRT1_2;
        } else {
          sr[s] = (ti[a + l] - ti[b + l]) * Math.SQRT1_2;
          si[s] = (tr[b + l] - tr[a + l]) * Math.SQRT1_2;
        }
      }
    }
  }

  return {
    realPart(re, im, out) {
      convert(re, im);
      for (let k = 0; k < d; k++) {
        for (let l = 0; l <= k; l++) {
          const x = (sr[k * d + l] + sr[l * d + k]) / 2;
          out[k * d + l] = x;
          out[l * d + k] = x;
        }
      }
    },
    doubled(re, im, out) {
      convert(re, im);
      const m = 2 * d;
      for (let k = 0; k < d; k++) {
        for (let l = 0; l < d; l++) {
          const real = (sr[k * d + l] + sr[l * d + k]) / 2;
          const imaginary = (si[k * d + l] - si[l * d + k]) / 2;
          out[k * m + l] = real;
          out[(k + d) * m + l + d] = real;
          out[(k + d) * m + l] = imaginary;
          out[k * m + l + d] = -imaginary;
        }
      }
    },
  };
}
