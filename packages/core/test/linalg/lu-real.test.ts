import { describe, expect, it } from 'vitest';
import { solveReal } from '../../src/linalg/lu-real.js';
import { identityReal } from '../../src/linalg/real-matrix.js';
import { seededRandom, type Random } from '../../src/random.js';
import { expectBelow } from './support/expect-close.js';
import { grading, randomMatrix, shuffle, withSpectrum } from './support/inputs.js';
import { asMatrix, SOLVE_RATIO, solveRatio } from './support/ratios.js';

describe('solveReal', () => {
  for (const n of [0, 1, 2, 5, 17, 50]) {
    for (const [family, a] of Object.entries(invertible(seededRandom(`solve ${n}`), n))) {
      it(`solves: n = ${n}, ${family}`, () => {
        const b = randomMatrix(seededRandom(n), n, 4, false);
        const x = asMatrix(solveReal(a, n, b.re, 4), n, 4);
        expectBelow(solveRatio(asMatrix(a, n), x, b), SOLVE_RATIO, 'solve ratio');
      });
    }
  }

  it('pivots where elimination without exchange would fail', () => {
    expect(Array.from(solveReal(Float64Array.of(0, 1, 1, 0), 2, Float64Array.of(3, 5)))).toEqual([5, 3]);
    const x = solveReal(Float64Array.of(1e-20, 1, 1, 1), 2, Float64Array.of(1, 2));
    expect(x[0]).toBeCloseTo(1, 15);
    expect(x[1]).toBeCloseTo(1, 15);
  });

  it('refuses singular, misshapen and infinite input', () => {
    const b = Float64Array.of(1, 1);
    expect(() => solveReal(Float64Array.of(1, 2, 2, 4), 2, b)).toThrow(
      expect.objectContaining({ code: 'singular-matrix' }),
    );
    expect(() => solveReal(identityReal(3), 3, b)).toThrow(expect.objectContaining({ code: 'dimension-mismatch' }));
    expect(() => solveReal(identityReal(2), 2, Float64Array.of(1, NaN))).toThrow(
      expect.objectContaining({ code: 'not-finite' }),
    );
  });
});

function invertible(random: Random, n: number): Record<string, Float64Array> {
  const order = shuffle(
    random,
    Array.from({ length: n }, (_, k) => k),
  );
  const permutation = new Float64Array(n * n);
  order.forEach((j, i) => (permutation[i * n + j] = 1));
  const normal = randomMatrix(random, n, n, false).re;
  return {
    'random normal': normal,
    identity: identityReal(n),
    permutation,
    'graded spectrum': withSpectrum(random, grading(n), false).re,
    'graded columns': normal.map((x, k) => x * grading(n)[k % n]),
  };
}
