import { describe, expect, it } from 'vitest';
import {
  diagonal,
  frobeniusNorm,
  hermitianPart,
  identity,
  multiply,
  multiplyAdjointFirst,
  subtract,
  zeros,
} from '../../src/linalg/complex-matrix.js';
import { hermitianPencil } from '../../src/linalg/hermitian-pencil.js';
import { symmetricPencil } from '../../src/linalg/symmetric-pencil.js';
import { seededRandom } from '../../src/random.js';
import { expectAllClose, expectBelow } from './support/expect-close.js';
import { hermitianFamilies, randomMatrix, wellConditioned } from './support/inputs.js';
import { EIGEN_RATIO } from './support/ratios.js';

describe('hermitianPencil', () => {
  for (const n of [0, 1, 3, 8, 20]) {
    const random = seededRandom(`hermitian pencil ${n}`);
    const b = wellConditioned(random, n);
    for (const [family, a] of Object.entries(hermitianFamilies(random, n, true))) {
      it(`solves A x = λ B x: n = ${n}, ${family}`, () => {
        const { values, vectors } = hermitianPencil(a, b);
        const residual = frobeniusNorm(
          subtract(multiply(a, vectors), multiply(multiply(b, vectors), diagonal(values))),
        );
        const size = frobeniusNorm(a) * frobeniusNorm(vectors) * n * 2 ** -52;
        expectBelow(size > 0 ? residual / size : residual, EIGEN_RATIO, 'residual ratio');
        const defect = frobeniusNorm(subtract(multiplyAdjointFirst(vectors, multiply(b, vectors)), identity(n)));
        expectBelow(n > 0 ? defect / (n * 2 ** -52) : defect, EIGEN_RATIO, 'B-orthonormality ratio');
      });
    }
  }

  it('agrees with the real solver on real pencils', () => {
    const random = seededRandom('real pencil');
    const a = hermitianPart(randomMatrix(random, 9, 9, false));
    const b = wellConditioned(random, 9, false);
    expectAllClose(hermitianPencil(a, b).values, symmetricPencil(a.re, b.re, 9).values, 1e-14, 'eigenvalue');
  });

  it('refuses an indefinite or misshapen B', () => {
    const indefinite = diagonal([1, -1]);
    expect(() => hermitianPencil(identity(2), indefinite)).toThrow(
      expect.objectContaining({ code: 'not-positive-definite' }),
    );
    expect(() => hermitianPencil(identity(2), zeros(3))).toThrow(
      expect.objectContaining({ code: 'dimension-mismatch' }),
    );
  });
});
