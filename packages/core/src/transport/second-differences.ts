import type { MeanTable } from '../metric/mean-table.js';
import { CLOSE_SPREAD, SERIES_CURVATURE } from './tolerances.js';

/** Second divided differences of F(λ_a, λ_b) = Λ(e^{ω/2}λ_a, e^{−ω/2}λ_b) over all quadruples of eigenvalues. */
export interface SecondTable {
  /** n⁴, index ((a·n+c)·n+e)·n+b: F[λ_a, λ_c, λ_e; λ_b]. */
  readonly left: Float64Array;
  /** n⁴, index ((a·n+d)·n+e)·n+b: F[λ_a; λ_d, λ_e, λ_b]. */
  readonly right: Float64Array;
  /** n⁴, index ((a·n+c)·n+d)·n+b: F[λ_a, λ_c; λ_d, λ_b]. */
  readonly mixed: Float64Array;
}

/**
 * The table, from first differences. Where arguments lie within CLOSE_SPREAD of each other the second derivative at their mean
 * stands for the difference: good to the square of that, enough for the curvature of an action that a Newton step uses.
 */
export function secondTable(first: MeanTable, lambda: Float64Array, omega: number): SecondTable {
  const n = lambda.length;
  const up = Math.exp(omega / 2);
  const order = Array.from(lambda.keys()).sort((i, j) => lambda[i] - lambda[j]);
  const [left, right, mixed] = [0, 1, 2].map(() => new Float64Array(n ** 4));
  for (let i = 0; i < n; i++) {
    for (let j = i; j < n; j++) {
      for (let k = j; k < n; k++) {
        for (let b = 0; b < n; b++) {
          setTriple(left, right, n, [order[i], order[j], order[k]], b, first, lambda, up);
        }
      }
    }
  }
  for (let a = 0; a < n; a++) {
    for (let c = a; c < n; c++) {
      for (let d = 0; d < n; d++) {
        for (let b = d; b < n; b++) {
          const value = mixedDifference(first, lambda, a, c, d, b, up);
          mixed[((a * n + c) * n + d) * n + b] = mixed[((a * n + c) * n + b) * n + d] = value;
          mixed[((c * n + a) * n + d) * n + b] = mixed[((c * n + a) * n + b) * n + d] = value;
        }
      }
    }
  }
  return { left, right, mixed };
}

type Triple = readonly [number, number, number];

/** F[low, middle, high; b] and F[b; low, middle, high], in every order of the three. */
function setTriple(
  left: Float64Array,
  right: Float64Array,
  n: number,
  triple: Triple,
  b: number,
  first: MeanTable,
  lambda: Float64Array,
  up: number,
): void {
  const [low, middle, high] = triple;
  const [x, z] = [lambda[low], lambda[high]];
  let l: number;
  let r: number;
  if (z - x > CLOSE_SPREAD * (x + z)) {
    l = (first.left[(high * n + middle) * n + b] - first.left[(low * n + middle) * n + b]) / (z - x);
    r = (first.right[(b * n + high) * n + middle] - first.right[(b * n + low) * n + middle]) / (z - x);
  } else {
    const mean = (x + lambda[middle] + z) / 3;
    l = (up * up * secondSlope(up * mean, lambda[b] / up)) / 2;
    r = secondSlope(mean / up, up * lambda[b]) / (2 * up * up);
  }
  for (const [p, q, s] of ORDERS) {
    const at = (triple[p] * n + triple[q]) * n + triple[s];
    left[at * n + b] = l;
    right[b * n ** 3 + at] = r;
  }
}

const ORDERS: readonly Triple[] = [
  [0, 1, 2],
  [0, 2, 1],
  [1, 0, 2],
  [1, 2, 0],
  [2, 0, 1],
  [2, 1, 0],
];

/** F[a, c; d, b]. */
function mixedDifference(
  { left, right }: MeanTable,
  lambda: Float64Array,
  a: number,
  c: number,
  d: number,
  b: number,
  up: number,
): number {
  const n = lambda.length;
  const width = lambda[a] - lambda[c];
  const height = lambda[d] - lambda[b];
  const [sum, total] = [lambda[a] + lambda[c], lambda[d] + lambda[b]];
  if (Math.abs(width) > CLOSE_SPREAD * sum) return (right[(a * n + d) * n + b] - right[(c * n + d) * n + b]) / width;
  if (Math.abs(height) > CLOSE_SPREAD * total) return (left[(a * n + c) * n + d] - left[(a * n + c) * n + b]) / height;
  // Λ is homogeneous of degree one: xΛ_xx + yΛ_xy = 0.
  const [x, y] = [(up * sum) / 2, total / 2 / up];
  return (-x / y) * secondSlope(x, y);
}

/** ∂²Λ(x,y)/∂x² = −φ₂′(−r)/x with r = log(x/y), φ₂(z) = (e^z − 1 − z)/z². */
export function secondSlope(x: number, y: number): number {
  const z = -Math.log(x / y);
  if (Math.abs(z) > SERIES_CURVATURE) return -((z - 2) * Math.exp(z) + z + 2) / (z * z * z * x);
  let sum = 0;
  for (let k = SLOPE_COEFFICIENTS.length - 1; k >= 0; k--) sum = sum * z + SLOPE_COEFFICIENTS[k];
  return -sum / x;
}

/** (k+1)/(k+3)!, the series of φ₂′. */
const SLOPE_COEFFICIENTS = Array.from({ length: 18 }, (_, k) => {
  let product = 1;
  for (let i = 2; i <= k + 3; i++) product *= i;
  return (k + 1) / product;
});
