import { describe, expect, it } from 'vitest';
import { tridiagonalEigenvector } from '../../src/linalg/tridiagonal-inverse-iteration.js';
import { smallestWork } from '../../src/linalg/symmetric-smallest.js';

describe('tridiagonalEigenvector', () => {
  it('says so when the value is not an eigenvalue', () => {
    const { scratch } = smallestWork(3);
    const found = tridiagonalEigenvector(
      Float64Array.of(1, 2, 3),
      Float64Array.of(1, 1, 0),
      3,
      2.5,
      new Float64Array(3),
      scratch,
    );
    expect(found).toBe(false);
  });

  it('finds the vector of an eigenvalue inside the spectrum', () => {
    const { scratch } = smallestWork(3);
    const x = new Float64Array(3);
    expect(tridiagonalEigenvector(Float64Array.of(2, 2, 2), Float64Array.of(-1, -1, 0), 3, 2, x, scratch)).toBe(true);
    const sign = Math.sign(x[0]);
    expect(x[0] * sign).toBeCloseTo(Math.SQRT1_2, 15);
    expect(x[1]).toBeCloseTo(0, 15);
    expect(x[2] * sign).toBeCloseTo(-Math.SQRT1_2, 15);
  });
});
