import { fromCoordinates, toCoordinates, upperToCoordinates } from '../algebra/block-algebra.js';
import { applyToHermitian } from '../generator/apply-generator.js';
import { generatorNormBound } from '../generator/generator-norm.js';
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
  const zero = FIXED_POINT_TOLERANCE * generatorNormBound(g);
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
    if (Math.abs(value) > zero || known.length >= 64) {
      return { value, residual, matvecs, fixedPoints: known.length };
    }
    known.push(Float64Array.from(found.vectors[0]));
  }
}

function tracialOperator(g: Generator): (x: Float64Array, y: Float64Array) => void {
  const { algebra } = g;
  const [a, image] = [zeros(algebra.size), zeros(algebra.size)];
  return (x, y) => {
    fromCoordinates(algebra, x, a);
    applyToHermitian(g, a, image);
    upperToCoordinates(algebra, image, y, -1);
  };
}

/** σ^{1/4} L(σ^{−1/4} · σ^{−1/4}) σ^{1/4}: symmetric when L is KMS-symmetric, which the caller has checked. */
function kmsOperator(g: Generator, state: ReferenceState): (x: Float64Array, y: Float64Array) => void {
  const { algebra } = g;
  const [a, image] = [zeros(algebra.size), zeros(algebra.size)];
  const quarter = sandwichWith(matrixFunction(state, (x) => x ** 0.25));
  const inverse = sandwichWith(matrixFunction(state, (x) => x ** -0.25));
  return (x, y) => {
    fromCoordinates(algebra, x, a);
    applyToHermitian(g, inverse(a), image);
    upperToCoordinates(algebra, quarter(image), y, -1);
  };
}

/** A ↦ WAW for Hermitian W and A, of which the result's upper triangle is used; in place, entry by entry, when W is diagonal. */
function sandwichWith(w: ComplexMatrix): (a: ComplexMatrix) => ComplexMatrix {
  const n = w.rows;
  const diagonal = w.re.every((x, k) => Math.floor(k / n) === k % n || (x === 0 && w.im[k] === 0));
  if (!diagonal) return (a) => multiply(w, multiply(mirrored(a), w));
  const values = Float64Array.from({ length: n }, (_, i) => w.re[i * n + i]);
  return (a) => {
    for (let i = 0, k = 0; i < n; i++) {
      for (let j = 0; j < n; j++, k++) {
        const factor = values[i] * values[j];
        a.re[k] *= factor;
        a.im[k] *= factor;
      }
    }
    return a;
  };
}

/** Fill the lower triangle from the upper one, in place. */
function mirrored(a: ComplexMatrix): ComplexMatrix {
  const n = a.rows;
  for (let i = 0; i < n; i++) {
    for (let j = i + 1; j < n; j++) {
      a.re[j * n + i] = a.re[i * n + j];
      a.im[j * n + i] = -a.im[i * n + j];
    }
  }
  return a;
}

function unitVector(v: Float64Array): Float64Array {
  let norm = 0;
  for (const x of v) norm += x * x;
  norm = Math.sqrt(norm);
  return v.map((x) => x / norm);
}
