import { describe, expect, it } from 'vitest';
import { printRational } from '../../src/checker/arithmetic/rational-text.js';
import { RATIONAL_ZERO, rational } from '../../src/checker/arithmetic/rational.js';
import { guessRational } from '../../src/certificate/rational-guess.js';
import { RationalSystem } from '../../src/certificate/rational-system.js';
import { makeCertificate } from '../../src/certificate/make-certificate.js';
import { pauliJumps, thermalQubit } from '../../src/families/index.js';
import { lindbladGenerator } from '../../src/generator/lindblad-generator.js';
import { blockAlgebra } from '../../src/algebra/block-algebra.js';
import { fromRows } from '../../src/linalg/complex-matrix.js';
import { analyse } from '../../src/structure/structure.js';
import { expectError } from '../helpers/expect-error.js';

const r = (p: number, q = 1) => rational(BigInt(p), BigInt(q));

describe('a system over the rationals', () => {
  it('determines some unknowns by the free ones', () => {
    const system = new RationalSystem();
    // x + y + z = 1, x − y = 1/3
    expect(system.add({ coefficients: new Map([[0, r(1)], [1, r(1)], [2, r(1)]]), right: r(1) })).toBe(true); // prettier-ignore
    expect(system.add({ coefficients: new Map([[0, r(1)], [1, r(-1)]]), right: r(1, 3) })).toBe(true); // prettier-ignore
    const [x, y, z] = system.solve([r(5), r(5), r(1, 2)]);
    expect([x, y, z].map(printRational)).toEqual(['5/12', '1/12', '1/2']);
  });

  it('takes a consequence and refuses a contradiction', () => {
    const system = new RationalSystem();
    expect(system.add({ coefficients: new Map([[0, r(2)], [1, r(4)]]), right: r(6) })).toBe(true); // prettier-ignore
    expect(system.add({ coefficients: new Map([[0, r(1)], [1, r(2)]]), right: r(3) })).toBe(true); // prettier-ignore
    expect(system.add({ coefficients: new Map([[0, r(1)], [1, r(2)]]), right: r(4) })).toBe(false); // prettier-ignore
    expect(system.add({ coefficients: new Map(), right: RATIONAL_ZERO })).toBe(true);
  });
});

it('guesses the fraction a double stands for, and none where there is none', () => {
  expect(printRational(guessRational(5 / 6, 100, 1e-12) ?? r(0))).toBe('5/6');
  expect(guessRational(Math.SQRT1_2, 5000, 1e-12)).toBeNull();
  expect(guessRational(Number.NaN, 10, 1)).toBeNull();
});

describe('makeCertificate', () => {
  it.each([
    [0.3, 0.5, 0.7],
    [1, 2, 4],
  ])('Pauli rates %f, %f, %f: within 1e-6 of cbe and exact', (x, y, z) => {
    const g = pauliJumps([
      { string: 'X', rate: x },
      { string: 'Y', rate: y },
      { string: 'Z', rate: z },
    ]);
    const { made, ceiling } = makeCertificate(analyse(g), 'cge');
    expect(made?.verdict.grade).toBe('exact');
    expect(Math.abs(ceiling - (made?.verdict.bound ?? 0))).toBeLessThan(1e-6);
  });

  it('says that there is none where cbe is −∞', () => {
    const jumps = [
      { matrix: fromRows([[1, 2, 0], [2, 0, 1], [0, 1, -1]]) }, // prettier-ignore
      { matrix: fromRows([[0, 1, 1], [1, 2, 0], [1, 0, -2]]) }, // prettier-ignore
    ];
    const g = lindbladGenerator({ algebra: blockAlgebra([3]), jumps });
    expect(makeCertificate(analyse(g), 'cge')).toMatchObject({ made: null, ceiling: -Infinity });
  });

  it('refuses a generator without GNS symmetry', () => {
    const jumps = [{ matrix: fromRows([[0, 1], [0, 0]]) }]; // prettier-ignore
    const g = lindbladGenerator({ algebra: blockAlgebra([2]), jumps });
    expectError(
      () => makeCertificate(analyse(g), 'cge'),
      'not-symmetric',
      /GNS-symmetric generator for a certificate of cge/,
    );
  });

  it('stops when the time is over', () => {
    const result = makeCertificate(analyse(thermalQubit({ beta: 1 })), 'cge', { stop: () => true });
    expect(result).toMatchObject({ made: null, reason: 'stopped' });
  });

  it('gives ge, clsi and mlsi the same lift', () => {
    const structure = analyse(thermalQubit({ beta: 1 }));
    for (const constant of ['ge', 'clsi', 'mlsi'] as const) {
      const { made } = makeCertificate(structure, constant);
      expect(made?.certificate.constant).toBe(constant);
      expect(made?.verdict.bound).toBeGreaterThan(2 * Math.cosh(0.5) - 1e-6);
    }
  });
});
