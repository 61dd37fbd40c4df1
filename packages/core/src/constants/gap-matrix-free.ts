import { fromCoordinates, toCoordinates } from '../algebra/block-algebra.js';
import { applyGenerator } from '../generator/apply-generator.js';
import type { Generator } from '../generator/generator.js';
import { type ComplexMatrix, identity, multiply, zeros } from '../linalg/complex-matrix.js';
import { lanczosSmallest } from '../linalg/lanczos.js';
import { matrixFunction } from '../linalg/matrix-function.js';
import type { Random } from '../random.js';
import type { ReferenceState } from '../structure/reference-state.js';
import { FIXED_POINT_TOLERANCE, LANCZOS_TOLERANCE } from '../tolerances.js';

/** Outcome of the matrix-free search for the gap. */
export interface LanczosGap {
  /** Rayleigh quotient of the vector found: an upper bound on the gap up to rounding. */
  readonly value: number;
  /** An eigenvalue of the symmetrised generator lies within this of `value`; that none is smaller is not proved. */
  readonly residual: number;
  readonly matvecs: number;
  /** Fixed points met and removed, the identity included. */
  readonly fixedPoints: number;
}

/**
 * Gap by thick-restart Lanczos on −½(L + L^KMS*), applied through the sparse jumps; memory is a few dozen vectors of
 * D = dim M numbers. `state` null stands for the tracial state. Fixed points are removed one by one as they are found.
 */
export function gapMatrixFree(g: Generator, state: ReferenceState | null, random: Random): LanczosGap {
  const { algebra } = g;
  const d = algebra.dimension;
  const apply = state ? kmsOperator(g, state) : tracialOperator(g);
  const known: Float64Array[] = [
    unitVector(toCoordinates(algebra, state ? matrixFunction(state, Math.sqrt) : identity(algebra.size))),
  ];
  let matvecs = 0;
  for (;;) {
    const found = lanczosSmallest({
      dimension: d,
      apply,
      count: 1,
      deflate: known,
      random,
      tolerance: LANCZOS_TOLERANCE,
      maxMatvecs: 4000,
    });
    matvecs += found.matvecs;
    const [value] = found.values;
    const [residual] = found.residuals;
    if (Math.abs(value) > FIXED_POINT_TOLERANCE || known.length >= 64) {
      return { value, residual, matvecs, fixedPoints: known.length };
    }
    known.push(Float64Array.from(found.vectors[0]));
  }
}

function tracialOperator(g: Generator) {
  const { algebra } = g;
  const work = zeros(algebra.size);
  return (x: Float64Array, y: Float64Array): void => {
    toCoordinates(algebra, applyGenerator(g, fromCoordinates(algebra, x, work)), y);
    for (let k = 0; k < y.length; k++) y[k] = -y[k];
  };
}

/** σ^{1/4} L(σ^{−1/4} · σ^{−1/4}) σ^{1/4}: symmetric when L is KMS-symmetric, which the caller has checked. */
function kmsOperator(g: Generator, state: ReferenceState) {
  const { algebra } = g;
  const quarter = matrixFunction(state, (x) => x ** 0.25);
  const inverse = matrixFunction(state, (x) => x ** -0.25);
  const sandwich = (outer: ComplexMatrix, a: ComplexMatrix): ComplexMatrix => multiply(outer, multiply(a, outer));
  return (x: Float64Array, y: Float64Array): void => {
    toCoordinates(algebra, sandwich(quarter, applyGenerator(g, sandwich(inverse, fromCoordinates(algebra, x)))), y);
    for (let k = 0; k < y.length; k++) y[k] = -y[k];
  };
}

function unitVector(v: Float64Array): Float64Array {
  let norm = 0;
  for (const x of v) norm += x * x;
  norm = Math.sqrt(norm);
  return v.map((x) => x / norm);
}
