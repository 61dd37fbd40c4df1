import { requireLength } from './shape-checks.js';
import { loadSymmetric, symmetricEigen, symmetricWork, type SymmetricWork } from './symmetric-eigen.js';
import { applyReflectors, reduceSymmetric } from './symmetric-tridiagonal.js';
import { tridiagonalEigenvector, type TridiagonalScratch } from './tridiagonal-inverse-iteration.js';
import { tridiagonalQL } from './tridiagonal-ql.js';

/** Buffers of `symmetricSmallestInto` for one size n. */
export interface SmallestWork extends SymmetricWork {
  readonly diagonal: Float64Array;
  readonly offDiagonal: Float64Array;
  readonly x: Float64Array;
  readonly scratch: TridiagonalScratch;
}

/**
 * Smallest eigenvalue of (a + aᵀ)/2, n ≥ 1, with a unit eigenvector: without the cost of the other vectors. In a multiple
 * eigenvalue the vector is some element of the eigenspace. Errors as `symmetricEigen`.
 */
export function symmetricSmallest(a: Float64Array, n: number): { value: number; vector: Float64Array } {
  requireLength(a, n * n);
  const vector = new Float64Array(n);
  const value = symmetricSmallestInto(a, n, vector, smallestWork(n));
  return { value, vector };
}

export function smallestWork(n: number): SmallestWork {
  const vector = (): Float64Array => new Float64Array(n);
  return {
    ...symmetricWork(n),
    diagonal: vector(),
    offDiagonal: vector(),
    x: vector(),
    scratch: { upper: vector(), second: vector(), third: vector(), lower: vector(), swapped: new Uint8Array(n) },
  };
}

/** `symmetricSmallest` without allocation; `vector` may be null when only the value is wanted. */
export function symmetricSmallestInto(
  a: Float64Array,
  n: number,
  vector: Float64Array | null,
  work: SmallestWork,
): number {
  const { d, e, h, x } = work;
  const unit = loadSymmetric(a, n, work);
  reduceSymmetric(work.a, n, d, e, h);
  if (vector) {
    work.diagonal.set(d);
    work.offDiagonal.set(e);
  }
  tridiagonalQL(d, e, n, [], work.c, work.s);
  let smallest = Infinity;
  for (let i = 0; i < n; i++) if (d[i] < smallest) smallest = d[i];
  if (!vector) return smallest * unit;
  if (!tridiagonalEigenvector(work.diagonal, work.offDiagonal, n, smallest, x, work.scratch)) {
    return smallestOfAll(a, n, vector);
  }
  applyReflectors(work.a, n, h, x);
  for (let k = 0; k < n; k++) vector[work.order[k]] = x[k];
  return smallest * unit;
}

/** The plain way, from the full decomposition: for a matrix on which inverse iteration does not settle. */
export function smallestOfAll(a: Float64Array, n: number, vector: Float64Array): number {
  const { values, vectors } = symmetricEigen(a, n);
  for (let i = 0; i < n; i++) vector[i] = vectors[i * n];
  return values[0];
}
