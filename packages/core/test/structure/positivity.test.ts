import { describe, expect, it } from 'vitest';
import { basisElement, blockAlgebra, toCoordinates } from '../../src/algebra/block-algebra.js';
import type { Generator } from '../../src/generator/generator.js';
import { expectationGenerator } from '../../src/generator/expectation-generator.js';
import { superoperatorGenerator } from '../../src/generator/superoperator-generator.js';
import { localDepolarising } from '../../src/families/index.js';
import {
  identity,
  scale,
  transpose,
  trace,
  subtract,
  addScaledInto,
  zeros,
  fromEntries,
} from '../../src/linalg/complex-matrix.js';
import type { ComplexMatrix } from '../../src/linalg/complex-matrix.js';
import { seededRandom } from '../../src/random.js';
import { isMarkov, markovChecks } from '../../src/structure/positivity.js';
import { randomBalancedGenerator } from '../helpers/random-balanced-generator.js';
import { expectBelow, expectClose } from '../linalg/support/expect-close.js';

/** A generator from any Hermiticity-preserving map on M_n. */
function fromMap(n: number, map: (a: ComplexMatrix) => ComplexMatrix): Generator {
  const algebra = blockAlgebra([n]);
  const d = algebra.dimension;
  const columns = Array.from({ length: d }, (_, l) => toCoordinates(algebra, map(basisElement(algebra, l))));
  return {
    algebra,
    hamiltonian: null,
    jumps: [],
    superoperator: Float64Array.from({ length: d * d }, (_, k) => columns[k % d][Math.floor(k / d)]),
    declaredState: null,
    origin: { kind: 'superoperator' },
  };
}

describe('markovChecks', () => {
  it('accepts random generators on every kind of algebra', () => {
    for (const blocks of [[2, 1], [2, 2], [1, 1, 2], [3], [1, 1, 1, 1]]) {
      // prettier-ignore
      const { generator } = randomBalancedGenerator(blockAlgebra(blocks), seededRandom(blocks.join()));
      const checks = markovChecks(generator);
      expect(isMarkov(checks), blocks.join()).toBe(true);
      expectBelow(checks.unital.residual, 1e-14, 'L(1)');
    }
  });

  it('finds transposition minus identity positive but not completely positive: smallest eigenvalue −1', () => {
    const checks = markovChecks(fromMap(2, (a) => subtract(transpose(a), a)));
    expect(checks.unital.holds).toBe(true);
    expect(checks.completelyPositive.holds).toBe(false);
    // The Choi matrix of transposition is the swap; off 1 its eigenvalues are 1, 1 and −1.
    expectClose(checks.completelyPositive.smallestEigenvalue, -1, 1e-14, 'smallest eigenvalue');
  });

  it('accepts Werner–Holevo minus identity exactly at the edge', () => {
    // A ↦ (Tr A · 1 − Aᵀ)/(n−1) is completely positive with Choi eigenvalues 0 and 2/(n−1).
    const n = 3;
    const map = (a: ComplexMatrix): ComplexMatrix => {
      const image = scale(identity(n), trace(a).re / (n - 1));
      addScaledInto(image, transpose(a), -1 / (n - 1));
      return subtract(image, a);
    };
    const checks = markovChecks(fromMap(n, map));
    expect(checks.completelyPositive.holds).toBe(true);
    expectClose(checks.completelyPositive.smallestEigenvalue, 0, 1e-14, 'smallest eigenvalue');
  });

  it('finds a generator that is not unital', () => {
    const checks = markovChecks(fromMap(2, (a) => scale(a, -1)));
    expect(checks.unital.holds).toBe(false);
    expect(isMarkov(checks)).toBe(false);
    expectClose(checks.unital.residual, 0.5, 1e-14, 'L(1) relative to the bound ‖S‖_F = 2');
  });

  it('has the smallest eigenvalue that theory gives for the depolarising generator: 1/n', () => {
    for (const n of [2, 3, 5]) {
      const g = expectationGenerator({ algebra: blockAlgebra([n]), onto: { scalars: true } });
      expectClose(markovChecks(g).completelyPositive.smallestEigenvalue, 1 / n, 1e-14, `n = ${n}`);
    }
  });

  it('sees a negative rate between blocks', () => {
    // On [1,1]: f ↦ −(f(1)−f(0)) at 0, a rate −1 from 0 to 1.
    const n2 = fromEntries(4, 4, (i, j) => [[1, 0, 0, -1][j] * (i === 0 ? 1 : 0), 0]);
    const g = superoperatorGenerator({
      algebra: blockAlgebra([1, 1]),
      matrix: n2,
      picture: 'heisenberg',
      stacking: 'rows',
    });
    const checks = markovChecks(g);
    expect(checks.unital.holds).toBe(true);
    expect(checks.completelyPositive).toMatchObject({ holds: false, smallestEigenvalue: -1 });
  });

  it('takes complete positivity from the form on large algebras only', () => {
    expect(markovChecks(localDepolarising(2)).completelyPositive.byForm).toBe(false);
    expect(markovChecks(localDepolarising(6)).completelyPositive).toEqual({
      holds: true,
      smallestEigenvalue: 0,
      byForm: true,
    });
  });

  it('has nothing to check on one point', () => {
    expect(isMarkov(markovChecks(fromMap(1, () => zeros(1))))).toBe(true);
  });
});
