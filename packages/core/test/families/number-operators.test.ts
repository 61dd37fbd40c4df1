import { describe, expect, it } from 'vitest';
import { applyGenerator, generatorMatrix } from '../../src/generator/apply-generator.js';
import { fermionicNumber, hypercube, mixedSpinSystem } from '../../src/families/index.js';
import { anticommutator, frobeniusNorm, multiply, scale, subtract } from '../../src/linalg/complex-matrix.js';
import { denseFromSparse } from '../../src/linalg/sparse-matrix.js';
import { analyse } from '../../src/structure/structure.js';
import { expectError } from '../helpers/expect-error.js';
import { binomialSpectrum, expectSpectrum } from '../helpers/expect-spectrum.js';
import { expectAllClose, expectBelow } from '../linalg/support/expect-close.js';

describe('number operators', () => {
  it('fermionic: k with multiplicity binomial(2m,k)', () => {
    for (const modes of [1, 2]) expectSpectrum(fermionicNumber(modes), binomialSpectrum(2 * modes));
    expect(fermionicNumber(3).algebra.blocks).toEqual([8]);
    expect(analyse(fermionicNumber(2)).canonical?.jumps.length).toBe(4);
  });

  it('fermionic: L x_j = −x_j on four anticommuting unitaries', () => {
    const g = fermionicNumber(2);
    const flips = g.jumps.map((jump) => scale(denseFromSparse(jump.matrix), Math.SQRT2));
    const parity = flips.reduce((a, b) => multiply(a, b));
    const x = flips.map((u) => multiply(parity, u));
    x.forEach((a, i) => {
      expectBelow(frobeniusNorm(subtract(applyGenerator(g, a), scale(a, -1))), 1e-14, `L x_${i} + x_${i}`);
      x.slice(i + 1).forEach((b, k) => {
        expectBelow(frobeniusNorm(anticommutator(a, b)), 1e-14, `{x_${i}, x_${i + 1 + k}}`);
      });
    });
  });

  const mixed = [[-1, 1, -1], [1, -1, 1], [-1, 1, -1]]; // prettier-ignore
  const systems: [string, number[][], number[]][] = [
    ['one generator', [[-1]], [1, 1]],
    ['three commuting generators', [[-1, 1, 1], [1, -1, 1], [1, 1, -1]], [1, 1, 1, 1, 1, 1, 1, 1]], // prettier-ignore
    ['three anticommuting generators', [[-1, -1, -1], [-1, -1, -1], [-1, -1, -1]], [2, 2]], // prettier-ignore
    ['a mixed system of three', mixed, [2, 2]],
    ['a chain of four', [[-1, -1, 1, 1], [-1, -1, -1, 1], [1, -1, -1, -1], [1, 1, -1, -1]], [4]], // prettier-ignore
  ];
  for (const [name, signs, blocks] of systems) {
    it(`mixed commutation, ${name}`, () => {
      const g = mixedSpinSystem(signs);
      expect(g.algebra.blocks).toEqual(blocks);
      expectSpectrum(g, binomialSpectrum(signs.length));
      const { symmetry, canonical, fixedPoints } = analyse(g);
      expect({ kind: symmetry.kind, primitive: fixedPoints?.primitive }).toEqual({ kind: 'tracial', primitive: true });
      expectBelow(canonical?.residual ?? NaN, 1e-13, 'canonical residual');
    });
  }

  it('of commuting generators is the walk on the cube at rate ½', () => {
    const signs = Array.from({ length: 3 }, () => [1, 1, 1]);
    const index = [0, 1, 2, 3, 4, 5, 6, 7];
    const g = generatorMatrix(mixedSpinSystem(signs));
    const cube = generatorMatrix(hypercube(3, 0.5));
    expectAllClose(
      index.map((k) => g[k * 8]),
      index.map((k) => cube[k * 8]),
      1e-15,
    );
    expectAllClose(g, cube, 1e-15);
  });

  it('names what is wrong', () => {
    expectError(() => mixedSpinSystem([]), 'usage', /from 1 to 20 rows of signs, got 0/);
    expectError(() => mixedSpinSystem([[1, 1], [-1, 1]]), 'usage', /symmetric signs ±1, got 1 at \(0, 1\) and -1/); // prettier-ignore
    expectError(() => mixedSpinSystem([[1, 2], [2, 1]]), 'usage', /symmetric signs/); // prettier-ignore
    expectError(() => mixedSpinSystem([[1], [1, 1]]), 'usage', /2 signs in row 0, got 1/); // prettier-ignore
    const many = Array.from({ length: 11 }, () => new Array<number>(11).fill(1));
    expectError(() => mixedSpinSystem(many), 'too-large', /got 2\^11/);
  });
});
