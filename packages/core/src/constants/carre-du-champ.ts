import type { BlockAlgebra } from '../algebra/block-algebra.js';
import { applyGenerator } from '../generator/apply-generator.js';
import type { Generator } from '../generator/generator.js';
import { type ComplexMatrix, zeros } from '../linalg/complex-matrix.js';
import { type MatrixUnits, matrixUnits } from '../algebra/matrix-units.js';

/**
 * The M-valued forms Γ(A,B) = ½(L(A*B) − L(A)*B − A*L(B)) and Γ₂(A,B) = ½(LΓ(A,B) − Γ(A,LB) − Γ(LA,B)) on matrix
 * units (Bakry & Émery 1985), cut to each block b of the algebra: Hermitian matrices of side D·n_b with entry
 * ((p,k),(q,l)) = Γ(e_p,e_q)_{kl}, k and l in block b.
 */
export interface CarreDuChamp {
  readonly units: MatrixUnits;
  readonly blocks: readonly { readonly block: number; readonly gamma: ComplexMatrix; readonly gamma2: ComplexMatrix }[];
}

/** Build both forms from L alone; no symmetry is needed. Cost D⁴. */
export function carreDuChamp(g: Generator): CarreDuChamp {
  const units = matrixUnits(g.algebra);
  const d = units.count;
  const l = generatorOnUnits(g, units);
  const gamma = gammaTensor(units, l);
  const gamma2 = gamma2Tensor(d, l, gamma);
  const blocks = g.algebra.blocks.map((_, block) => ({
    block,
    gamma: cut(g.algebra, units, gamma, block),
    gamma2: cut(g.algebra, units, gamma2, block),
  }));
  return { units, blocks };
}

/** Entry [p·d + q] = coefficient of e_p in L(e_q). */
function generatorOnUnits(g: Generator, units: MatrixUnits): Parts {
  const d = units.count;
  const n = units.size;
  const out = parts(d * d);
  for (let q = 0; q < d; q++) {
    const e = zeros(n);
    e.re[units.row[q] * n + units.col[q]] = 1;
    const image = applyGenerator(g, e);
    for (let p = 0; p < d; p++) {
      out.re[p * d + q] = image.re[units.row[p] * n + units.col[p]];
      out.im[p * d + q] = image.im[units.row[p] * n + units.col[p]];
    }
  }
  return out;
}

interface Parts {
  readonly re: Float64Array;
  readonly im: Float64Array;
}

const parts = (length: number): Parts => ({ re: new Float64Array(length), im: new Float64Array(length) });

/** Entry [(p·d + q)·d + r] = coefficient of e_r in Γ(e_p,e_q). */
function gammaTensor(units: MatrixUnits, l: Parts): Parts {
  const { count: d, size: n, row, col, index } = units;
  const out = parts(d * d * d);
  for (let p = 0; p < d; p++) {
    const a = row[p];
    const b = col[p];
    for (let q = 0; q < d; q++) {
      const c = row[q];
      const e = col[q];
      const base = (p * d + q) * d;
      if (a === c) {
        const be = index[b * n + e];
        for (let r = 0; r < d; r++) {
          out.re[base + r] += 0.5 * l.re[r * d + be];
          out.im[base + r] += 0.5 * l.im[r * d + be];
        }
      }
      // L(e_ab)* e_ce: coefficient of e_ke is conj(L(e_ab)_ck); e_ba L(e_ce): coefficient of e_bk is L(e_ce)_ak.
      for (let k = 0; k < n; k++) {
        const ck = index[c * n + k];
        const ke = index[k * n + e];
        if (ck >= 0 && ke >= 0) {
          out.re[base + ke] -= 0.5 * l.re[ck * d + p];
          out.im[base + ke] += 0.5 * l.im[ck * d + p];
        }
        const ak = index[a * n + k];
        const bk = index[b * n + k];
        if (ak >= 0 && bk >= 0) {
          out.re[base + bk] -= 0.5 * l.re[ak * d + q];
          out.im[base + bk] -= 0.5 * l.im[ak * d + q];
        }
      }
    }
  }
  return out;
}

function gamma2Tensor(d: number, l: Parts, gamma: Parts): Parts {
  const out = parts(d * d * d);
  for (let p = 0; p < d; p++) {
    for (let q = 0; q < d; q++) {
      const base = (p * d + q) * d;
      for (let s = 0; s < d; s++) {
        const gr = 0.5 * gamma.re[base + s];
        const gi = 0.5 * gamma.im[base + s];
        if (gr !== 0 || gi !== 0) {
          for (let r = 0; r < d; r++) {
            const lr = l.re[r * d + s];
            const li = l.im[r * d + s];
            out.re[base + r] += gr * lr - gi * li;
            out.im[base + r] += gr * li + gi * lr;
          }
        }
        addScaled(out, base, gamma, (p * d + s) * d, d, -0.5 * l.re[s * d + q], -0.5 * l.im[s * d + q]);
        addScaled(out, base, gamma, (s * d + q) * d, d, -0.5 * l.re[s * d + p], 0.5 * l.im[s * d + p]);
      }
    }
  }
  return out;
}

/** out[to..] += (x + iy)·from[at..] over d entries. */
function addScaled(out: Parts, to: number, from: Parts, at: number, d: number, x: number, y: number): void {
  if (x === 0 && y === 0) return;
  for (let r = 0; r < d; r++) {
    const re = from.re[at + r];
    const im = from.im[at + r];
    out.re[to + r] += x * re - y * im;
    out.im[to + r] += x * im + y * re;
  }
}

function cut(algebra: BlockAlgebra, units: MatrixUnits, tensor: Parts, block: number): ComplexMatrix {
  const d = units.count;
  const size = algebra.blocks[block];
  const start = algebra.offsets[block];
  const side = d * size;
  const out = zeros(side);
  for (let p = 0; p < d; p++) {
    for (let q = 0; q < d; q++) {
      for (let k = 0; k < size; k++) {
        for (let l = 0; l < size; l++) {
          const r = units.index[(start + k) * units.size + start + l];
          const at = (p * size + k) * side + q * size + l;
          out.re[at] = tensor.re[(p * d + q) * d + r];
          out.im[at] = tensor.im[(p * d + q) * d + r];
        }
      }
    }
  }
  return out;
}
