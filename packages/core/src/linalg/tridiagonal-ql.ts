import { ThalwegError } from '../errors.js';
import { EPSILON, QL_SWEEPS_PER_EIGENVALUE } from '../tolerances.js';

/** Squares below this have lost digits to the subnormal range. */
const SMALL_SQUARE = 1e-290;

/** Smallest normal double. */
const TINY_SQUARE = 2 ** -1022;

/**
 * Eigenvalues of a real symmetric tridiagonal matrix by the implicit QL method with Wilkinson's shift (Dubrulle, Martin &
 * Wilkinson, Numer. Math. 12 (1968); the relative deflation test is LAPACK's `dsteqr`).
 *
 * d[0…n−1] is the diagonal and returns the eigenvalues, unordered; e[0…n−2] is the off-diagonal and is destroyed (length
 * ≥ n). Every rotation is applied from the right to the real matrices `bases`, each with n columns and any number of rows.
 * `c` and `s` are scratch of length n. Throws `no-convergence`.
 */
export function tridiagonalQL(
  d: Float64Array,
  e: Float64Array,
  n: number,
  bases: readonly Float64Array[],
  c: Float64Array,
  s: Float64Array,
): void {
  let sweeps = 0;
  for (let l = 0; l < n; l++) {
    for (;;) {
      const m = endOfBlock(d, e, l, n);
      if (m === l) break;
      if (++sweeps > QL_SWEEPS_PER_EIGENVALUE * n) {
        throw new ThalwegError('no-convergence', `expected QL to converge within ${sweeps - 1} sweeps at size ${n}`);
      }
      const first = sweep(d, e, l, m, c, s);
      for (const z of bases) rotateColumns(z, n, first, m, c, s);
    }
  }
}

/** The first m ≥ l whose coupling e[m] to the next index is negligible: e² ≤ ε² |d_m d_{m+1}|. */
function endOfBlock(d: Float64Array, e: Float64Array, l: number, n: number): number {
  let m = l;
  let left = EPSILON * EPSILON * Math.abs(d[l]);
  for (; m < n - 1; m++) {
    const right = Math.abs(d[m + 1]);
    const x = e[m];
    if (x * x <= left * right + TINY_SQUARE) {
      e[m] = 0;
      break;
    }
    left = EPSILON * EPSILON * right;
  }
  return m;
}

/** One implicit QL sweep on rows l…m; stores rotation i (columns i, i + 1) in c[i], s[i] and returns the lowest i. */
function sweep(d: Float64Array, e: Float64Array, l: number, m: number, c: Float64Array, s: Float64Array): number {
  let g = (d[l + 1] - d[l]) / (2 * e[l]);
  g = d[m] - d[l] + e[l] / (g + (g >= 0 ? length(g, 1) : -length(g, 1)));
  let sine = 1;
  let cosine = 1;
  let p = 0;
  for (let i = m - 1; i >= l; i--) {
    const f = sine * e[i];
    const b = cosine * e[i];
    const r = length(f, g);
    e[i + 1] = r;
    if (r === 0) {
      // The bulge vanished by underflow: the block has split here.
      d[i + 1] -= p;
      e[m] = 0;
      return i + 1;
    }
    sine = f / r;
    cosine = g / r;
    g = d[i + 1] - p;
    const t = (d[i] - g) * sine + 2 * cosine * b;
    p = sine * t;
    d[i + 1] = g + p;
    g = cosine * t - b;
    c[i] = cosine;
    s[i] = sine;
  }
  d[l] -= p;
  e[l] = g;
  e[m] = 0;
  return l;
}

function length(x: number, y: number): number {
  const square = x * x + y * y;
  return square > SMALL_SQUARE && square < Infinity ? Math.sqrt(square) : Math.hypot(x, y);
}

/** Applies rotations m − 1, …, l to the columns of z, four rows at a time so that their dependency chains overlap. */
function rotateColumns(z: Float64Array, n: number, l: number, m: number, c: Float64Array, s: Float64Array): void {
  const size = z.length - (z.length % (4 * n));
  let p = 0;
  for (; p < size; p += 4 * n) {
    const p1 = p + n;
    const p2 = p1 + n;
    const p3 = p2 + n;
    let f0 = z[p + m];
    let f1 = z[p1 + m];
    let f2 = z[p2 + m];
    let f3 = z[p3 + m];
    for (let i = m - 1; i >= l; i--) {
      const ci = c[i];
      const si = s[i];
      const x0 = z[p + i];
      const x1 = z[p1 + i];
      const x2 = z[p2 + i];
      const x3 = z[p3 + i];
      z[p + i + 1] = si * x0 + ci * f0;
      z[p1 + i + 1] = si * x1 + ci * f1;
      z[p2 + i + 1] = si * x2 + ci * f2;
      z[p3 + i + 1] = si * x3 + ci * f3;
      f0 = ci * x0 - si * f0;
      f1 = ci * x1 - si * f1;
      f2 = ci * x2 - si * f2;
      f3 = ci * x3 - si * f3;
    }
    z[p + l] = f0;
    z[p1 + l] = f1;
    z[p2 + l] = f2;
    z[p3 + l] = f3;
  }
  for (; p < z.length; p += n) {
    let f = z[p + m];
    for (let i = m - 1; i >= l; i--) {
      const x = z[p + i];
      z[p + i + 1] = s[i] * x + c[i] * f;
      f = c[i] * x - s[i] * f;
    }
    z[p + l] = f;
  }
}
