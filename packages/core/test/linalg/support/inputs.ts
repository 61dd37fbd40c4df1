import {
  adjoint,
  add,
  diagonal,
  directSum,
  fromEntries,
  hermitianPart,
  identity,
  multiply,
  multiplyAdjointSecond,
  scale,
  zeros,
  type ComplexMatrix,
} from '../../../src/linalg/complex-matrix.js';
import { qrComplex } from '../../../src/linalg/qr-complex.js';
import type { Random } from '../../../src/random.js';

export function randomMatrix(random: Random, rows: number, cols: number = rows, complex = true): ComplexMatrix {
  return fromEntries(rows, cols, () => [random.normal(), complex ? random.normal() : 0]);
}

export function randomUnitary(random: Random, n: number, complex = true): ComplexMatrix {
  return qrComplex(randomMatrix(random, n, n, complex)).q;
}

/** U diag(spectrum) U* with a random unitary. */
export function withSpectrum(random: Random, spectrum: readonly number[], complex = true): ComplexMatrix {
  const u = randomUnitary(random, spectrum.length, complex);
  return hermitianPart(multiply(multiply(u, diagonal(spectrum)), adjoint(u)));
}

/** Positive definite with condition number near 10. */
export function wellConditioned(random: Random, n: number, complex = true): ComplexMatrix {
  const g = randomMatrix(random, n, n, complex);
  return hermitianPart(add(multiplyAdjointSecond(g, g), scale(identity(n), n)));
}

/** n numbers from 1 down to 1e-12, evenly in the logarithm. */
export function grading(n: number): number[] {
  return Array.from({ length: n }, (_, k) => 10 ** (n > 1 ? (-12 * k) / (n - 1) : 0));
}

/** D B D with B well conditioned and D = 1 … 1e-12 in random order: entries from 1 to 1e-24. */
export function gradedMatrix(random: Random, n: number, complex = true): ComplexMatrix {
  const d = shuffle(random, grading(n));
  return hermitianPart(multiply(multiply(diagonal(d), wellConditioned(random, n, complex)), diagonal(d)));
}

export function shuffle<T>(random: Random, list: readonly T[]): T[] {
  const result = [...list];
  for (let i = result.length - 1; i > 0; i--) {
    const k = random.integer(i + 1);
    [result[i], result[k]] = [result[k], result[i]];
  }
  return result;
}

/** Hermitian matrices of size n that have broken eigensolvers before, by name. */
export function hermitianFamilies(random: Random, n: number, complex: boolean): Record<string, ComplexMatrix> {
  const spectrum = (value: (k: number) => number): ComplexMatrix =>
    withSpectrum(
      random,
      Array.from({ length: n }, (_, k) => value(k)),
      complex,
    );
  const plain = hermitianPart(randomMatrix(random, n, n, complex));
  const half = hermitianPart(randomMatrix(random, Math.floor(n / 2), Math.floor(n / 2), complex));
  return {
    'random normal': plain,
    zero: zeros(n),
    'all equal': scale(identity(n), 3),
    'all equal, rotated': spectrum(() => 0.7),
    'cluster of width 1e-14': spectrum((k) => 1 + k * 1e-14),
    'two clusters at ±1': spectrum((k) => (k % 2 === 0 ? 1 : -1)),
    'graded spectrum, 1 to 1e-12': spectrum((k) => grading(n)[k]),
    'graded spectrum of both signs': spectrum((k) => (k % 2 === 0 ? 1 : -1) * grading(n)[k]),
    'graded entries': gradedMatrix(random, n, complex),
    'near-singular': spectrum((k) => (k === 0 ? 1e-16 : 1 + k)),
    'rank one': fromEntries(n, n, () => [1, 0]),
    'equal blocks': directSum([half, half, zeros(n - 2 * half.rows)]),
    'path Laplacian': fromEntries(n, n, (i, j) => [i === j ? 2 : Math.abs(i - j) === 1 ? -1 : 0, 0]),
    'Wilkinson W+': fromEntries(n, n, (i, j) => [
      i === j ? Math.abs(i - (n - 1) / 2) : Math.abs(i - j) === 1 ? 1 : 0,
      0,
    ]),
    'weakly coupled': fromEntries(n, n, (i, j) => [i === j ? i % 3 : Math.abs(i - j) === 1 ? 1e-9 : 0, 0]),
    'zero diagonal': fromEntries(n, n, (i, j) => [i === n - 1 - j && i !== j ? 1 : 0, 0]),
    'scaled by 1e-200': scale(plain, 1e-200),
    'scaled by 1e200': scale(plain, 1e200),
    'scaled by 1e-305': scale(plain, 1e-305),
  };
}
