import { dot } from './real-vector.js';
import { REORTHOGONALISE } from '../tolerances.js';

/**
 * x −= Σ <v, x> v over orthonormal vectors, and again when little of x was left, for rounding is relative to what was removed
 * (Daniel, Gragg, Kaufman & Stewart, Math. Comp. 30 (1976); twice is enough); returns the coefficients removed.
 */
export function orthogonalise(x: Float64Array, basis: readonly Float64Array[]): Float64Array {
  if (basis.length === 0) return new Float64Array(0);
  const before = norm(x);
  const removed = projectOut(x, basis);
  if (norm(x) >= REORTHOGONALISE * before) return removed;
  projectOut(x, basis).forEach((product, k) => (removed[k] += product));
  return removed;
}

/**
 * x −= Σ <v, x> v, once; returns the coefficients. Four vectors at a time share one reading of x: classical Gram–Schmidt
 * inside a group, modified between groups.
 */
export function projectOut(x: Float64Array, basis: readonly Float64Array[]): Float64Array {
  const removed = new Float64Array(basis.length);
  for (let k = 0; k < basis.length; k += GROUP) {
    const group = basis.slice(k, k + GROUP);
    const products = innerProducts(group, x);
    removed.set(products, k);
    addCombination(
      x,
      group,
      products.map((product) => -product),
    );
  }
  return removed;
}

/** Vectors that share one reading of x. */
const GROUP = 4;

/** <v, x> for each vector of a group, with independent sums. */
function innerProducts(group: readonly Float64Array[], x: Float64Array): number[] {
  if (group.length < GROUP) return group.map((v) => dot(v, x));
  const [a, b, c, d] = group;
  let [s, t, u, w] = [0, 0, 0, 0];
  for (let i = 0; i < x.length; i++) {
    const value = x[i];
    s += a[i] * value;
    t += b[i] * value;
    u += c[i] * value;
    w += d[i] * value;
  }
  return [s, t, u, w];
}

/** x += Σ factor·v. */
export function addCombination(x: Float64Array, vectors: readonly Float64Array[], factors: ArrayLike<number>): void {
  let k = 0;
  for (; k + GROUP <= vectors.length; k += GROUP) {
    const [a, b, c, d] = vectors.slice(k, k + GROUP);
    const [s, t, u, w] = [factors[k], factors[k + 1], factors[k + 2], factors[k + 3]];
    for (let i = 0; i < x.length; i++) x[i] += s * a[i] + t * b[i] + (u * c[i] + w * d[i]);
  }
  for (; k < vectors.length; k++) {
    const v = vectors[k];
    const s = factors[k];
    for (let i = 0; i < x.length; i++) x[i] += s * v[i];
  }
}

/** Euclidean norm; sizes near the ends of the range of doubles do not occur among normalised vectors. */
export function norm(x: Float64Array): number {
  const whole = x.length - (x.length % 4);
  let [a, b, c, d] = [0, 0, 0, 0];
  for (let i = 0; i < whole; i += 4) {
    a += x[i] * x[i];
    b += x[i + 1] * x[i + 1];
    c += x[i + 2] * x[i + 2];
    d += x[i + 3] * x[i + 3];
  }
  for (let i = whole; i < x.length; i++) a += x[i] * x[i];
  return Math.sqrt(a + b + (c + d));
}

/** Appends the direction of x orthogonal to the list, unless less than 1e-8 of x is left. */
export function appendOrthonormal(basis: Float64Array[], x: Float64Array): void {
  const size = norm(x);
  if (!(size > 0)) return;
  const rest = x.map((value) => value / size);
  orthogonalise(rest, basis);
  const left = norm(rest);
  if (left < 1e-8) return;
  basis.push(rest.map((value) => value / left));
}
