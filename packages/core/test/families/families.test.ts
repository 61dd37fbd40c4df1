import { describe, expect, it } from 'vitest';
import { generatorMatrix } from '../../src/generator/apply-generator.js';
import {
  birthDeath,
  completeGraph,
  cycle,
  dephasing,
  depolarising,
  generalisedDepolarising,
  hypercube,
  localDepolarising,
  path,
  pauliJumps,
  pauliString,
  thermalQubit,
  truncatedOscillator,
  weylJumps,
  weylOperator,
} from '../../src/families/index.js';
import {
  diagonal,
  frobeniusNorm,
  fromRows,
  identity,
  kronecker,
  multiply,
  multiplyAdjointFirst,
  scale,
  subtract,
  trace,
} from '../../src/linalg/complex-matrix.js';
import { denseFromSparse } from '../../src/linalg/sparse-matrix.js';
import { seededRandom } from '../../src/random.js';
import { analyse } from '../../src/structure/structure.js';
import { expectError } from '../helpers/expect-error.js';
import { binomialSpectrum, expectSpectrum } from '../helpers/expect-spectrum.js';
import { wellConditioned } from '../linalg/support/inputs.js';
import { expectAllClose, expectBelow, expectClose } from '../linalg/support/expect-close.js';

const repeated = (value: number, times: number): number[] => new Array<number>(times).fill(value);

describe('depolarising and dephasing', () => {
  it('have their spectra', () => {
    for (const n of [1, 2, 3]) {
      expectSpectrum(depolarising(n, 1.5), [0, ...repeated(1.5, n * n - 1)]);
      expectSpectrum(dephasing(n, 0.5), [...repeated(0, n), ...repeated(0.5, n * n - n)]);
    }
  });

  it('towards a state: GNS-symmetric, one rate, that state invariant', () => {
    const rough = wellConditioned(seededRandom('depolarising'), 3);
    const sigma = scale(rough, 1 / trace(rough).re);
    const g = generalisedDepolarising(sigma, 2);
    expectSpectrum(g, [0, ...repeated(2, 8)]);
    const { symmetry, fixedPoints, canonical } = analyse(g);
    expect({ kind: symmetry.kind, primitive: fixedPoints?.primitive }).toEqual({ kind: 'GNS', primitive: true });
    expectBelow(canonical?.residual ?? NaN, 1e-11, 'canonical residual');
    expectError(() => generalisedDepolarising(diagonal([2, -1])), 'state-not-positive', /eigenvalue -1/);
    expectError(() => generalisedDepolarising(diagonal([1, 0]), -1), 'negative-rate', /got -1/);
  });

  it('of one qubit among several: eigenvalue k for weight k', () => {
    const expected: number[] = [];
    for (let k = 0; k <= 2; k++) expected.push(...repeated(k, [1, 6, 9][k]));
    expectSpectrum(localDepolarising(2), expected);
    expectAllClose(generatorMatrix(localDepolarising(1)), generatorMatrix(depolarising(2)), 1e-15);
    expect(localDepolarising(3).origin.kind).toBe('tensor');
  });
});

describe('thermal models', () => {
  it('qubit: populations relax at 4γcosh(β/2), coherences at half that', () => {
    const [beta, gamma] = [1.2, 0.3];
    const c = 2 * gamma * Math.cosh(beta / 2);
    expectSpectrum(thermalQubit({ beta, gamma }), [0, c, c, 2 * c]);
    const { canonical, state } = analyse(thermalQubit({ beta, gamma }));
    expect(canonical?.jumps.map((jump) => [jump.label, jump.partner])).toEqual([['σ−', 1], ['σ+', 0]]); // prettier-ignore
    expectClose(canonical?.jumps[0].frequency ?? NaN, -beta, 1e-14, 'frequency of lowering');
    expectClose(Math.log((state?.values[0] ?? NaN) / (state?.values[1] ?? NaN)), beta, 1e-14, 'log ratio of weights');
    expectError(() => thermalQubit({ beta: -1 }), 'usage', /beta to be a finite number of at least 0, got -1/);
  });

  it('oscillator: canonical as given at every cutoff, occupations from detailed balance', () => {
    for (const levels of [2, 5, 16]) {
      const { canonical, symmetry } = analyse(truncatedOscillator({ levels, beta: 2 }));
      expect(symmetry.kind).toBe('GNS');
      expect(canonical?.jumps.map((jump) => jump.label)).toEqual(['a', 'a*']);
      expectBelow(canonical?.residual ?? NaN, 1e-13, `residual with ${levels} levels`);
    }
    expectError(() => truncatedOscillator({ levels: 1, beta: 1 }), 'usage', /from 2 to 32, got 1/);
  });

  it('oscillator with two levels is the thermal qubit at half the jump rates', () => {
    const two = generatorMatrix(truncatedOscillator({ levels: 2, beta: 0.7 }));
    expectAllClose(two, generatorMatrix(thermalQubit({ beta: 0.7, gamma: 0.5 })), 1e-14);
  });
});

describe('Pauli and Weyl jumps', () => {
  it('Pauli strings are products of Pauli matrices', () => {
    const X = fromRows([[0, 1], [1, 0]]); // prettier-ignore
    const Y = fromRows([[0, 0], [0, 0]], [[0, -1], [1, 0]]); // prettier-ignore
    const Z = diagonal([1, -1]);
    const product = kronecker(kronecker(X, Y), kronecker(Z, identity(2)));
    expectBelow(frobeniusNorm(subtract(denseFromSparse(pauliString('XYZI')), product)), Number.MIN_VALUE, 'XYZI');
    for (const bad of ['', 'XQ', 'xy', 'XXXXXXXXXXX']) expectError(() => pauliString(bad), 'usage', /1 to 10 letters/);
  });

  it('one qubit with rates of X, Y, Z decays at sums of two', () => {
    const g = pauliJumps([{ string: 'X', rate: 3 }, { string: 'Y', rate: 2 }, { string: 'Z', rate: 0.5 }]); // prettier-ignore
    expectSpectrum(g, [0, 5, 3.5, 2.5]);
    expect(analyse(g).canonical?.jumps.map((jump) => jump.label)).toEqual(['X', 'Y', 'Z']);
    expectError(() => pauliJumps([]), 'usage', /at least one/);
    expectError(() => pauliJumps([{ string: 'X', rate: 1 }, { string: 'XX', rate: 1 }]), 'usage', /of 1 letters, got "XX"/); // prettier-ignore
    expectError(
      () => pauliJumps([{ string: 'X', rate: -1 }]),
      'usage',
      /rate of X to be a finite number of at least 0, got -1/,
    );
  });

  it('Weyl operators are unitary and commute up to a root of unity', () => {
    const n = 5;
    const x = denseFromSparse(weylOperator(n, 1, 0));
    const z = denseFromSparse(weylOperator(n, 0, 1));
    const w = denseFromSparse(weylOperator(n, 2, 3));
    const angle = (2 * Math.PI) / n;
    const twisted = scale(multiply(x, z), Math.cos(angle), Math.sin(angle));
    expectBelow(frobeniusNorm(subtract(multiply(z, x), twisted)), 1e-14, 'ZX − ωXZ');
    expectBelow(frobeniusNorm(subtract(multiplyAdjointFirst(w, w), identity(n))), 1e-14, 'W*W − 1');
    expectBelow(frobeniusNorm(subtract(w, multiply(multiply(x, x), multiply(z, multiply(z, z))))), 1e-14, 'X²Z³');
  });

  it('all Weyl jumps with rate 2/n² are the depolarising generator', () => {
    for (const n of [2, 3]) {
      const terms = Array.from({ length: n * n - 1 }, (_, k) => ({
        a: Math.floor((k + 1) / n),
        b: (k + 1) % n,
        rate: 2 / (n * n),
      }));
      expectAllClose(generatorMatrix(weylJumps(n, terms)), generatorMatrix(depolarising(n)), 1e-14);
    }
  });

  it('adds adjoints that are not listed, and keeps the jumps', () => {
    const g = weylJumps(3, [{ a: 1, b: 1, rate: 2 }]);
    expect(analyse(g).canonical?.jumps.map((jump) => [jump.label, jump.partner])).toEqual([['W(1,1)', 1], ['W(2,2)', 0]]); // prettier-ignore
    expectError(() => weylJumps(3, [{ a: 1, b: 0, rate: 1 }, { a: 1, b: 3, rate: 1 }]), 'usage', /once, got \(1, 3\) again/); // prettier-ignore
    expectError(() => weylJumps(3, [{ a: 1, b: 0, rate: 1 }, { a: 2, b: 0, rate: 2 }]), 'usage', /one rate for \(1, 0\) and its adjoint/); // prettier-ignore
  });
});

describe('walks', () => {
  it('have their spectra', () => {
    expectSpectrum(hypercube(3, 0.5), binomialSpectrum(3));
    expectSpectrum(completeGraph(5), [0, ...repeated(1, 4)]);
    const n = 6;
    const angles = Array.from({ length: n }, (_, k) => 2 * (1 - Math.cos((2 * Math.PI * k) / n)));
    expectSpectrum(cycle(n), angles);
    expectSpectrum(
      path(n, 2),
      Array.from({ length: n }, (_, k) => 4 * (1 - Math.cos((Math.PI * k) / n))),
    );
  });

  it('birth and death is reversible, and refuses lists that do not fit', () => {
    const g = birthDeath([1, 2], [3, 4]);
    const { symmetry, state } = analyse(g);
    expect(symmetry.kind).toBe('GNS');
    expectAllClose(state?.values ?? [], [6 / 9, 2 / 9, 1 / 9], 1e-15);
    expectError(() => birthDeath([1], [1, 2]), 'usage', /as many births as deaths, at least one, got 1 and 2/);
    expectError(() => birthDeath([-1], [1]), 'negative-rate', /from 0 to 1, got -1/);
    expectError(() => cycle(2), 'usage', /from 3 to 1024, got 2/);
    expectError(() => hypercube(10), 'usage', /from 1 to 9, got 10/);
  });
});
