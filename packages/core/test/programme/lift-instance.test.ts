import { describe, expect, it } from 'vitest';
import { conjugate, kronecker, identity, multiply, scale, adjoint } from '../../src/linalg/complex-matrix.js';
import { solveProgramme } from '../../src/programme/solve-programme.js';
import { seededRandom } from '../../src/random.js';
import { expectClose } from '../linalg/support/expect-close.js';
import { randomUnitary } from '../linalg/support/inputs.js';
import { depolarisingJumps, gellMann } from './support/gell-mann.js';
import { liftInstance, smallAnsatz, wideAnsatz, type Jumps, type LiftTensor } from './support/lift-instance.js';
import { expectOptimal } from './support/optimality.js';

const [sx, , sz] = gellMann(2);

/** V = σ_x/2, σ_z/2, that is R = √2 V. */
const PAULI_PAIR = [sx, sz].map((a) => scale(a, Math.SQRT1_2));

function best(jumps: Jumps, tensors: readonly LiftTensor[]): number {
  const programme = liftInstance(jumps, tensors);
  expect(programme).not.toBeNull();
  const solution = solveProgramme(programme!);
  expect(solution.status).toBe('optimal');
  expectOptimal(programme!, solution, 1e-8, 'conditions');
  return solution.dualObjective;
}

describe('lifts of tracial generators (method, section 6)', () => {
  it('depolarising qubit: K = 3/4, the complete Bakry–Émery constant 1/2 + 1/4', () => {
    expectClose(best(depolarisingJumps(2), smallAnsatz(3)), 0.75, 1e-8, 'K');
  });

  it('no more from a wider ansatz', () => {
    expectClose(best(depolarisingJumps(2), wideAnsatz(3)), 0.75, 1e-8, 'K');
  });

  it('σ_x/2 and σ_z/2: K = 1', () => {
    expectClose(best(PAULI_PAIR, smallAnsatz(2)), 1, 1e-8, 'K');
  });

  it('two independent pairs: the same K', () => {
    const pairs = PAULI_PAIR.flatMap((a) => [kronecker(a, identity(2)), kronecker(identity(2), a)]);
    expectClose(best(pairs, wideAnsatz(4)), 1, 1e-8, 'K');
  });

  it('a rotated model has the same K, and twice the rates give twice K', () => {
    const u = randomUnitary(seededRandom('rotation'), 2);
    const rotated = PAULI_PAIR.map((a) => multiply(multiply(u, a), adjoint(u)));
    expectClose(best(rotated, smallAnsatz(2)), 1, 1e-8, 'K');
    expectClose(best(rotated.map(conjugate), smallAnsatz(2)), 1, 1e-8, 'K of the conjugate model');
    expectClose(
      best(
        PAULI_PAIR.map((a) => scale(a, Math.SQRT2)),
        smallAnsatz(2),
      ),
      2,
      2e-8,
      'K',
    );
  });

  it('depolarising with three levels and Hermitian jumps: 17/30', () => {
    expectClose(best(depolarisingJumps(3), smallAnsatz(8)), 17 / 30, 1e-8, 'K');
  });
});
