import { type ComplexMatrix, addScaledInto } from '../linalg/complex-matrix.js';
import { type SparseMatrix, denseTimesSparse, sparseAdjoint, sparseTimesDense } from '../linalg/sparse-matrix.js';
import { type Multiplier, addDiagonal, addDiagonalDrift, multiplyRow } from './entrywise-multiplier.js';
import { type Monomial, addMonomialRow, addPermutationRow, monomialOf } from './monomial.js';

/**
 * Prepare A ↦ Σ_m X_m A X_m* + AY + Y*A on N×N matrices, for repeated use. Matrices X with at most one entry in a row and in
 * a column (Pauli strings, ladder operators) cost one pass over A each, all diagonal ones together with a
 * diagonal Y a single one, and nothing is allocated for them; other X are multiplied out. With `upper` only the entries on
 * and above the diagonal are sure to be right: enough for Hermitian A, and half the work.
 */
export function sandwichSum(n: number, factors: readonly SparseMatrix[], drift: SparseMatrix | null): SandwichSum {
  const permutations: Monomial[] = [];
  const monomials: Monomial[] = [];
  const general: SparsePair[] = [];
  const multiplier: Multiplier = { re: null, im: null };
  for (const x of factors) {
    // Matrices of a few entries are quicker entry by entry than row by row.
    const monomial = x.re.length * FEW < n ? null : monomialOf(x);
    if (monomial?.diagonal) addDiagonal(multiplier, n, monomial);
    else if (monomial?.real && monomial.targets.length === n) permutations.push(monomial);
    else if (monomial) monomials.push(monomial);
    else general.push({ x: indexed(x), y: indexed(sparseAdjoint(x)) });
  }
  const rest = drift && !addDiagonalDrift(multiplier, n, drift) ? indexed(drift) : null;
  const fours = Array.from({ length: Math.floor(permutations.length / 4) }, (_, k) =>
    permutations.slice(4 * k, 4 * k + 4),
  );
  monomials.push(...permutations.slice(4 * fours.length));
  return (a, out, upper = false) => {
    // Row by row, so that a row of the result is finished while it is near.
    for (let i = 0; i < n; i++) {
      multiplyRow(multiplier, i, a, out);
      for (const four of fours) addPermutationRow(out, four, i, a, upper ? i : 0);
      for (const monomial of monomials) addMonomialRow(out, monomial, i, a, upper);
    }
    for (const { x, y } of general) addSandwich(out, x, y, a);
    if (rest) addDrift(out, rest, a);
  };
}

/** Below one entry for so many rows a matrix is not worth a pass through the rows. */
const FEW = 8;

/** Writes the sum at A to `out`, which is not A. */
export type SandwichSum = (a: ComplexMatrix, out: ComplexMatrix, upper?: boolean) => void;

/** A sparse matrix that also knows the row of each stored entry. */
interface IndexedSparse extends SparseMatrix {
  readonly rowIndex: Int32Array;
}

interface SparsePair {
  readonly x: IndexedSparse;
  readonly y: IndexedSparse;
}

function indexed(s: SparseMatrix): IndexedSparse {
  const rowIndex = new Int32Array(s.re.length);
  for (let i = 0; i < s.rows; i++) rowIndex.fill(i, s.rowStart[i], s.rowStart[i + 1]);
  return { ...s, rowIndex };
}

/** out += X A Y for sparse X, Y: entry by entry where they are sparse enough, else as two products. */
function addSandwich(out: ComplexMatrix, x: IndexedSparse, y: IndexedSparse, a: ComplexMatrix): void {
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

/** out += AY + Y*A. */
function addDrift(out: ComplexMatrix, y: IndexedSparse, a: ComplexMatrix): void {
  const n = a.rows;
  const { re: ar, im: ai } = a;
  const { re: or, im: oi } = out;
  for (let p = 0; p < y.re.length; p++) {
    const k = y.rowIndex[p];
    const j = y.colIndex[p];
    const yr = y.re[p];
    const yi = y.im[p];
    for (let i = 0; i < n; i++) {
      const from = i * n + k;
      const to = i * n + j;
      or[to] += ar[from] * yr - ai[from] * yi;
      oi[to] += ar[from] * yi + ai[from] * yr;
      const row = k * n + i;
      const at = j * n + i;
      or[at] += yr * ar[row] + yi * ai[row];
      oi[at] += yr * ai[row] - yi * ar[row];
    }
  }
}
