import { describe, expect, it } from 'vitest';
import { blockAlgebra } from '../../src/algebra/block-algebra.js';
import { checkCertificate } from '../../src/checker/check-certificate.js';
import { carreDuChamp } from '../../src/constants/carre-du-champ.js';
import { completeBakryEmery } from '../../src/constants/bakry-emery.js';
import { makeCertificate } from '../../src/certificate/make-certificate.js';
import { fermionicNumber, pauliJumps, thermalQubit } from '../../src/families/index.js';
import type { Generator } from '../../src/generator/generator.js';
import { ratesGenerator } from '../../src/generator/rates-generator.js';
import { multiply, multiplyAdjointSecond } from '../../src/linalg/complex-matrix.js';
import { denseFromSparse, sparseFromDense } from '../../src/linalg/sparse-matrix.js';
import { seededRandom } from '../../src/random.js';
import { analyse } from '../../src/structure/structure.js';
import { madeCertificate } from '../helpers/made-certificate.js';
import { randomBalancedGenerator } from '../helpers/random-balanced-generator.js';
import { randomUnitary } from '../linalg/support/inputs.js';

/** U L(U*·U) U*: the same semigroup in another basis. */
function rotated(g: Generator, seed: string): Generator {
  const u = randomUnitary(seededRandom(seed), g.algebra.size);
  expect(g).toMatchObject({ superoperator: null, hamiltonian: null });
  const jumps = g.jumps.map(({ matrix, ...rest }) => ({
    ...rest,
    matrix: sparseFromDense(multiplyAdjointSecond(multiply(u, denseFromSparse(matrix)), u)),
  }));
  return { ...g, jumps, declaredState: null, origin: { kind: 'lindblad' } };
}

describe('a unitary rotation', () => {
  it.each<[string, Generator]>([
    ['thermal qubit', thermalQubit({ beta: 0.7 })],
    ['pair of fermionic modes', fermionicNumber(2)],
    ['three Pauli rates', pauliJumps([{ string: 'X', rate: 0.3 }, { string: 'Y', rate: 0.5 }, { string: 'Z', rate: 0.7 }])], // prettier-ignore
  ])('leaves the bound of a %s within 1e-6', (name, g) => {
    const plain = madeCertificate(g);
    const turned = rotated(g, name);
    const made = madeCertificate(turned);
    expect(Math.abs(made.verdict.bound - plain.verdict.bound)).toBeLessThan(1e-6);
    expect(checkCertificate(turned, plain.certificate).holds).toBe(false);
    expect(checkCertificate(g, made.certificate).holds).toBe(false);
  });
});

/** Small random models: chains, and balanced generators, most of which have no lift. */
const RANDOM = Array.from({ length: 30 }, (_, seed): [number, Generator] => {
  const random = seededRandom(`certified ${seed}`);
  if (seed % 2 === 0)
    return [seed, randomBalancedGenerator(blockAlgebra([[2], [2, 1], [1, 1, 1]][seed % 3]), random).generator];
  const n = 2 + (seed % 3);
  const weights = Array.from({ length: n }, () => 0.3 + random.uniform());
  const rates = weights.map((w, x) => weights.map((_v, y) => (x === y ? 0 : 0.5 + random.uniform()) / w));
  for (let x = 0; x < n; x++) for (let y = 0; y < x; y++) rates[x][y] = (rates[y][x] * weights[y]) / weights[x];
  return [seed, ratesGenerator(rates)];
});

describe('a proved bound never exceeds cbe', () => {
  it.each(RANDOM)('random model %i', (_seed, g) => {
    const { made } = makeCertificate(analyse(g), 'cge');
    const ceiling = completeBakryEmery(carreDuChamp(g)).value;
    if (made) expect(made.verdict.bound).toBeLessThanOrEqual(ceiling + 1e-9 * Math.max(1, Math.abs(ceiling)));
    else expect(ceiling === -Infinity || g.algebra.size > 2).toBe(true);
  });

  it('most of the chains among them have one', () => {
    const chains = RANDOM.filter(([seed]) => seed % 2 === 1);
    const certified = chains.filter(([, g]) => makeCertificate(analyse(g), 'cge').made !== null);
    expect(certified.length).toBeGreaterThan(chains.length / 2);
  });
});
