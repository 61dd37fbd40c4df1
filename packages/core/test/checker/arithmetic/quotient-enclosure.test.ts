import { describe, expect, test } from 'vitest';
import { type CanonicalModel, encloseQuotient } from '../../../src/checker/arithmetic/quotient-enclosure.js';
import { directSum, fromEntries, hermitianPart, identity, scale, zeros } from '../../../src/linalg/complex-matrix.js';
import { MEAN_NAMES, operatorMean } from '../../../src/metric/operator-mean.js';
import { quotientAt, quotientError } from '../../../src/metric/quotient.js';
import { seededRandom } from '../../../src/random.js';
import { big, times } from './big-float.js';
import { expectEnclosed } from './enclosure-checks.js';
import {
  SX,
  SY,
  SZ,
  expectReference,
  graded,
  plainModel,
  randomMatrix,
  randomModel,
  randomUnitary,
} from './witness-models.js';

describe('enclosure of the quotient at a witness', () => {
  test('closed form: qubit depolarising at the maximally mixed state', () => {
    // L(A) = Tr(A)/2 − A from V = σ/(2√2) (squares 1/8): q/‖·‖² is the gap 1 at ρ = 1, any A.
    const c = Math.SQRT1_2 / 2;
    const jumps = [SX, SY, SZ].map((v) => ({ matrix: scale(v, c), frequency: 0 }));
    const { quotient } = encloseQuotient(
      { blocks: [2], jumps, mean: 'logarithmic' },
      { lambda: [0.5, 0.5], u: null },
      SZ,
    );
    const exact = times(big(8), times(big(c), big(c)));
    expectEnclosed(quotient, exact, 'gap');
    expect(quotient.hi - quotient.lo).toBeLessThan(2e-15);
  });

  test.each([...MEAN_NAMES])('%s mean: holds the value in 700 bits, frames and frequencies included', (mean) => {
    const random = seededRandom(`witness ${mean}`);
    for (const blocks of [[2], [1, 1, 1], [2, 1], [3]]) {
      const n = blocks.reduce((x, y) => x + y, 0);
      const model = randomModel(random, blocks, 2, mean);
      const u = directSum(blocks.map((size) => randomUnitary(random, size)));
      const a = directSum(blocks.map((size) => hermitianPart(randomMatrix(random, size))));
      const width = expectReference(model, { lambda: graded(random, n, 0.1), u }, a);
      expect(width, `${mean} [${blocks}]`).toBeLessThan(2e-11);
    }
  });

  test('equal and nearly equal eigenvalues', () => {
    const random = seededRandom('meeting eigenvalues');
    const model = randomModel(random, [3], 1, 'logarithmic');
    const u = randomUnitary(random, 3);
    const a = hermitianPart(randomMatrix(random, 3));
    for (const lambda of [
      [0.25, 0.25, 0.5],
      [1, 1, 1],
      [0.3, 0.3 + 2 ** -54, 0.3 - 2 ** -54],
      [0.2, 0.2 * (1 + 1e-9), 0.6],
    ]) {
      for (const frame of [
        { lambda, u },
        { lambda, u: null },
      ]) {
        expect(expectReference(model, frame, a)).toBeLessThan(1e-11);
      }
    }
  });

  test('agrees with the plain evaluation to its error bound', () => {
    const random = seededRandom('plain');
    for (const blocks of [[2], [4], [2, 2], [1, 1, 1, 1, 1], [5]]) {
      const n = blocks.reduce((x, y) => x + y, 0);
      for (const mean of MEAN_NAMES) {
        const model = randomModel(random, blocks, 3, mean);
        const u = directSum(blocks.map((size) => randomUnitary(random, size)));
        const a = directSum(blocks.map((size) => hermitianPart(randomMatrix(random, size))));
        const frame = { lambda: Float64Array.from(graded(random, n, 1e-3)), u };
        const plain = plainModel(model);
        const q = quotientAt(plain, operatorMean(mean), frame, a);
        const error = quotientError(plain, q);
        const { quotient } = encloseQuotient(model, frame, a);
        expect(q.curvature / q.metric, `${mean} [${blocks}] plain below`).toBeGreaterThan(quotient.lo - error);
        expect(q.curvature / q.metric, `${mean} [${blocks}] plain above`).toBeLessThan(quotient.hi + error);
        expect(quotient.hi - quotient.lo, `${mean} [${blocks}] width`).toBeLessThan(2 * error);
      }
    }
  });

  test('the rotation bound covers a frame that is off by more than rounding', () => {
    const random = seededRandom('skew');
    const model = randomModel(random, [2], 1, 'logarithmic');
    const a = hermitianPart(randomMatrix(random, 2));
    for (const off of [1e-12, 1e-6, 1e-3]) {
      const base = randomUnitary(random, 2);
      const u = fromEntries(2, 2, (i, j) => [base.re[2 * i + j] + off * random.normal(), base.im[2 * i + j]]);
      const frame = { lambda: [0.7, 0.3], u };
      expectReference(model, frame, a);
      const { rotation, quotient } = encloseQuotient(model, frame, a);
      expect(rotation).toBeGreaterThan(off / 100);
      expect(rotation).toBeLessThan(20 * off);
      expect(quotient.hi).toBeLessThan(Infinity);
    }
  });

  test('scaling the state or the observable changes nothing beyond rounding', () => {
    const random = seededRandom('homogeneous');
    const model = randomModel(random, [3], 2, 'logarithmic');
    const a = hermitianPart(randomMatrix(random, 3));
    const base = encloseQuotient(model, { lambda: [0.5, 0.3, 0.2], u: null }, a).quotient;
    for (const c of [2 ** -200, 2 ** 60, 3]) {
      const other = encloseQuotient(
        model,
        { lambda: [0.5 * c, 0.3 * c, 0.2 * c], u: null },
        scale(a, 2 ** 30),
      ).quotient;
      expect(Math.abs(other.lo - base.lo) + Math.abs(other.hi - base.hi)).toBeLessThan(1e-11);
    }
    const moved = fromEntries(3, 3, (i, j) => [a.re[3 * i + j] + (i === j ? 1024 : 0), a.im[3 * i + j]]);
    const shifted = encloseQuotient(model, { lambda: [0.5, 0.3, 0.2], u: null }, moved).quotient;
    expect(shifted.hi).toBeGreaterThan(base.lo);
    expect(shifted.lo).toBeLessThan(base.hi);
  });

  test('an observable that commutes with every jump proves nothing', () => {
    const model = randomModel(seededRandom('fixed'), [2], 1, 'logarithmic');
    const { quotient, metric } = encloseQuotient(model, { lambda: [0.5, 0.5], u: null }, identity(2));
    expect(metric).toEqual({ lo: 0, hi: 0 });
    expect(quotient).toEqual({ lo: -Infinity, hi: Infinity });
  });

  test('bad input is refused', () => {
    const model: CanonicalModel = {
      blocks: [2, 1],
      jumps: [{ matrix: identity(3), frequency: 0 }],
      mean: 'logarithmic',
    };
    const good = { lambda: [1, 1, 1], u: null };
    const full = fromEntries(3, 3, () => [1, 0]);
    expect(() => encloseQuotient(model, good, full)).toThrow('outside the blocks');
    expect(() => encloseQuotient(model, { ...good, u: full }, identity(3))).toThrow('outside the blocks');
    expect(() => encloseQuotient(model, { ...good, u: scale(identity(3), 2) }, identity(3))).toThrow('nearly unitary');
    expect(() => encloseQuotient(model, { lambda: [1, 0, 1], u: null }, identity(3))).toThrow('eigenvalues > 0');
    expect(() => encloseQuotient(model, { lambda: [1, 1], u: null }, identity(3))).toThrow('expected side 3');
    expect(() => encloseQuotient(model, good, identity(2))).toThrow('to be 3 × 3');
    const other = { ...model, jumps: [{ matrix: zeros(2), frequency: 0 }] };
    expect(() => encloseQuotient(other, good, identity(3))).toThrow('expected side 3');
    const infinite = { ...model, jumps: [{ matrix: identity(3), frequency: NaN }] };
    expect(() => encloseQuotient(infinite, good, identity(3))).toThrow('finite');
  });
});
