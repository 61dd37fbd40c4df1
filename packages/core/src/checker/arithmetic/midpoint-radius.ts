import { type IntervalMatrix, intervalZeros } from './interval-matrix.js';
import { addUp, mulUp, subDown, subUp } from './rounding.js';

/** All real matrices within `rad` of `mid`, entrywise; rad null stands for zero. */
export interface MidpointRadius {
  readonly rows: number;
  readonly cols: number;
  readonly mid: Float64Array;
  readonly rad: Float64Array | null;
}

/** A midpoint form that contains the given matrix; unbounded entries get an infinite radius. */
export function midpointRadius(a: IntervalMatrix): MidpointRadius {
  const { rows, cols, lo, hi } = a;
  const mid = new Float64Array(lo.length);
  const rad = new Float64Array(lo.length);
  let thick = false;
  for (let k = 0; k < mid.length; k++) {
    if (lo[k] === hi[k]) {
      mid[k] = lo[k];
      continue;
    }
    const m = lo[k] / 2 + hi[k] / 2;
    mid[k] = Number.isFinite(m) ? m : 0;
    rad[k] = Math.max(subUp(mid[k], lo[k]), subUp(hi[k], mid[k]));
    thick = true;
  }
  return { rows, cols, mid, rad: thick ? rad : null };
}

/**
 * Enclosure of the product of two midpoint forms (Rump, Acta Numerica 19 (2010), §9): the product of the midpoints, plus
 * radii for the radii of the factors and for rounding, which is at most n·2^-53·|A||B| entrywise for inner side n
 * (Jeannerod & Rump, SIAM J. Matrix Anal. Appl. 34 (2013)) and some smallest doubles where products may underflow.
 */
export function midpointProduct(a: MidpointRadius, b: MidpointRadius): IntervalMatrix {
  const n = a.cols;
  const middle = plainProduct(a.mid, b.mid, a.rows, n, b.cols);
  const absA = a.mid.map(Math.abs);
  const rounding = (n + 2) * (Number.EPSILON / 2);
  const reach = b.mid.map((x, k) => addUp(b.rad ? b.rad[k] : 0, mulUp(rounding, Math.abs(x))));
  const radius = plainProduct(absA, reach, a.rows, n, b.cols);
  let floor = smallest(absA) * Math.min(smallest(b.mid), smallest(reach));
  if (a.rad) {
    const size = b.mid.map((x, k) => addUp(b.rad ? b.rad[k] : 0, Math.abs(x)));
    const more = plainProduct(a.rad, size, a.rows, n, b.cols);
    for (let k = 0; k < radius.length; k++) radius[k] += more[k];
    floor = Math.min(floor, smallest(a.rad) * smallest(size));
  }
  // The radii are sums of at most 2n non-negative products, in doubles: raise them by their own rounding.
  const inflation = 1 + (2 * n + 8) * Number.EPSILON;
  const underflow = floor > UNDERFLOW_FREE ? 0 : (2 * n + 4) * Number.MIN_VALUE;
  const out = intervalZeros(a.rows, b.cols);
  for (let k = 0; k < radius.length; k++) {
    const r = addUp(mulUp(radius[k], inflation), underflow);
    const bounded = Number.isFinite(r) && Number.isFinite(middle[k]);
    out.lo[k] = bounded ? subDown(middle[k], r) : -Infinity;
    out.hi[k] = bounded ? addUp(middle[k], r) : Infinity;
  }
  return out;
}

/** Products of doubles above this in modulus are normal numbers. */
const UNDERFLOW_FREE = 1e-290;

/** AB in doubles, A rows × inner, B inner × cols, row-major. */
export function plainProduct(
  a: Float64Array,
  b: Float64Array,
  rows: number,
  inner: number,
  cols: number,
): Float64Array {
  const out = new Float64Array(rows * cols);
  for (let i = 0; i < rows; i++) {
    for (let k = 0; k < inner; k++) {
      const x = a[i * inner + k];
      if (x === 0) continue;
      for (let j = 0, p = i * cols, q = k * cols; j < cols; j++) out[p++] += x * b[q++];
    }
  }
  return out;
}

/** Smallest modulus of a non-zero entry, ∞ if there is none. */
function smallest(a: Float64Array): number {
  let least = Infinity;
  for (let k = 0; k < a.length; k++) {
    const x = Math.abs(a[k]);
    if (x > 0 && x < least) least = x;
  }
  return least;
}
