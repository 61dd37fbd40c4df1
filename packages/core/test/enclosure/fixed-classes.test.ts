import { describe, expect, test } from 'vitest';
import { blockAlgebra } from '../../src/algebra/block-algebra.js';
import { complement, fixedClasses } from '../../src/enclosure/fixed-classes.js';
import { dephasing } from '../../src/families/dephasing.js';
import { depolarising } from '../../src/families/depolarising.js';
import { expectationGenerator } from '../../src/generator/expectation-generator.js';
import { lindbladGenerator } from '../../src/generator/lindblad-generator.js';
import { tensorGenerator } from '../../src/generator/tensor-generator.js';
import { addScaledInto, scale } from '../../src/linalg/complex-matrix.js';
import { hermitianEigen } from '../../src/linalg/hermitian-eigen.js';
import { analyse } from '../../src/structure/structure.js';
import { SX, SZ } from '../checker/arithmetic/witness-models.js';

describe('fixed points as classes of matrix units', () => {
  test('multiples of the identity: the diagonal units are one class', () => {
    const classes = fixedClasses(analyse(depolarising(3)), null);
    expect(classes?.count).toBe(1);
    expect([...(classes?.classOf ?? [])]).toEqual([0, -1, -1, -1, 0, -1, -1, -1, 0]);
  });

  test('diagonal and block-diagonal algebras', () => {
    expect(fixedClasses(analyse(dephasing(3)), null)?.count).toBe(3);
    const onto = expectationGenerator({ algebra: blockAlgebra([3]), onto: { blocks: [2, 1] } });
    const classes = fixedClasses(analyse(onto), null);
    expect(classes?.count).toBe(5);
    expect([...(classes?.classOf ?? [])].filter((c) => c < 0)).toHaveLength(4);
  });

  test('a factor with multiplicity: each unit of it twice', () => {
    const still = expectationGenerator({ algebra: blockAlgebra([2]), onto: { blocks: [2] } });
    const classes = fixedClasses(analyse(tensorGenerator([depolarising(2), still])), null);
    expect(classes?.count).toBe(4);
    expect(classes && complement(classes, () => 1)).toHaveLength(12);
  });

  test('other bases: off-diagonal units may form classes, rotated algebras do not', () => {
    const flip = lindbladGenerator({ algebra: blockAlgebra([2]), jumps: [{ matrix: SX }] });
    expect([...(fixedClasses(analyse(flip), null)?.classOf ?? [])]).toEqual([0, 1, 1, 0]);
    const between = addScaledInto(scale(SX, 0.6), SZ, 0.8);
    const turned = analyse(lindbladGenerator({ algebra: blockAlgebra([2]), jumps: [{ matrix: between }] }));
    expect(fixedClasses(turned, null)).toBeNull();
    const { vectors } = hermitianEigen(between);
    expect([...(fixedClasses(turned, vectors)?.classOf ?? [])]).toEqual([0, -1, -1, 1]);
  });

  test('the unit of largest weight of each class is left out of a complement', () => {
    const classes = fixedClasses(analyse(depolarising(2)), null);
    if (!classes) throw new Error('expected classes');
    expect(complement(classes, (p) => p)).toEqual([0, 1, 2]);
    expect(complement(classes, (p) => -p)).toEqual([1, 2, 3]);
  });
});
