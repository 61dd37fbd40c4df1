import { expect, test } from 'vitest';
import { choleskyErrorFactor, choleskyProof } from '../../../src/checker/arithmetic/cholesky-bound.js';
import { decideSemidefinite } from '../../../src/checker/arithmetic/exact-semidefinite.js';
import {
  gaussianFromMatrix,
  gaussianIdentity,
  scaleGaussianMatrix,
  subtractGaussianMatrix,
} from '../../../src/checker/arithmetic/gaussian-matrix.js';
import { gaussian } from '../../../src/checker/arithmetic/gaussian-rational.js';
import { rationalFromDouble } from '../../../src/checker/arithmetic/rational.js';
import { type ComplexMatrix, fromEntries } from '../../../src/linalg/complex-matrix.js';
import { seededRandom } from '../../../src/random.js';

/** Whether A − s is positive semidefinite, exactly. */
function isAbove(a: ComplexMatrix, s: number): boolean {
  const shift = scaleGaussianMatrix(gaussianIdentity(a.rows), gaussian(rationalFromDouble(s)));
  return decideSemidefinite(subtractGaussianMatrix(gaussianFromMatrix(a), shift)).semidefinite;
}

/** The largest shift, to the last bit, at which the factorisation still ends, from one that does to one that does not. */
function edge(a: Float64Array, n: number, from: number, to: number): number {
  let [low, high] = [from, to];
  for (;;) {
    const middle = (low + high) / 2;
    if (!(middle > low && middle < high)) return low;
    if (choleskyProof(a, n, middle)) low = middle;
    else high = middle;
  }
}

test('at the last shift that factorises the bound is still below the spectrum, and not far', () => {
  const random = seededRandom('edge of definiteness');
  for (let trial = 0; trial < 10; trial++) {
    const n = 8 + random.integer(20);
    const b = Array.from({ length: n * n }, () => random.normal());
    const a = fromEntries(n, n, (i, j) => [b[i * n + j] + b[j * n + i], 0]);
    const top = Math.max(...a.re.map(Math.abs)) * n;
    const shift = edge(a.re, n, -top, top);
    const proof = choleskyProof(a.re, n, shift);
    if (!proof) throw new Error('expected a factorisation');
    expect(isAbove(a, proof.bound), `shift ${shift} bound ${proof.bound}`).toBe(true);
    expect(shift - proof.bound).toBeLessThan(2 * choleskyErrorFactor(n) * 2 * n * top);
  }
});

test('rounded Gram matrices that are slightly indefinite pass the factorisation but not the bound', () => {
  const random = seededRandom('rounded Gram matrices');
  let deceived = 0;
  for (let trial = 0; trial < 60; trial++) {
    const n = 3 + random.integer(6);
    const b = Array.from({ length: n * n }, (_, k) => (k % n === 0 ? 0 : random.normal()));
    const a = fromEntries(n, n, (i, j) => {
      let sum = 0;
      for (let k = 0; k < n; k++) sum += b[i * n + k] * b[j * n + k];
      return [sum, 0];
    });
    const proof = choleskyProof(a.re, n, 0);
    if (!proof) continue;
    if (!isAbove(a, 0)) deceived++;
    expect(proof.bound).toBeLessThan(0);
    expect(isAbove(a, proof.bound), `bound ${proof.bound}`).toBe(true);
  }
  expect(deceived).toBeGreaterThan(2);
});

test('an indefinite matrix is not factorised, nor one out of range', () => {
  expect(choleskyProof(Float64Array.of(1, 2, 2, 1), 2, 0)).toBeNull();
  expect(choleskyProof(Float64Array.of(NaN), 1, 0)).toBeNull();
  expect(choleskyProof(Float64Array.of(1e200), 1, 0)).toBeNull();
  expect(choleskyProof(Float64Array.of(4), 1, 0)?.factor[0]).toBe(2);
});
