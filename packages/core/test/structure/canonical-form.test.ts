import { describe, expect, it } from 'vitest';
import { blockAlgebra } from '../../src/algebra/block-algebra.js';
import { generatorMatrix } from '../../src/generator/apply-generator.js';
import type { Generator } from '../../src/generator/generator.js';
import { lindbladGenerator } from '../../src/generator/lindblad-generator.js';
import { expectationGenerator } from '../../src/generator/expectation-generator.js';
import { ratesGenerator } from '../../src/generator/rates-generator.js';
import {
  adjoint,
  diagonal,
  frobeniusNorm,
  fromRows,
  innerProduct,
  multiply,
  scale,
  subtract,
} from '../../src/linalg/complex-matrix.js';
import { seededRandom } from '../../src/random.js';
import { type CanonicalForm, canonicalForm } from '../../src/structure/canonical-form.js';
import { referenceState } from '../../src/structure/reference-state.js';
import { symmetryOf } from '../../src/structure/symmetry.js';
import { formulaResidual } from '../helpers/canonical-formula.js';
import { expectError } from '../helpers/expect-error.js';
import { randomBalancedGenerator } from '../helpers/random-balanced-generator.js';
import { expectBelow, expectClose } from '../linalg/support/expect-close.js';

const BLOCKS = [[2, 1], [2, 2], [1, 1, 2], [3], [4], [1, 1, 1, 1]]; // prettier-ignore

/** Every law of the canonical form; `what` names the model in a failure. */
function expectLaws(form: CanonicalForm, g: Generator, what: string): void {
  const { jumps, state, algebra } = form;
  jumps.forEach((jump, j) => {
    const v = jump.matrix;
    const size = frobeniusNorm(v);
    expectClose(jump.norm, size, 1e-12 * size, `${what} norm of ${jump.label}`);
    const modular = subtract(multiply(state.sigma, v), scale(multiply(v, state.sigma), Math.exp(-jump.frequency)));
    expectBelow(frobeniusNorm(modular), 1e-9 * size, `${what} modular residual of ${jump.label}`);
    const partner = jumps[jump.partner];
    expect(partner.partner, `${what} partner of the partner of ${jump.label}`).toBe(j);
    expectClose(partner.frequency, -jump.frequency, 0, `${what} frequency of the partner of ${jump.label}`);
    expectBelow(frobeniusNorm(subtract(partner.matrix, adjoint(v))), 1e-12 * size, `${what} partner of ${jump.label}`);
    const corners = new Set<string>();
    for (let k = 0; k < v.re.length; k++) {
      if (Math.hypot(v.re[k], v.im[k]) === 0) continue;
      corners.add(`${algebra.blockOf[Math.floor(k / v.cols)]} ${algebra.blockOf[k % v.cols]}`);
    }
    expect(corners.size, `${what} corners of ${jump.label}`).toBe(1);
    for (const [b, start] of algebra.offsets.entries()) {
      let re = 0;
      let im = 0;
      for (let i = start; i < start + algebra.blocks[b]; i++) {
        re += v.re[i * v.cols + i];
        im += v.im[i * v.cols + i];
      }
      expectBelow(Math.hypot(re, im), 1e-10 * size, `${what} trace of ${jump.label} in block ${b}`);
    }
    for (const other of jumps.slice(j + 1)) {
      const { re, im } = innerProduct(v, other.matrix);
      expectBelow(Math.hypot(re, im), 1e-10 * size * other.norm, `${what} ${jump.label} orthogonal to ${other.label}`);
    }
  });
  expectBelow(formulaResidual(g, jumps), 1e-11, `${what} residual of the formula`);
  expectBelow(form.residual, 1e-11, `${what} reported residual`);
}

describe('canonical form of random GNS-symmetric generators', () => {
  for (let seed = 0; seed < 54; seed++) {
    const blocks = BLOCKS[seed % BLOCKS.length];
    it(`seed ${seed}, blocks [${blocks.join()}]`, () => {
      const { generator, terms } = randomBalancedGenerator(blockAlgebra(blocks), seededRandom(seed), seed % 3 > 0);
      expectBelow(formulaResidual(generator, terms), 1e-13, 'the balanced form means the formula');
      const state = referenceState(generator);
      expect(['tracial', 'GNS']).toContain(symmetryOf(generator, state).kind);
      expectLaws(canonicalForm(generator, state), generator, 'as given');
      const bare: Generator = { ...generator, jumps: [], superoperator: generatorMatrix(generator) };
      expectLaws(canonicalForm(bare, state), bare, 'extracted');
      const undeclared: Generator = { ...bare, declaredState: null };
      const computed = referenceState(undeclared);
      expect(computed.faithful).toBe(true);
      const found = canonicalForm(undeclared, computed);
      expectBelow(formulaResidual(undeclared, found.jumps), 1e-9, 'residual with a computed state');
    });
  }
});

describe('given jumps', () => {
  const qubit = blockAlgebra([2]);

  it('keeps canonical jumps and their labels', () => {
    const g = lindbladGenerator({
      algebra: qubit,
      jumps: [
        { label: 'down', rate: 3, matrix: fromRows([[0, 1], [0, 0]]) }, // prettier-ignore
        { label: 'up', rate: 1, matrix: fromRows([[0, 0], [1, 0]]) }, // prettier-ignore
        { label: 'phase', rate: 2, matrix: fromRows([[1, 0], [0, -1]]) }, // prettier-ignore
      ],
    });
    const form = canonicalForm(g, referenceState(g));
    expect(form.jumps.map((jump) => jump.label)).toEqual(['down', 'up', 'phase']);
    expectClose(form.jumps[0].frequency, -Math.log(3), 1e-14, 'frequency of lowering');
    expectLaws(form, g, 'three jumps');
  });

  it('removes the trace of a Hermitian jump, which leaves L as it is', () => {
    const g = lindbladGenerator({ algebra: qubit, jumps: [{ label: 'n', matrix: fromRows([[0, 0], [0, 1]]) }] }); // prettier-ignore
    const form = canonicalForm(g, referenceState(g));
    expect(form.jumps.map((jump) => jump.label)).toEqual(['n']);
    expectLaws(form, g, 'projection');
  });

  it('makes a jump that is Hermitian up to a phase self-adjoint', () => {
    const g = lindbladGenerator({ algebra: qubit, jumps: [{ label: 'iX', matrix: fromRows([[0, 0], [0, 0]], [[0, 1], [1, 0]]) }] }); // prettier-ignore
    const form = canonicalForm(g, referenceState(g));
    expect(form.jumps.map((jump) => [jump.label, jump.partner])).toEqual([['iX', 0]]);
    expectLaws(form, g, 'iX');
  });

  it('splits a jump over several blocks into corners', () => {
    const algebra = blockAlgebra([1, 1, 1]);
    const shift = fromRows([[0, 1, 0], [0, 0, 1], [1, 0, 0]]); // prettier-ignore
    const g = lindbladGenerator({
      algebra,
      jumps: [
        { label: 'S', matrix: shift },
        { label: 'T', matrix: adjoint(shift) },
      ],
    });
    const form = canonicalForm(g, referenceState(g));
    expect(form.jumps.map((jump) => jump.label)).toEqual(['S[0,1]', 'S[1,2]', 'S[2,0]', 'T[0,2]', 'T[1,0]', 'T[2,1]']);
    expectLaws(form, g, 'shift');
  });

  it('extracts jumps where the given ones overlap', () => {
    const g = lindbladGenerator({
      algebra: qubit,
      jumps: [{ matrix: fromRows([[0, 1], [1, 0]]) }, { matrix: fromRows([[1, 1], [1, -1]]) }], // prettier-ignore
    });
    const form = canonicalForm(g, referenceState(g));
    expect(form.jumps.map((jump) => jump.label)).toEqual(['V1', 'V2']);
    expectLaws(form, g, 'overlapping jumps');
  });

  it('extracts the matrices of Gell-Mann for the depolarising generator', () => {
    const g = expectationGenerator({ algebra: blockAlgebra([3]), onto: { scalars: true } });
    const form = canonicalForm(g, referenceState(g));
    expect(form.jumps.length).toBe(8);
    expect(form.jumps.filter((jump) => jump.sparse.re.length === 2).length).toBe(7);
    expectLaws(form, g, 'depolarising');
  });
});

describe('what has no canonical form', () => {
  it('a chain that is not reversible', () => {
    const g = ratesGenerator([[0, 1, 0], [0, 0, 1], [1, 0, 0]]); // prettier-ignore
    expectError(() => canonicalForm(g, referenceState(g)), 'not-symmetric', /rebuild only to/);
  });

  it('a generator with a Hamiltonian', () => {
    const g = lindbladGenerator({
      algebra: blockAlgebra([2]),
      hamiltonian: diagonal([1, -1]),
      jumps: [{ matrix: fromRows([[0, 1], [1, 0]]) }], // prettier-ignore
    });
    expectError(() => canonicalForm(g, referenceState(g)), 'not-symmetric', /rebuild only to/);
  });

  it('a generator with a negative Kossakowski eigenvalue', () => {
    const good = expectationGenerator({ algebra: blockAlgebra([2]), onto: { diagonal: true } });
    const bad: Generator = { ...good, superoperator: (good.superoperator as Float64Array).map((x) => -x) };
    expectError(() => canonicalForm(bad, referenceState(bad)), 'not-completely-positive', /-1\.00000/);
  });
});
