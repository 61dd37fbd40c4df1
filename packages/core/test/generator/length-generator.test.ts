import { describe, expect, it } from 'vitest';
import { blockAlgebra } from '../../src/algebra/block-algebra.js';
import { applyGenerator, generatorMatrix } from '../../src/generator/apply-generator.js';
import { type FiniteGroup, finiteGroup } from '../../src/generator/finite-group.js';
import { gromovForm, groupLength } from '../../src/generator/group-length.js';
import { groupAlgebra, lengthGenerator } from '../../src/generator/length-generator.js';
import {
  adjoint,
  frobeniusNorm,
  identity,
  innerProduct,
  multiply,
  scale,
  subtract,
} from '../../src/linalg/complex-matrix.js';
import { symmetricEigenvalues } from '../../src/linalg/symmetric-eigen.js';
import { analyse } from '../../src/structure/structure.js';
import { expectError } from '../helpers/expect-error.js';
import { expectAllClose, expectBelow, expectClose } from '../linalg/support/expect-close.js';

const GROUPS = [
  { group: { cyclic: 1 }, blocks: [1] },
  { group: { cyclic: 5 }, blocks: [1, 1, 1, 1, 1] },
  { group: { dihedral: 3 }, blocks: [1, 1, 2] },
  { group: { dihedral: 4 }, blocks: [1, 1, 1, 1, 2] },
  { group: { symmetric: 3 }, blocks: [1, 1, 2] },
  { group: { symmetric: 4 }, blocks: [1, 1, 2, 3, 3] },
];

function expectGroupLaws({ order, product, inverse, identity: e }: FiniteGroup): void {
  const times = (g: number, h: number) => product[g * order + h];
  for (let g = 0; g < order; g++) {
    expect([times(e, g), times(g, e), times(g, inverse[g]), times(inverse[g], g)]).toEqual([g, g, e, e]);
    for (let h = 0; h < order; h++) {
      const k = (g * 7 + h * 3 + 1) % order;
      expect(times(times(g, h), k)).toBe(times(g, times(h, k)));
    }
  }
}

describe('finiteGroup', () => {
  for (const { group } of GROUPS) {
    it(`${JSON.stringify(group)} is a group, and so is its table`, () => {
      const named = finiteGroup(group);
      expectGroupLaws(named);
      const rows = Array.from({ length: named.order }, (_, g) => [
        ...named.product.subarray(g * named.order, (g + 1) * named.order),
      ]);
      expect(finiteGroup({ table: rows })).toMatchObject({
        identity: named.identity,
        inverse: named.inverse,
        generators: null,
      });
    });
  }

  it('lists elements in the documented order', () => {
    // s r s = r⁻¹ in dihedral 4: index 4 is s, 1 is r, 3 is r⁻¹.
    const d = finiteGroup({ dihedral: 4 });
    const times = (g: number, h: number) => d.product[g * 8 + h];
    expect(times(times(4, 1), 4)).toBe(3);
    expect(times(1, 4)).toBe(5);
    // symmetric 3 in one-line order: 012, 021, 102, 120, 201, 210. (gh)(x) = g(h(x)): 021∘102 sends 0→2, 1→0, 2→1.
    const s = finiteGroup({ symmetric: 3 });
    expect(s.product[1 * 6 + 2]).toBe(4);
    expect(s.generators).toEqual([2, 1]);
  });

  it('names what is wrong', () => {
    const table = (rows: number[][]) => () => finiteGroup({ table: rows });
    expectError(table([[0, 1], [1, 1]]), 'not-a-group', /row 1 to hold each of 0…1 once/, '/generator/group/table/1'); // prettier-ignore
    expectError(table([[0, 1], [1]]), 'not-a-group', /row 1/, '/generator/group/table/1'); // prettier-ignore
    expectError(table([[0, 1], [0, 1]]), 'not-a-group', /column 0 to hold each/); // prettier-ignore
    expectError(table([[1, 2, 0], [0, 1, 2], [2, 0, 1]]), 'not-a-group', /associative product .*got \(0·0\)·0 = 0 but/); // prettier-ignore
    expectError(table([[1, 0, 2], [0, 2, 1], [2, 1, 0]]), 'not-a-group', /identity element/); // prettier-ignore
    expectError(table([]), 'not-a-group', /identity element/);
    expectError(
      () => finiteGroup({ cyclic: 0 }),
      'usage',
      /"cyclic" to be a whole number of at least 1, got 0/,
      '/generator/group/cyclic',
    );
    expectError(
      () => finiteGroup({ symmetric: 6 }),
      'too-large',
      /order at most 128, got 720/,
      '/generator/group/symmetric',
    );
  });
});

describe('groupAlgebra', () => {
  for (const { group, blocks } of GROUPS) {
    it(`of ${JSON.stringify(group)} has blocks [${blocks.join()}] and is represented faithfully`, () => {
      const g = finiteGroup(group);
      const { algebra, elements } = groupAlgebra(g);
      expect(algebra.blocks).toEqual(blocks);
      for (let a = 0; a < g.order; a++) {
        expectBelow(
          frobeniusNorm(subtract(multiply(adjoint(elements[a]), elements[a]), identity(algebra.size))),
          1e-10,
          `λ_${a} unitary`,
        );
        for (let b = 0; b < g.order; b++) {
          const expected = elements[g.product[a * g.order + b]];
          expectBelow(frobeniusNorm(subtract(multiply(elements[a], elements[b]), expected)), 1e-10, `λ_${a}λ_${b}`);
        }
      }
    });
  }
});

describe('lengthGenerator', () => {
  for (const { group } of GROUPS) {
    it(`on ${JSON.stringify(group)} has L λ_g = −ℓ(g) λ_g, is Markov and GNS-symmetric`, () => {
      const finite = finiteGroup(group);
      const values = groupLength(finite, 'word');
      const g = lengthGenerator({ group, length: 'word' });
      groupAlgebra(finite).elements.forEach((element, at) => {
        const residual = subtract(applyGenerator(g, element), scale(element, -values[at]));
        expectBelow(frobeniusNorm(residual), 1e-10 * (1 + values[at]), `λ_${at}`);
      });
      const { markov, symmetry, state, canonical } = analyse(g);
      expect(markov.completelyPositive.holds).toBe(true);
      expect(['tracial', 'GNS']).toContain(symmetry.kind);
      expect(canonical?.residual).toBeLessThan(1e-11);
      // τ(λ_g) = δ_ge.
      groupAlgebra(finite).elements.forEach((element, at) => {
        const tau = innerProduct((state as NonNullable<typeof state>).sigma, element);
        expectClose(tau.re, at === finite.identity ? 1 : 0, 1e-10, `τ(λ_${at})`);
      });
    });
  }

  it('has the word lengths that are known', () => {
    expect([...groupLength(finiteGroup({ cyclic: 6 }), 'word')]).toEqual([0, 1, 2, 3, 2, 1]);
    // Inversions of 012, 021, 102, 120, 201, 210.
    expect([...groupLength(finiteGroup({ symmetric: 3 }), 'word')]).toEqual([0, 1, 1, 2, 2, 3]);
    expect([...groupLength(finiteGroup({ dihedral: 4 }), 'word')]).toEqual([0, 1, 2, 1, 1, 2, 3, 2]);
  });

  it('keeps the order of blocks that a document gives', () => {
    const g = lengthGenerator({ group: { symmetric: 3 }, length: 'word', algebra: blockAlgebra([2, 1, 1]) });
    expect(g.algebra.blocks).toEqual([2, 1, 1]);
    const weights = [0, 5, 10, 15].map((k) => g.declaredState?.re[k] ?? NaN);
    expectAllClose(weights, [1 / 3, 1 / 3, 1 / 6, 1 / 6], 1e-15);
    const free = lengthGenerator({ group: { symmetric: 3 }, length: 'word' });
    const square = (m: Float64Array) => m.reduce((sum, x) => sum + x * x, 0);
    expectClose(square(generatorMatrix(g)), square(generatorMatrix(free)), 1e-12, '‖L‖²');
  });

  it('rejects n − #cycles on the permutations of three: the offending eigenvalue', () => {
    const length = [0, 1, 1, 2, 2, 1];
    const group = { symmetric: 3 };
    const error = expectError(
      () => lengthGenerator({ group, length }),
      'length-not-conditionally-negative',
      /got the eigenvalue -/,
      '/generator/length',
    );
    const k = gromovForm(finiteGroup(group), Float64Array.from(length));
    const smallest = symmetricEigenvalues(k, 6)[0];
    expect(smallest).toBeLessThan(-0.1);
    expectClose(error.details?.eigenvalue as number, smallest, 1e-14, 'eigenvalue');
    // By hand: with f = 1 on even, −1 on odd permutations Σf = 0, yet Σ ℓ(g⁻¹h) f_g f_h = 6(0+2+2) − 6(1+1+1) = 6 is not ≤ 0.
    const f = [1, -1, -1, 1, 1, -1];
    const finite = finiteGroup(group);
    let form = 0;
    f.forEach((x, g) => f.forEach((y, h) => (form += x * y * length[finite.product[finite.inverse[g] * 6 + h]])));
    expect(form).toBe(6);
  });

  it('names what is wrong', () => {
    const group = { cyclic: 3 };
    const make = (length: number[]) => () => lengthGenerator({ group, length });
    expectError(make([0, 1]), 'dimension-mismatch', /3 lengths, one for each element, got 2/, '/generator/length');
    expectError(make([1, 1, 1]), 'usage', /ℓ = 0 at the identity, element 0, got 1/, '/generator/length/0');
    expectError(
      make([0, 1, 2]),
      'usage',
      /ℓ\(g\) = ℓ\(g⁻¹\), got 1 at element 1 and 2 at its inverse 2/,
      '/generator/length/1',
    );
    expectError(make([0, NaN, NaN]), 'not-finite', /length of element 1, got NaN/, '/generator/length/1');
    expectError(
      () => lengthGenerator({ group: { table: [[0]] }, length: 'word' }),
      'usage',
      /explicit lengths for a group given by its table/,
      '/generator/length',
    );
    expectError(
      () => lengthGenerator({ group, length: 'word', algebra: blockAlgebra([3]) }),
      'dimension-mismatch',
      /blocks \[1, 1, 1\] of the group algebra in any order, got \[3\]/,
      '/algebra',
    );
  });
});
