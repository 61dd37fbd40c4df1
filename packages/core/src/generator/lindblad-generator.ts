import type { BlockAlgebra } from '../algebra/block-algebra.js';
import { type SparseMatrix, denseFromSparse, sparseAdd, sparseAdjoint } from '../linalg/sparse-matrix.js';
import { requireAlgebraPreserved } from './algebra-preservation.js';
import type { Generator, Jump } from './generator.js';
import { type MatrixInput, requireHermitian, requireRate, squareSparse } from './matrix-input.js';

export interface LindbladForm {
  readonly algebra: BlockAlgebra;
  /** H, N×N Hermitian, units of a rate. */
  readonly hamiltonian?: MatrixInput | null;
  readonly jumps: readonly {
    readonly label?: string;
    /** Factor of the dissipator, a rate; 1 when left out. */
    readonly rate?: number;
    readonly matrix: MatrixInput;
  }[];
}

/**
 * L(A) = i[H,A] + Σ_m rate_m (M_m* A M_m − ½{M_m*M_m, A}) (Gorini, Kossakowski & Sudarshan 1976; Lindblad 1976).
 * Throws `negative-rate`, `not-finite`, `not-hermitian`, `dimension-mismatch`, and `algebra-not-preserved` when L leads
 * out of the algebra.
 */
export function lindbladGenerator(form: LindbladForm): Generator {
  const { algebra } = form;
  const jumps = form.jumps.map(({ label, rate = 1, matrix }, m): Jump => {
    const at = `/generator/jumps/${m}`;
    requireRate(rate, `${at}/rate`, 'a rate');
    const scaled = scaleSparse(squareSparse(matrix, algebra.size, `${at}/matrix`), Math.sqrt(rate));
    return label === undefined ? { matrix: scaled } : { label, matrix: scaled };
  });
  return requireAlgebraPreserved(
    {
      algebra,
      hamiltonian: hermitianSparse(form.hamiltonian ?? null, algebra.size),
      jumps,
      superoperator: null,
      declaredState: null,
      origin: { kind: 'lindblad' },
    },
    '/generator',
  );
}

/** factor · A for a real factor. */
export function scaleSparse(a: SparseMatrix, factor: number): SparseMatrix {
  return factor === 1 ? a : { ...a, re: a.re.map((x) => factor * x), im: a.im.map((y) => factor * y) };
}

function hermitianSparse(a: MatrixInput | null, n: number): SparseMatrix | null {
  if (!a) return null;
  const h = squareSparse(a, n, '/generator/hamiltonian');
  const dense = denseFromSparse(h);
  requireHermitian(dense, '/generator/hamiltonian', 'the Hamiltonian');
  if (h.re.length === 0) return null;
  return scaleSparse(sparseAdd(h, sparseAdjoint(h)), 0.5);
}
