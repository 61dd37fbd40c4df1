import { describe, expect, it } from 'vitest';
import { blockAlgebra } from '../../src/algebra/block-algebra.js';
import { exponentialState, matrixOf, stateOfLogs } from '../../src/entropy/log-state.js';
import { entropyTerm, meanOfLogs, productionTerm } from '../../src/entropy/log-terms.js';
import { relativeEntropy, relativeEntropyOfStates, vonNeumannEntropy } from '../../src/entropy/relative-entropy.js';
import { diagonal, fromRows, identity, innerProduct, scale, subtract } from '../../src/linalg/complex-matrix.js';
import { hermitianLog } from '../../src/linalg/matrix-function.js';
import { seededRandom } from '../../src/random.js';
import { randomState } from './random-states.js';

const random = seededRandom('relative entropy');

describe('relativeEntropy', () => {
  it('agrees with Tr ρ(log ρ − log σ) on random states', () => {
    for (const n of [1, 2, 3, 5]) {
      const algebra = blockAlgebra([n]);
      const rho = randomState(algebra, random);
      const sigma = randomState(algebra, random);
      const expected = innerProduct(rho, subtract(hermitianLog(rho), hermitianLog(sigma))).re;
      expect(Math.abs(relativeEntropy(rho, sigma) - expected)).toBeLessThan(1e-13 * (1 + expected));
    }
  });

  it('keeps its digits as two commuting states meet', () => {
    // ½((1+u)log(1+u) + (1−u)log(1−u)) = u²/2 + u⁴/12 + u⁶/30 + u⁸/56 + …, u = 2e.
    for (const e of [1e-2, 1e-4, 1e-6]) {
      const found = relativeEntropy(diagonal([0.5 + e, 0.5 - e]), diagonal([0.5, 0.5]));
      const u = 4 * e ** 2;
      const exact = (u / 2) * (1 + u / 6 + u ** 2 / 15 + u ** 3 / 28);
      expect(Math.abs(found / exact - 1)).toBeLessThan(1e-15 / e);
    }
  });

  it('keeps its digits as two states with different eigenvectors meet', () => {
    // A rotation by t of diag(p, 1−p): D = sin²t (2p−1) log(p/(1−p)).
    for (const t of [1e-2, 1e-4, 1e-6]) {
      const p = 0.8;
      const [c, s] = [Math.cos(t), Math.sin(t)];
      const off = (2 * p - 1) * c * s;
      const rotated = fromRows([
        [p * c * c + (1 - p) * s * s, off],
        [off, p * s * s + (1 - p) * c * c],
      ]);
      const exact = s * s * (2 * p - 1) * Math.log(p / (1 - p));
      expect(Math.abs(relativeEntropy(rotated, diagonal([p, 1 - p])) / exact - 1)).toBeLessThan(2e-15 / t);
    }
  });

  it('is zero on equal states and infinite where supports fail', () => {
    const pure = fromRows([
      [0.5, 0.5],
      [0.5, 0.5],
    ]);
    expect(relativeEntropy(pure, pure)).toBeLessThan(1e-15);
    expect(relativeEntropy(scale(identity(2), 0.5), pure)).toBe(Infinity);
    expect(relativeEntropy(diagonal([1, 0]), diagonal([0, 1]))).toBe(Infinity);
    expect(Math.abs(relativeEntropy(pure, scale(identity(2), 0.5)) - Math.LN2)).toBeLessThan(1e-14);
  });

  it('refuses what is no state', () => {
    expect(() => relativeEntropy(identity(2), scale(identity(2), 0.5))).toThrowError(/trace one, got trace 2/);
    expect(() => relativeEntropy(diagonal([1.5, -0.5]), scale(identity(2), 0.5))).toThrowError(
      /smallest eigenvalue -0.5/,
    );
    expect(() => relativeEntropy(scale(identity(2), 0.5), scale(identity(3), 1 / 3))).toThrowError(
      /2×2 state, got 3×3/,
    );
    const skew = fromRows([
      [0.5, 0.1],
      [0, 0.5],
    ]);
    expect(() => relativeEntropy(skew, scale(identity(2), 0.5))).toThrowError(/Hermitian/);
  });

  it('resolves eigenvalues far below rounding in log form', () => {
    const algebra = blockAlgebra([2]);
    const logs = Float64Array.from([0, -200]);
    const rho = stateOfLogs(algebra, logs, identity(2));
    const mixed = stateOfLogs(algebra, new Float64Array(2), identity(2));
    expect(Math.abs(relativeEntropyOfStates(rho, mixed) - Math.LN2)).toBeLessThan(1e-15);
    expect(Math.abs(relativeEntropyOfStates(mixed, rho) / (100 - Math.LN2) - 1)).toBeLessThan(1e-15);
  });
});

describe('vonNeumannEntropy', () => {
  it('is log n for the maximally mixed state, 0 for a pure one, and log n − D to the mixed one', () => {
    expect(Math.abs(vonNeumannEntropy(scale(identity(4), 0.25)) - Math.log(4))).toBeLessThan(1e-15);
    expect(vonNeumannEntropy(diagonal([1, 0, 0]))).toBe(0);
    const rho = randomState(blockAlgebra([4]), random);
    const expected = Math.log(4) - relativeEntropy(rho, scale(identity(4), 0.25));
    expect(Math.abs(vonNeumannEntropy(rho) - expected)).toBeLessThan(1e-13);
  });
});

describe('terms in log-eigenvalues', () => {
  it('agree with their plain formulas away from the diagonal, on both sides of the series', () => {
    for (const [p, q] of [
      [-1, -3],
      [-0.2, -0.9],
      [-2, -1.21],
      [-2, -1.19],
    ]) {
      const [x, y] = [Math.exp(p), Math.exp(q)];
      expect(Math.abs(meanOfLogs(p, q) / ((x - y) / (p - q)) - 1)).toBeLessThan(4e-15);
      expect(Math.abs(productionTerm(p, q) / ((x - y) * (p - q)) - 1)).toBeLessThan(4e-15);
      expect(Math.abs(entropyTerm(p, q) / (x * (p - q) - x + y) - 1)).toBeLessThan(2e-14);
    }
  });

  it('have their limits where the arguments meet and at the boundary', () => {
    expect(meanOfLogs(-1, -1)).toBe(Math.exp(-1));
    expect(productionTerm(-1, -1)).toBe(0);
    expect(entropyTerm(-1, -1)).toBe(0);
    expect(Math.abs(entropyTerm(-1, -1 - 1e-9) / (0.5 * Math.exp(-1) * 1e-18) - 1)).toBeLessThan(1e-6);
    expect(meanOfLogs(-2000, -2000)).toBe(0);
    expect(entropyTerm(-2000, -1)).toBe(Math.exp(-1));
    expect(meanOfLogs(0, -1000)).toBe(1 / 1000);
  });
});

describe('exponentialState', () => {
  it('is a density matrix that does not change when a multiple of one is added to H', () => {
    const algebra = blockAlgebra([2, 1]);
    const h = diagonal([3, -40, 1]);
    const shifted = diagonal([1003, 960, 1001]);
    const a = exponentialState(algebra, h);
    expect(Math.abs(matrixOf(a).re.reduce((sum, x) => sum + x, 0) - 1)).toBeLessThan(1e-15);
    expect(Array.from(exponentialState(algebra, shifted).logs)).toEqual(Array.from(a.logs));
  });
});
