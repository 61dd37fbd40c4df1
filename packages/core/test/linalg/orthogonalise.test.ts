import { describe, expect, it } from 'vitest';
import { addCombination, appendOrthonormal, norm, orthogonalise } from '../../src/linalg/orthogonalise.js';
import { seededRandom } from '../../src/random.js';
import { expectBelow, expectClose } from './support/expect-close.js';

const random = seededRandom('orthogonalise');
const vector = (n: number): Float64Array => Float64Array.from({ length: n }, () => random.normal());
const dot = (a: Float64Array, b: Float64Array): number => a.reduce((sum, x, i) => sum + x * b[i], 0);

function orthonormal(count: number, n: number): Float64Array[] {
  const basis: Float64Array[] = [];
  while (basis.length < count) appendOrthonormal(basis, vector(n));
  return basis;
}

describe.each([0, 1, 3, 4, 5, 11])('orthogonalise against %i vectors', (count) => {
  const basis = orthonormal(count, 30);

  it('leaves nothing along them and returns what was removed', () => {
    const x = vector(30);
    const before = x.slice();
    const removed = orthogonalise(x, basis);
    expect(removed.length).toBe(count);
    basis.forEach((v) => expectBelow(Math.abs(dot(v, x)), 1e-15 * norm(before) * 8, 'product'));
    addCombination(x, basis, removed);
    before.forEach((value, i) => expectClose(x[i], value, 1e-14, `entry ${i}`));
  });

  it('projects a second time where almost nothing is left', () => {
    // One part in 1e9 lies outside the span: a single projection would leave products near 1e-7 of the rest.
    const [outside] = orthonormal(1, 30);
    orthogonalise(outside, basis);
    const x = outside.map((value) => (1e-9 * value) / norm(outside));
    addCombination(x, basis, vector(count));
    orthogonalise(x, basis);
    const left = norm(x);
    expectClose(left, 1e-9, 1e-15, 'what is left');
    basis.forEach((v) => expectBelow(Math.abs(dot(v, x)), 1e-14 * left, 'product'));
  });
});

it('norm sums every entry, whatever the length', () => {
  for (const n of [0, 1, 2, 3, 4, 5, 8, 13]) {
    const x = Float64Array.from({ length: n }, (_, i) => i + 1);
    expectClose(norm(x) ** 2, (n * (n + 1) * (2 * n + 1)) / 6, 1e-12 * n ** 3, `n = ${n}`);
  }
});
