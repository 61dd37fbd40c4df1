import type { ComplexMatrix } from '../linalg/complex-matrix.js';
import type { SparseMatrix } from '../linalg/sparse-matrix.js';

/** X with at most one entry in each row and column: X_ij ≠ 0 for i = targets[s], j = sources[s], with that value; i ascending. */
export interface Monomial {
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

/** The matrix as a monomial one, or null when it is not. */
export function monomialOf(x: SparseMatrix): Monomial | null {
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
export function addMonomialRow(
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

/** The same for four real permutations at once, j from `first` on: each entry of the result is read and written once. */
export function addPermutationRow(
  { re: or, im: oi }: ComplexMatrix,
  [p, q, r, s]: readonly Monomial[],
  i: number,
  { re: ar, im: ai, cols: n }: ComplexMatrix,
  first: number,
): void {
  const { sources: ps, re: pw } = p;
  const { sources: qs, re: qw } = q;
  const { sources: rs, re: rw } = r;
  const { sources: ss, re: sw } = s;
  const [pi, qi, ri, si] = [pw[i], qw[i], rw[i], sw[i]];
  const [pf, qf, rf, sf] = [ps[i] * n, qs[i] * n, rs[i] * n, ss[i] * n];
  for (let t = first, at = i * n + first; t < n; t++, at++) {
    const pk = pf + ps[t];
    const qk = qf + qs[t];
    const rk = rf + rs[t];
    const sk = sf + ss[t];
    const pv = pi * pw[t];
    const qv = qi * qw[t];
    const rv = ri * rw[t];
    const sv = si * sw[t];
    or[at] += pv * ar[pk] + qv * ar[qk] + (rv * ar[rk] + sv * ar[sk]);
    oi[at] += pv * ai[pk] + qv * ai[qk] + (rv * ai[rk] + sv * ai[sk]);
  }
}
