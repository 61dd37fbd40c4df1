import { fromCoordinates, toCoordinates } from '../algebra/block-algebra.js';
import { type ComplexMatrix, addScaledInto, zeros } from '../linalg/complex-matrix.js';
import {
  type SparseMatrix,
  sparseAdd,
  sparseAdjoint,
  sparseFromTriplets,
  sparseMultiply,
} from '../linalg/sparse-matrix.js';
import type { Generator } from './generator.js';
import { type SandwichSum, sandwichSum } from './sandwich-sum.js';

export { generatorMatrix } from './generator-matrix.js';

/** L(A) for A in the algebra (N×N); the result is again block-diagonal. */
export function applyGenerator(g: Generator, a: ComplexMatrix): ComplexMatrix {
  const out = applyUnprojected(g, a);
  clearOutside(g, out);
  return out;
}

/** The entries of L(A) on and above the diagonal, for Hermitian A, written to `out`, which is not A; the others are not to be used. */
export function applyToHermitian(g: Generator, a: ComplexMatrix, out: ComplexMatrix): void {
  compiled(g).onObservables(a, out, true);
  addSuperoperator(g, a, out, false);
  clearOutside(g, out);
}

/** L(A) with whatever the jumps and H put outside the blocks. */
export function applyUnprojected(g: Generator, a: ComplexMatrix): ComplexMatrix {
  const out = zeros(g.algebra.size);
  compiled(g).onObservables(a, out);
  addSuperoperator(g, a, out, false);
  return out;
}

/** L†(ρ), the generator on states: Tr ρ L(A) = Tr L†(ρ) A. */
export function applyGeneratorAdjoint(g: Generator, rho: ComplexMatrix): ComplexMatrix {
  const out = zeros(g.algebra.size);
  compiled(g).onStates(rho, out);
  addSuperoperator(g, rho, out, true);
  clearOutside(g, out);
  return out;
}

/** Zeros outside the blocks, where an element of the algebra has none. */
function clearOutside({ algebra }: Generator, a: ComplexMatrix): void {
  const { blockOf, size: n } = algebra;
  if (algebra.blocks.length === 1) return;
  for (let i = 0; i < n; i++) {
    for (let j = 0; j < n; j++) if (blockOf[i] !== blockOf[j]) a.re[i * n + j] = a.im[i * n + j] = 0;
  }
}

/** What the jumps and H do. */
interface Compiled {
  readonly onObservables: SandwichSum;
  readonly onStates: SandwichSum;
}

const compilations = new WeakMap<Generator, Compiled>();

/** With G = −½ Σ R*R − iH, L(A) = Σ R*AR + AG + G*A and L†(ρ) = Σ RρR* + ρG* + Gρ. */
function compiled(g: Generator): Compiled {
  const known = compilations.get(g);
  if (known) return known;
  const n = g.algebra.size;
  const jumps = g.jumps.map(({ matrix }) => matrix);
  const adjoints = jumps.map(sparseAdjoint);
  let drift: SparseMatrix | null = null;
  jumps.forEach((r, m) => {
    drift = sparseAdd(drift ?? emptySquare(n), sparseMultiply(adjoints[m], r), -0.5, 0);
  });
  if (g.hamiltonian) drift = sparseAdd(drift ?? emptySquare(n), g.hamiltonian, 0, -1);
  const result = {
    onObservables: sandwichSum(n, adjoints, drift),
    onStates: sandwichSum(n, jumps, drift && sparseAdjoint(drift)),
  };
  compilations.set(g, result);
  return result;
}

function emptySquare(n: number): SparseMatrix {
  return sparseFromTriplets(n, n, []);
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
