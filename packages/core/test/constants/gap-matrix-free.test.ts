import { describe, expect, it } from 'vitest';
import { blockAlgebra, fromCoordinates, toCoordinates, upperToCoordinates } from '../../src/algebra/block-algebra.js';
import { gapDense } from '../../src/constants/gap.js';
import { gapMatrixFree } from '../../src/constants/gap-matrix-free.js';
import { dephasing, fermionicNumber, pauliJumps, thermalQubit } from '../../src/families/index.js';
import type { Generator } from '../../src/generator/generator.js';
import { scaleSparse } from '../../src/generator/lindblad-generator.js';
import { tensorGenerator } from '../../src/generator/tensor-generator.js';
import { seededRandom } from '../../src/random.js';
import type { FixedPoints } from '../../src/structure/fixed-points.js';
import type { ReferenceState } from '../../src/structure/reference-state.js';
import { analyse } from '../../src/structure/structure.js';
import { kmsQubit } from '../helpers/kms-qubit.js';
import { randomBalancedGenerator } from '../helpers/random-balanced-generator.js';
import { expectAllClose, expectBelow, expectClose } from '../linalg/support/expect-close.js';

/** X_i at rate 1 and Z_i at rate 0.7 in the form Σ rate (PAP − A); the slowest strings are single X's, which only Z damps: 1.4. */
function pauliChain(n: number): Generator {
  const at = (i: number, letter: string): string => 'I'.repeat(i) + letter + 'I'.repeat(n - 1 - i);
  const sites = Array.from({ length: n }, (_, i) => i);
  return pauliJumps(
    sites.flatMap((i) => [
      { string: at(i, 'X'), rate: 2 },
      { string: at(i, 'Z'), rate: 1.4 },
    ]),
  );
}

const thermal = thermalQubit({ beta: 1, gamma: 0.5 });
const balanced = (blocks: number[], seed: string, rotate: boolean): Generator =>
  randomBalancedGenerator(blockAlgebra(blocks), seededRandom(seed), rotate).generator;

describe('the matrix-free gap', () => {
  it.each([
    ['a tracial chain', pauliChain(3)],
    ['fermions', fermionicNumber(3)],
    ['a diagonal state', tensorGenerator([thermal, thermal, thermal])],
    ['a rotated state', balanced([4], 'gap 1', true)],
    ['several blocks', balanced([3, 2], 'gap 2', true)],
    ['KMS symmetry alone', kmsQubit()],
    ['many fixed points', dephasing(5)],
    ['many fixed points, one of them not diagonal', tensorGenerator([dephasing(3), thermal])],
  ])('is the dense one: %s', (_, g) => {
    const { state, symmetry, fixedPoints } = analyse(g);
    const dense = gapDense(g, state as ReferenceState, fixedPoints as FixedPoints);
    const found = gapMatrixFree(g, symmetry.kind === 'tracial' ? null : state, seededRandom('lanczos'));
    expectClose(found.value, dense.value, 1e-9 * dense.value, 'gap');
    expectBelow(found.residual, 1e-8 * dense.value, 'residual');
    expect(found.fixedPoints).toBe(fixedPoints?.dimension);
  });

  it.each([4, 5])('is 1.4 on the Pauli chain of %i qubits', (n) => {
    const found = gapMatrixFree(pauliChain(n), null, seededRandom('chain'));
    expectClose(found.value, 1.4, 1e-10, 'gap');
    expect(found.matvecs).toBeLessThan(250);
  });

  it.each([1e-12, 1e12])('tells a fixed point from a slow rate by the rates at hand: times %f', (c) => {
    const g = pauliChain(3);
    const jumps = g.jumps.map(({ matrix }) => ({ matrix: scaleSparse(matrix, Math.sqrt(c)) }));
    const found = gapMatrixFree({ ...g, jumps }, null, seededRandom('chain'));
    expectClose(found.value / c, 1.4, 1e-10, 'gap');
    expect(found.fixedPoints).toBe(1);
  });
});

describe('coordinates from the upper triangle', () => {
  it.each([[[5]], [[2, 1, 3]], [[1, 1]], [[40]]])('are those of the whole matrix: %j', (blocks) => {
    const algebra = blockAlgebra(blocks);
    const random = seededRandom('upper');
    const x = Float64Array.from({ length: algebra.dimension }, () => random.normal());
    const a = fromCoordinates(algebra, x);
    expectAllClose(toCoordinates(algebra, a), x, 1e-15 * 4, 'coordinate');
    expectAllClose(upperToCoordinates(algebra, a, x.slice().fill(7), -2), x.map((v) => -2 * v), 1e-14, 'coordinate'); // prettier-ignore
  });
});
