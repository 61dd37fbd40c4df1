import type { BlockAlgebra } from '../algebra/block-algebra.js';
import { type ComplexMatrix, innerProduct, multiplyAdjointFirst, scale, zeros } from '../linalg/complex-matrix.js';
import { addScaledInto } from '../linalg/complex-matrix.js';
import type { CanonicalForm } from '../structure/canonical-form.js';

/** The jumps of a canonical form as a lift uses them, each cut to its corner of the algebra. */
export interface LiftJump {
  /** V_j, N×N. */
  readonly matrix: ComplexMatrix;
  readonly frequency: number;
  /** Index of V_j*. */
  readonly partner: number;
  /** w_j = e^{ω_j/2}. */
  readonly weight: number;
  /** Blocks r, c with V_j in the corner P_r M_N P_c. */
  readonly row: number;
  readonly col: number;
  /** R_j = √2 e^{−ω_j/4} V_j, the corner alone: n_r × n_c. */
  readonly corner: ComplexMatrix;
}

export interface LiftModel {
  readonly algebra: BlockAlgebra;
  readonly jumps: readonly LiftJump[];
  /** S = Σ R_m*R_m cut to each block. */
  readonly drift: readonly ComplexMatrix[];
}

/** Cut the jumps of a canonical form into corners. */
export function liftModel({ algebra, jumps }: Pick<CanonicalForm, 'algebra' | 'jumps'>): LiftModel {
  const cut = jumps.map(({ matrix, frequency, partner }): LiftJump => {
    const [row, col] = cornerOf(algebra, matrix);
    const corner = scale(subMatrix(algebra, matrix, row, col), Math.SQRT2 * Math.exp(-frequency / 4));
    return { matrix, frequency, partner, weight: Math.exp(frequency / 2), row, col, corner };
  });
  const drift = algebra.blocks.map((n) => zeros(n));
  for (const { corner, col } of cut) addScaledInto(drift[col], multiplyAdjointFirst(corner, corner), 1);
  return { algebra, jumps: cut, drift };
}

/** The corner (r, c) that holds most of a matrix. */
function cornerOf(algebra: BlockAlgebra, a: ComplexMatrix): [number, number] {
  let best: [number, number] = [0, 0];
  let most = -1;
  algebra.blocks.forEach((_, r) => {
    algebra.blocks.forEach((__, c) => {
      const part = subMatrix(algebra, a, r, c);
      const size = innerProduct(part, part).re;
      if (size > most) {
        most = size;
        best = [r, c];
      }
    });
  });
  return best;
}

/** The n_r × n_c corner P_r A P_c. */
export function subMatrix(algebra: BlockAlgebra, a: ComplexMatrix, r: number, c: number): ComplexMatrix {
  const rows = algebra.blocks[r];
  const cols = algebra.blocks[c];
  const out = zeros(rows, cols);
  for (let i = 0; i < rows; i++) {
    for (let j = 0; j < cols; j++) {
      const from = (algebra.offsets[r] + i) * algebra.size + algebra.offsets[c] + j;
      out.re[i * cols + j] = a.re[from];
      out.im[i * cols + j] = a.im[from];
    }
  }
  return out;
}
