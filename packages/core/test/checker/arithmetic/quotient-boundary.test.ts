import { describe, expect, test } from 'vitest';
import { type CanonicalModel, encloseQuotient } from '../../../src/checker/arithmetic/quotient-enclosure.js';
import { fromRows, hermitianPart, identity, kronecker, scale } from '../../../src/linalg/complex-matrix.js';
import { seededRandom } from '../../../src/random.js';
import { big, minus, over, plus, times, toNumber } from './big-float.js';
import { bigQuotient } from './big-quotient.js';
import {
  LOWER,
  RAISE,
  SX,
  SY,
  SZ,
  expectReference,
  randomMatrix,
  randomModel,
  randomUnitary,
} from './witness-models.js';

describe('enclosure of the quotient near the boundary of state space', () => {
  test('near the boundary of state space: thermal qubit down to 1e-250, in its own frame', () => {
    const beta = 1.25;
    const jumps = [
      { matrix: LOWER, frequency: beta },
      { matrix: RAISE, frequency: -beta },
    ];
    const model: CanonicalModel = { blocks: [2], jumps, mean: 'logarithmic' };
    for (const s of [1e-3, 1e-10, 1e-26, 1e-100, 1e-250]) {
      for (const a of [SX, SZ]) {
        const width = expectReference(model, { lambda: [1, s], u: null }, a);
        const { quotient } = encloseQuotient(model, { lambda: [1, s], u: null }, a);
        expect(width / Math.abs(quotient.hi), `λ=${s}`).toBeLessThan(1e-13);
      }
    }
  });

  test('near the boundary in a rotated frame', () => {
    const random = seededRandom('boundary');
    const model = randomModel(random, [3], 2, 'logarithmic');
    const u = randomUnitary(random, 3);
    const a = hermitianPart(randomMatrix(random, 3));
    for (const s of [1e-2, 1e-4, 1e-8, 1e-16]) {
      const frame = { lambda: [1, 0.3, s], u };
      const width = expectReference(model, frame, a);
      const { quotient } = encloseQuotient(model, frame, a);
      expect(width / Math.abs(quotient.hi), `λ=${s}`).toBeLessThan(1e-12);
    }
  });

  test('amplified depolarising qubit at ρ⊗e₁₁ + ε1⊗e₂₂: finite however small ε', () => {
    // log(1/ε)Λ(x,ε) → x turns the estimate into the one-sided, complete one: the quotient stays of order one as ε → 0.
    const random = seededRandom('amplified');
    const w = randomUnitary(random, 2);
    const u = kronecker(identity(2), w);
    const c = Math.SQRT1_2 / 2;
    const jumps = [SX, SY, SZ].map((v) => ({ matrix: scale(kronecker(identity(2), v), c), frequency: 0 }));
    const corner = randomMatrix(random, 2);
    const a = hermitianPart(
      kronecker(
        fromRows([
          [0, 1],
          [0, 0],
        ]),
        corner,
      ),
    );
    for (const s of [1e-5, 1e-15, 1e-26, 1e-200]) {
      const frame = { lambda: [0.6, 0.4, s, s], u };
      const model: CanonicalModel = { blocks: [4], jumps, mean: 'logarithmic' };
      const { quotient } = encloseQuotient(model, frame, a);
      expect(quotient.hi, `ε=${s}`).toBeLessThan(2);
      expect(quotient.lo, `ε=${s}`).toBeGreaterThan(0.7);
      expect(expectReference(model, frame, a), `ε=${s}`).toBeLessThan(5e-14);
    }
  });
});

test('the 700-bit reference is itself consistent: d‖A‖²/dt along the flow', () => {
  // For A with LA = −gA: q = ½ d/dt‖A‖²_{ρ+tL†ρ} + g‖A‖², checked by a difference in t at a diagonal flow.
  const model: CanonicalModel = {
    blocks: [2],
    jumps: [
      { matrix: LOWER, frequency: 0.5 },
      { matrix: RAISE, frequency: -0.5 },
    ],
    mean: 'logarithmic',
  };
  const rate = Math.exp(0.25) + Math.exp(-0.25);
  const at = (x: number, y: number) => bigQuotient(model, { lambda: [x, y], u: null }, SX);
  const [x, y] = [0.75, 0.25];
  const flow = 2 * (Math.exp(-0.25) * y - Math.exp(0.25) * x);
  const h = 2 ** -20;
  const difference = over(minus(at(x + h, y - h).metric, at(x - h, y + h).metric), big(2 * h));
  const { metric, curvature } = at(x, y);
  const predicted = plus(times(big(0.5 * flow), difference), times(big(rate), metric));
  expect(Math.abs(toNumber(minus(curvature, predicted)))).toBeLessThan(1e-10);
});
