import { fromCoordinates, projectToAlgebra, toCoordinates } from '../algebra/block-algebra.js';
import { type ComplexMatrix, addScaledInto, adjoint, zeros } from '../linalg/complex-matrix.js';
import {
  type SparseMatrix,
  denseTimesSparse,
  sparseAdd,
  sparseAdjoint,
  sparseFromTriplets,
  sparseMultiply,
  sparseTimesDense,
} from '../linalg/sparse-matrix.js';
import type { Generator } from './generator.js';

export { generatorMatrix } from './generator-matrix.js';

/** L(A) for A in the algebra (N×N); the result is again block-diagonal. */
export function applyGenerator(g: Generator, a: ComplexMatrix): ComplexMatrix {
  return projectToAlgebra(g.algebra, applyUnprojected(g, a));
}

/** L(A) with whatever the jumps and H put outside the blocks. */
export function applyUnprojected(g: Generator, a: ComplexMatrix): ComplexMatrix {
  const out = zeros(g.algebra.size);
  for (const { matrix, adjointMatrix } of compiled(g).jumps) {
    sandwichInto(out, adjointMatrix, matrix, a);
  }
  const { drift } = compiled(g);
  if (drift) {
    addScaledInto(out, denseTimesSparse(a, drift), 1);
    addScaledInto(out, adjoint(denseTimesSparse(adjoint(a), drift)), 1);
  }
  addSuperoperator(g, a, out, false);
  return out;
}

/** L†(ρ), the generator on states: Tr ρ L(A) = Tr L†(ρ) A. */
export function applyGeneratorAdjoint(g: Generator, rho: ComplexMatrix): ComplexMatrix {
  const n = g.algebra.size;
  const out = zeros(n);
  for (const { matrix, adjointMatrix } of compiled(g).jumps) {
    sandwichInto(out, matrix, adjointMatrix, rho);
  }
  const { drift } = compiled(g);
  if (drift) {
    addScaledInto(out, sparseTimesDense(drift, rho), 1);
    addScaledInto(out, adjoint(sparseTimesDense(drift, adjoint(rho))), 1);
  }
  addSuperoperator(g, rho, out, true);
  return projectToAlgebra(g.algebra, out);
}

interface Compiled {
  readonly jumps: readonly { readonly matrix: IndexedSparse; readonly adjointMatrix: IndexedSparse }[];
  /** G = −½ Σ R*R − iH, so that L(A) = Σ R*AR + AG + (A*G)*. */
  readonly drift: SparseMatrix | null;
}

const compilations = new WeakMap<Generator, Compiled>();

function compiled(g: Generator): Compiled {
  const known = compilations.get(g);
  if (known) return known;
  const jumps = g.jumps.map(({ matrix }) => ({
    matrix: indexed(matrix),
    adjointMatrix: indexed(sparseAdjoint(matrix)),
  }));
  let drift: SparseMatrix | null = null;
  for (const { matrix, adjointMatrix } of jumps) {
    drift = sparseAdd(drift ?? emptySquare(g.algebra.size), sparseMultiply(adjointMatrix, matrix), -0.5, 0);
  }
  if (g.hamiltonian) drift = sparseAdd(drift ?? emptySquare(g.algebra.size), g.hamiltonian, 0, -1);
  const result = { jumps, drift };
  compilations.set(g, result);
  return result;
}

function emptySquare(n: number): SparseMatrix {
  return sparseFromTriplets(n, n, []);
}

/** out += X A Y for sparse X, Y: entry by entry where they are sparse enough (Pauli strings, matrix units), else as two products. */
function sandwichInto(out: ComplexMatrix, x: IndexedSparse, y: IndexedSparse, a: ComplexMatrix): void {
  const n = a.rows;
  const countX = x.re.length;
  const countY = y.re.length;
  if (countX * countY > n * (countX + countY)) {
    addScaledInto(out, sparseTimesDense(x, denseTimesSparse(a, y)), 1);
    return;
  }
  for (let s = 0; s < countX; s++) {
    const from = x.colIndex[s] * n;
    const to = x.rowIndex[s] * n;
    const xr = x.re[s];
    const xi = x.im[s];
    for (let t = 0; t < countY; t++) {
      const ar = a.re[from + y.rowIndex[t]];
      const ai = a.im[from + y.rowIndex[t]];
      const tr = xr * ar - xi * ai;
      const ti = xr * ai + xi * ar;
      const j = to + y.colIndex[t];
      out.re[j] += tr * y.re[t] - ti * y.im[t];
      out.im[j] += tr * y.im[t] + ti * y.re[t];
    }
  }
}

/** A sparse matrix that also knows the row of each stored entry. */
interface IndexedSparse extends SparseMatrix {
  readonly rowIndex: Int32Array;
}

function indexed(s: SparseMatrix): IndexedSparse {
  const rowIndex = new Int32Array(s.re.length);
  for (let i = 0; i < s.rows; i++) rowIndex.fill(i, s.rowStart[i], s.rowStart[i + 1]);
  return { ...s, rowIndex };
}

function addSuperoperator(g: Generator, a: ComplexMatrix, out: ComplexMatrix, transposed: boolean): void {
  const s = g.superoperator;
  if (!s) return;
  const d = g.algebra.dimension;
  const real = toCoordinates(g.algebra, a);
  const imaginary = toCoordinates(g.algebra, timesMinusI(a));
  addScaledInto(out, fromCoordinates(g.algebra, timesVector(s, d, real, transposed)), 1);
  if (imaginary.some((x) => x !== 0)) {
    addScaledInto(out, fromCoordinates(g.algebra, timesVector(s, d, imaginary, transposed)), 0, 1);
  }
}

/** −iA, whose Hermitian part is the anti-Hermitian part of A over i. */
function timesMinusI(a: ComplexMatrix): ComplexMatrix {
  return { rows: a.rows, cols: a.cols, re: a.im, im: a.re.map((x) => -x) };
}

function timesVector(s: Float64Array, d: number, x: Float64Array, transposed: boolean): Float64Array {
  const y = new Float64Array(d);
  for (let k = 0; k < d; k++) {
    if (transposed) {
      const xk = x[k];
      for (let l = 0; l < d; l++) y[l] += s[k * d + l] * xk;
    } else {
      let sum = 0;
      for (let l = 0; l < d; l++) sum += s[k * d + l] * x[l];
      y[k] = sum;
    }
  }
  return y;
}
