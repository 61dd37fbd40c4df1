import { type ComplexMatrix, addScaledInto } from '../linalg/complex-matrix.js';
import { type SparseMatrix, denseTimesSparse, sparseAdjoint, sparseTimesDense } from '../linalg/sparse-matrix.js';

/**
 * Prepare A ↦ Σ_m X_m A X_m* + AY + Y*A on N×N matrices, for repeated use. Matrices X with at most one entry in a row and in
 * a column (Pauli strings, matrix units, ladder operators) cost one pass over A each, all diagonal ones together with a
 * diagonal Y a single one, and nothing is allocated for them; other X are multiplied out. With `upper` only the entries on
 * and above the diagonal are sure to be right: enough for Hermitian A, and half the work.
 */
export function sandwichSum(n: number, factors: readonly SparseMatrix[], drift: SparseMatrix | null): SandwichSum {
  const monomials: Monomial[] = [];
  const general: SparsePair[] = [];
  const multiplier: Multiplier = { re: null, im: null };
  for (const x of factors) {
    const monomial = monomialOf(x);
    if (monomial?.diagonal) addDiagonal(multiplier, n, monomial);
    else if (monomial) monomials.push(monomial);
    else general.push({ x: indexed(x), y: indexed(sparseAdjoint(x)) });
  }
  const rest = drift && !addDiagonalDrift(multiplier, n, drift) ? indexed(drift) : null;
  return (a, out, upper = false) => {
    // Row by row, so that a row of the result is finished while it is near.
    for (let i = 0; i < n; i++) {
      multiplyRow(multiplier, i, a, out);
      for (const monomial of monomials) addMonomialRow(out, monomial, i, a, upper);
    }
    for (const { x, y } of general) addSandwich(out, x, y, a);
    if (rest) addDrift(out, rest, a);
  };
}

/** Writes the sum at A to `out`, which is not A. */
export type SandwichSum = (a: ComplexMatrix, out: ComplexMatrix, upper?: boolean) => void;

/** X with at most one entry in each row and column: X_ij ≠ 0 for i = targets[s], j = sources[s], with that value; i ascending. */
interface Monomial {
  readonly targets: Int32Array;
  readonly sources: Int32Array;
  readonly re: Float64Array;
  readonly im: Float64Array;
  /** s with i = targets[s], or −1 for an empty row. */
  readonly place: Int32Array;
  /** All values are real. */
  readonly real: boolean;
  readonly diagonal: boolean;
}

function monomialOf(x: SparseMatrix): Monomial | null {
  const targets: number[] = [];
  const place = new Int32Array(x.rows).fill(-1);
  for (let i = 0; i < x.rows; i++) {
    const count = x.rowStart[i + 1] - x.rowStart[i];
    if (count > 1) return null;
    if (count === 1) place[i] = targets.push(i) - 1;
  }
  if (new Set(x.colIndex).size < x.colIndex.length) return null;
  // A phase of X drops out of XAX*: entries that are all imaginary are as good as real ones.
  const imaginary = x.re.length > 0 && x.re.every((value) => value === 0);
  const [re, im] = imaginary ? [x.im, new Float64Array(x.im.length)] : [x.re, x.im];
  return {
    targets: Int32Array.from(targets),
    sources: x.colIndex,
    re,
    im,
    place,
    real: im.every((value) => value === 0),
    diagonal: targets.every((i, s) => i === x.colIndex[s]),
  };
}

/** out_ij += x_i conj(x_j) A_kl for one i, x_i the entry of X at (i,k) and x_j that at (j,l). */
function addMonomialRow(
  out: ComplexMatrix,
  { targets, sources, re, im, place, real }: Monomial,
  i: number,
  { re: ar, im: ai, cols: n }: ComplexMatrix,
  upper: boolean,
): void {
  const s = place[i];
  if (s < 0) return;
  const { re: or, im: oi } = out;
  const count = targets.length;
  const to = i * n;
  const from = sources[s] * n;
  const xr = re[s];
  const xi = im[s];
  if (real) {
    for (let t = upper ? s : 0; t < count; t++) {
      const w = xr * re[t];
      const at = to + targets[t];
      const k = from + sources[t];
      or[at] += w * ar[k];
      oi[at] += w * ai[k];
    }
    return;
  }
  for (let t = upper ? s : 0; t < count; t++) {
    const wr = xr * re[t] + xi * im[t];
    const wi = xi * re[t] - xr * im[t];
    const at = to + targets[t];
    const k = from + sources[t];
    or[at] += wr * ar[k] - wi * ai[k];
    oi[at] += wr * ai[k] + wi * ar[k];
  }
}

/** What multiplies A entry by entry: x_i conj(x_j) of diagonal X, and conj(y_i) + y_j of a diagonal Y. Null while it is zero. */
interface Multiplier {
  re: Float64Array | null;
  im: Float64Array | null;
}

function addDiagonal(m: Multiplier, n: number, { targets, re, im }: Monomial): void {
  targets.forEach((i, s) => {
    targets.forEach((j, t) => {
      addEntry(m, n, i * n + j, re[s] * re[t] + im[s] * im[t], im[s] * re[t] - re[s] * im[t]);
    });
  });
}

/** False, and nothing done, when Y is not diagonal. */
function addDiagonalDrift(m: Multiplier, n: number, y: SparseMatrix): boolean {
  for (let i = 0; i < n; i++) {
    for (let p = y.rowStart[i]; p < y.rowStart[i + 1]; p++) if (y.colIndex[p] !== i) return false;
  }
  y.colIndex.forEach((i, p) => {
    for (let j = 0; j < n; j++) {
      addEntry(m, n, i * n + j, y.re[p], -y.im[p]);
      addEntry(m, n, j * n + i, y.re[p], y.im[p]);
    }
  });
  return true;
}

function addEntry(m: Multiplier, n: number, at: number, re: number, im: number): void {
  m.re ??= new Float64Array(n * n);
  m.re[at] += re;
  if (im === 0) return;
  m.im ??= new Float64Array(n * n);
  m.im[at] += im;
}

/** out = multiplier·A, entry by entry, in one row. */
function multiplyRow(
  { re, im }: Multiplier,
  i: number,
  { re: ar, im: ai, cols: n }: ComplexMatrix,
  out: ComplexMatrix,
): void {
  const { re: or, im: oi } = out;
  const from = i * n;
  const to = from + n;
  if (!re) {
    or.fill(0, from, to);
    oi.fill(0, from, to);
  } else if (!im) {
    for (let k = from; k < to; k++) {
      or[k] = re[k] * ar[k];
      oi[k] = re[k] * ai[k];
    }
  } else {
    for (let k = from; k < to; k++) {
      or[k] = re[k] * ar[k] - im[k] * ai[k];
      oi[k] = re[k] * ai[k] + im[k] * ar[k];
    }
  }
}

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
