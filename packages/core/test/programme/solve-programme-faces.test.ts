import { describe, expect, it } from 'vitest';
import {
  adjoint,
  directSum,
  hermitianPart,
  multiply,
  zeros,
  type ComplexMatrix,
} from '../../src/linalg/complex-matrix.js';
import { denseFromSparse, sparseFromDense } from '../../src/linalg/sparse-matrix.js';
import { type Programme } from '../../src/programme/programme.js';
import { solveProgramme } from '../../src/programme/solve-programme.js';
import { seededRandom } from '../../src/random.js';
import { expectBelow } from '../linalg/support/expect-close.js';
import { randomUnitary } from '../linalg/support/inputs.js';
import { randomProgramme } from './support/random-programme.js';

/**
 * A programme of side n inside side n + 2, where S = U [S₀, Σ z_k B_k; …, 0] U*: positive only for z = 0, so that no S is
 * positive definite and X is unbounded. Its optimum is that of the small one.
 */
function withForcedFace(small: Programme, seed: string): Programme {
  const random = seededRandom(seed);
  const [block] = small.blocks;
  const n = block.size;
  const u = randomUnitary(random, n + 2, block.kind === 'hermitian');
  const turn = (a: ComplexMatrix): ComplexMatrix => hermitianPart(multiply(multiply(u, a), adjoint(u)));
  const embed = (a: ComplexMatrix): ComplexMatrix => turn(directSum([a, zeros(2)]));
  const couplings = [0, 1].map(() => {
    const a = zeros(n + 2);
    for (let i = 0; i < n; i++) {
      for (let j = n; j < n + 2; j++) a.re[i * (n + 2) + j] = a.re[j * (n + 2) + i] = random.normal();
    }
    return turn(a);
  });
  const matrices = [...block.coefficients.map(({ matrix }) => embed(denseFromSparse(matrix))), ...couplings];
  return {
    objective: [...Array.from(small.objective), 0.1, -0.2],
    blocks: [
      {
        kind: block.kind,
        size: n + 2,
        constant: sparseFromDense(embed(denseFromSparse(block.constant))),
        coefficients: matrices.map((a, unknown) => ({ unknown, matrix: sparseFromDense(a) })),
      },
    ],
  };
}

describe.each(['symmetric', 'hermitian'] as const)('%s programmes whose feasible set has no interior', (kind) => {
  it.each([0, 1, 2, 3, 4, 5, 6, 7])('still give the optimum to 1e-6, seed %i', (seed) => {
    const name = `face ${kind} ${seed}`;
    const shape = { sizes: [3 + (seed % 4)], kind, unknowns: 3, density: 1 };
    const small = randomProgramme(shape, seededRandom(name));
    const right = solveProgramme(small);
    expect(right.status).toBe('optimal');
    const solution = solveProgramme(withForcedFace(small, name));
    expect(['optimal', 'stalled']).toContain(solution.status);
    const scale = Math.max(1, Math.abs(right.dualObjective));
    // A rounding error ε of the data moves such an optimum by about √ε.
    expectBelow(Math.abs(solution.dualObjective - right.dualObjective) / scale, 1e-6, 'difference of the optima');
    expectBelow(Math.abs(solution.y[3]) + Math.abs(solution.y[4]), 1e-6, 'couplings, forced to 0');
  });
});
