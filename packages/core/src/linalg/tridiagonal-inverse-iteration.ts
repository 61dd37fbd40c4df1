import { EPSILON, INVERSE_ITERATION_RESIDUAL, INVERSE_ITERATION_STEPS } from '../tolerances.js';

/** Scratch for `tridiagonalEigenvector`: the factors of P L U = T − λ, vectors of length n. */
export interface TridiagonalScratch {
  readonly upper: Float64Array;
  readonly second: Float64Array;
  readonly third: Float64Array;
  /** Multiplier of elimination step i. */
  readonly lower: Float64Array;
  /** Whether rows i and i + 1 were exchanged at step i. */
  readonly swapped: Uint8Array;
}

/**
 * Unit eigenvector of the symmetric tridiagonal (d, e) for the computed eigenvalue `value` by inverse iteration with
 * partial pivoting (Wilkinson 1965, ch. 9; LAPACK `dstein`). Returns whether the residual reached n ε ‖T‖ times a small
 * constant: for an eigenvalue accurate to rounding only the starting vector can be at fault.
 */
export function tridiagonalEigenvector(
  d: Float64Array,
  e: Float64Array,
  n: number,
  value: number,
  x: Float64Array,
  scratch: TridiagonalScratch,
): boolean {
  if (n === 0) return true;
  const norm = tridiagonalNorm(d, e, n);
  if (!(norm > 0)) {
    x.fill(0, 0, n);
    x[0] = 1;
    return true;
  }
  const accepted = INVERSE_ITERATION_RESIDUAL * n * EPSILON * norm;
  factor(d, e, n, value, norm, scratch);
  // Starting vectors without the symmetry that an eigenvector may have.
  for (let attempt = 1; attempt <= 3; attempt++) {
    for (let i = 0; i < n; i++) x[i] = 1 + ((i * i * attempt + i) % 11) / 11;
    backSubstitute(x, n, scratch);
    normalise(x, n);
    for (let step = 0; step < INVERSE_ITERATION_STEPS; step++) {
      forwardSubstitute(x, n, scratch);
      backSubstitute(x, n, scratch);
      normalise(x, n);
      // One step past the first acceptable residual cleans the vector to rounding.
      if (step > 0 && residual(d, e, n, value, x) <= accepted) return true;
    }
  }
  return false;
}

function tridiagonalNorm(d: Float64Array, e: Float64Array, n: number): number {
  let top = 0;
  for (let i = 0; i < n; i++) {
    const sum = Math.abs(d[i]) + (i > 0 ? Math.abs(e[i - 1]) : 0) + (i < n - 1 ? Math.abs(e[i]) : 0);
    if (sum > top) top = sum;
  }
  return top;
}

/** P L U = T − value; pivots below ε ‖T‖ are replaced by it. */
function factor(
  d: Float64Array,
  e: Float64Array,
  n: number,
  value: number,
  norm: number,
  { upper, second, third, lower, swapped }: TridiagonalScratch,
): void {
  const smallest = EPSILON * norm;
  let pivot = d[0] - value;
  let beside = n > 1 ? e[0] : 0;
  for (let i = 0; i < n - 1; i++) {
    const below = e[i];
    const next = d[i + 1] - value;
    const after = i < n - 2 ? e[i + 1] : 0;
    if (Math.abs(pivot) >= Math.abs(below)) {
      if (Math.abs(pivot) < smallest) pivot = pivot < 0 ? -smallest : smallest;
      const ratio = below / pivot;
      upper[i] = pivot;
      second[i] = beside;
      third[i] = 0;
      lower[i] = ratio;
      swapped[i] = 0;
      pivot = next - ratio * beside;
      beside = after;
    } else {
      const ratio = pivot / below;
      upper[i] = below;
      second[i] = next;
      third[i] = after;
      lower[i] = ratio;
      swapped[i] = 1;
      pivot = beside - ratio * next;
      beside = -ratio * after;
    }
  }
  upper[n - 1] = Math.abs(pivot) < smallest ? (pivot < 0 ? -smallest : smallest) : pivot;
  second[n - 1] = third[n - 1] = 0;
}

function forwardSubstitute(x: Float64Array, n: number, { lower, swapped }: TridiagonalScratch): void {
  for (let i = 0; i < n - 1; i++) {
    if (swapped[i]) {
      const kept = x[i + 1];
      x[i + 1] = x[i] - lower[i] * kept;
      x[i] = kept;
    } else {
      x[i + 1] -= lower[i] * x[i];
    }
  }
}

function backSubstitute(x: Float64Array, n: number, { upper, second, third }: TridiagonalScratch): void {
  for (let i = n - 1; i >= 0; i--) {
    let sum = x[i];
    if (i + 1 < n) sum -= second[i] * x[i + 1];
    if (i + 2 < n) sum -= third[i] * x[i + 2];
    x[i] = sum / upper[i];
  }
}

function normalise(x: Float64Array, n: number): void {
  let top = 0;
  for (let i = 0; i < n; i++) top = Math.max(top, Math.abs(x[i]));
  let sum = 0;
  for (let i = 0; i < n; i++) {
    x[i] /= top;
    sum += x[i] * x[i];
  }
  const length = Math.sqrt(sum);
  for (let i = 0; i < n; i++) x[i] /= length;
}

function residual(d: Float64Array, e: Float64Array, n: number, value: number, x: Float64Array): number {
  let sum = 0;
  for (let i = 0; i < n; i++) {
    let r = (d[i] - value) * x[i];
    if (i > 0) r += e[i - 1] * x[i - 1];
    if (i < n - 1) r += e[i] * x[i + 1];
    sum += r * r;
  }
  return Math.sqrt(sum);
}
