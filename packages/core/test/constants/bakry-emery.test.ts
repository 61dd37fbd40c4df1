import { describe, expect, it } from 'vitest';
import { blockAlgebra } from '../../src/algebra/block-algebra.js';
import { bakryEmery, completeBakryEmery } from '../../src/constants/bakry-emery.js';
import { carreDuChamp } from '../../src/constants/carre-du-champ.js';
import { degeneratePencil } from '../../src/constants/degenerate-pencil.js';
import { cycle, depolarising } from '../../src/families/index.js';
import { lindbladGenerator } from '../../src/generator/lindblad-generator.js';
import { fromRows } from '../../src/linalg/complex-matrix.js';
import { seededRandom } from '../../src/random.js';
import { expectWithin } from '../helpers/bracket-of.js';

describe('largest κ with X − κY positive, Y singular', () => {
  const y = fromRows([
    [2, 0],
    [0, 0],
  ]);

  it('takes the Schur complement on the kernel', () => {
    const x = fromRows([
      [3, 1],
      [1, 2],
    ]);
    expectWithin(degeneratePencil(x, y).value, (3 - 1 / 2) / 2, 1e-12, 'κ');
  });

  it('is −∞ when X is negative, or unbalanced, on the kernel', () => {
    const negative = fromRows([
      [3, 0],
      [0, -1],
    ]);
    const unbalanced = fromRows([
      [3, 1],
      [1, 0],
    ]);
    expect(degeneratePencil(negative, y).value).toBe(-Infinity);
    expect(degeneratePencil(unbalanced, y).value).toBe(-Infinity);
  });

  it('says when kernel and range cannot be told apart', () => {
    const nearly = fromRows([
      [1, 0],
      [0, 1e-10],
    ]);
    expect(
      degeneratePencil(
        fromRows([
          [1, 0],
          [0, 1],
        ]),
        nearly,
      ).decided,
    ).toBe(false);
  });
});

describe('be and cbe', () => {
  it('are unbounded for an amplitude damping with a drive, and not defined away', () => {
    const g = lindbladGenerator({
      algebra: blockAlgebra([2]),
      hamiltonian: fromRows([
        [0, 0.4],
        [0.4, 0],
      ]),
      jumps: [
        {
          matrix: fromRows([
            [0, 1],
            [0, 0],
          ]),
        },
      ],
    });
    expect(completeBakryEmery(carreDuChamp(g)).value).toBe(-Infinity);
  });

  it('coincide on commutative algebras and are complete there', () => {
    const g = cycle(5);
    const forms = carreDuChamp(g);
    const plain = bakryEmery(g, forms, { random: seededRandom(1) });
    expect(plain.complete).toBe(true);
    expectWithin(plain.value, completeBakryEmery(forms).value, 1e-10, 'be');
  });

  it('the search over vectors reaches the constant of a covariant generator', () => {
    const g = depolarising(3);
    const forms = carreDuChamp(g);
    const plain = bakryEmery(g, forms, { random: seededRandom(1) });
    expect(plain.complete).toBe(true);
    expectWithin(plain.value, 0.75, 1e-9, 'be');
    expect(completeBakryEmery(forms).value).toBeLessThanOrEqual(plain.value + 1e-12);
  });
});
