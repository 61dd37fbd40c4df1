import type { BlockAlgebra } from '../algebra/block-algebra.js';
import type { Generator } from '../generator/generator.js';
import { applyGenerator } from '../generator/apply-generator.js';
import { zeros } from '../linalg/complex-matrix.js';
import type { Condition, LiftCertificate } from './lift-certificate.js';
import { type Complex, DOUBLES } from './ring.js';
import { type SparseOperator, addEntry, adjointOperator, emptyOperator, product } from './sparse-operator.js';

/** The basis that a certificate is written in: the columns of `u`. */
export interface Frame {
  readonly u: SparseOperator<Complex>;
  readonly adjoint: SparseOperator<Complex>;
}

/** The frame of a certificate, null for the basis of the model. */
export function frameOf({ size }: BlockAlgebra, { frame }: LiftCertificate): Frame | null {
  if (!frame) return null;
  const u = emptyOperator<Complex>(size);
  for (const [i, j, re, im] of frame) addEntry(DOUBLES, u, i, j, DOUBLES.of(re, im));
  return { u, adjoint: adjointOperator(DOUBLES, u) };
}

/** ‖U*U − 1‖_F and the entries outside the blocks: to first order the distance from a unitary of the algebra is at most that. */
export function frameCondition({ blockOf }: BlockAlgebra, { u, adjoint }: Frame, limit: number): Condition {
  let squares = 0;
  product(DOUBLES, adjoint, u).forEach((row, i) => {
    const diagonal = row.get(i) ?? DOUBLES.zero;
    squares += (diagonal.re - 1) ** 2 + diagonal.im ** 2;
    for (const [j, { re, im }] of row) if (j !== i) squares += re * re + im * im;
  });
  u.forEach((row, i) => {
    for (const [j, { re, im }] of row) if (blockOf[i] !== blockOf[j]) squares += re * re + im * im;
  });
  const value = Math.sqrt(squares);
  return { name: 'frame unitary, in the algebra', kind: 'residual', value, limit, holds: value <= limit };
}

/** U*L(Ue_abU*)U, L from the model. */
export function imageInFrame(g: Generator, frame: Frame | null, a: number, b: number): SparseOperator<Complex> {
  const n = g.algebra.size;
  const unit = zeros(n);
  if (!frame) unit.re[a * n + b] = 1;
  else {
    for (const [i, x] of frame.adjoint[a]) {
      for (const [j, y] of frame.adjoint[b]) {
        // U_ia conj(U_jb), from the entries of U*.
        unit.re[i * n + j] = x.re * y.re + x.im * y.im;
        unit.im[i * n + j] = x.re * y.im - x.im * y.re;
      }
    }
  }
  const image = applyGenerator(g, unit);
  const out = emptyOperator<Complex>(n);
  for (let i = 0; i < n; i++) {
    for (let j = 0; j < n; j++) addEntry(DOUBLES, out, i, j, { re: image.re[i * n + j], im: image.im[i * n + j] });
  }
  return frame ? product(DOUBLES, product(DOUBLES, frame.adjoint, out), frame.u) : out;
}
