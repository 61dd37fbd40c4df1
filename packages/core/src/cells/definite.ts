import {
  type Interval,
  ZERO,
  add,
  div,
  magnitude,
  mul,
  point,
  sqr,
  sub,
  width,
} from '../checker/arithmetic/interval.js';
import type { Jet } from './jet.js';

/**
 * True when elimination proves that every symmetric matrix with entries in the intervals (n×n, row-major, upper triangle read) is
 * positive definite: all pivots of Gauss's elimination are bounded away from zero, and the pivots of each matrix lie in them.
 */
export function isPositiveDefinite(entries: readonly Interval[], n: number): boolean {
  const rest = entries.slice();
  for (let k = 0; k < n; k++) {
    const pivot = rest[k * n + k];
    if (!(pivot.lo > 0)) return false;
    for (let i = k + 1; i < n; i++) {
      for (let j = i; j < n; j++) {
        const a = rest[k * n + i];
        const product = i === j ? sqr(a) : mul(a, rest[k * n + j]);
        rest[i * n + j] = sub(rest[i * n + j], div(product, pivot));
      }
    }
  }
  return true;
}

/**
 * Enclosure of XᵀMX over a cell, M a symmetric matrix of functions, by the mean value theorem. With X from `inverseFactor` the
 * matrix at the centre is nearly 1, so that first-order changes count only in the square. `displacements` encloses x − centre for
 * every parameter; `influence` is how much each of them adds, `spread` how much is unknown at the centre.
 */
export function meanValueMatrix(
  jets: readonly Jet[],
  n: number,
  x: Float64Array,
  displacements: readonly Interval[],
): { entries: Interval[]; influence: number[]; spread: number } {
  const entries = congruent(x, n, (k) => jets[k].centre);
  const spread = entries.reduce((most, entry) => Math.max(most, width(entry)), 0);
  const influence = displacements.map((step, l) => {
    let largest = 0;
    congruent(x, n, (k) => jets[k].slopes[l]).forEach((slope, k) => {
      const change = mul(step, slope);
      largest = Math.max(largest, magnitude(change));
      entries[k] = add(entries[k], change);
    });
    return largest;
  });
  return { entries, influence, spread };
}

/** X upper triangular with XᵀMX ≈ 1 for the matrix M of the centres; null when M is not positive definite in doubles. */
export function inverseFactor(jets: readonly Jet[], n: number): Float64Array | null {
  const l = new Float64Array(n * n);
  for (let j = 0; j < n; j++) {
    for (let i = j; i < n; i++) {
      const { lo, hi } = jets[j * n + i].centre;
      let sum = lo / 2 + hi / 2;
      for (let k = 0; k < j; k++) sum -= l[i * n + k] * l[j * n + k];
      if (i > j) l[i * n + j] = sum / l[j * n + j];
      else if (sum > 0 && sum < Infinity) l[j * n + j] = Math.sqrt(sum);
      else return null;
    }
  }
  const x = new Float64Array(n * n);
  for (let j = 0; j < n; j++) {
    x[j * n + j] = 1 / l[j * n + j];
    for (let i = j - 1; i >= 0; i--) {
      let sum = 0;
      for (let k = i + 1; k <= j; k++) sum += l[k * n + i] * x[k * n + j];
      x[i * n + j] = -sum / l[i * n + i];
    }
  }
  return x;
}

/** Upper triangle of XᵀMX. */
function congruent(x: Float64Array, n: number, entry: (k: number) => Interval): Interval[] {
  const right = new Array<Interval>(n * n).fill(ZERO);
  const out = new Array<Interval>(n * n).fill(ZERO);
  for (let i = 0; i < n; i++) {
    for (let j = 0; j < n; j++) {
      for (let k = 0; k <= j; k++) {
        const m = entry(Math.min(i, k) * n + Math.max(i, k));
        right[i * n + j] = add(right[i * n + j], mul(m, point(x[k * n + j])));
      }
    }
  }
  for (let i = 0; i < n; i++) {
    for (let j = i; j < n; j++) {
      for (let k = 0; k <= i; k++) {
        out[i * n + j] = add(out[i * n + j], mul(point(x[k * n + i]), right[k * n + j]));
      }
    }
  }
  return out;
}
