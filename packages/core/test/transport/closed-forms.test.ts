import { describe, expect, it } from 'vitest';
import { depolarising, thermalQubit } from '../../src/families/index.js';
import { ratesGenerator } from '../../src/generator/rates-generator.js';
import { analyse } from '../../src/structure/structure.js';
import { expectClose } from '../linalg/support/expect-close.js';
import { artanhIntegral, distance, distribution } from './support/states.js';

/** The state ½(1 + r e₁ − r e₂) of two points, or with r along the axis of a qubit. */
const tilted = (r: number) => distribution((1 + r) / 2, (1 - r) / 2);

function expectEnclosed(actual: ReturnType<typeof distance>, expected: number, width: number): void {
  const { lower, upper } = actual;
  const report = `[${lower.value}, ${upper.value}] around ${expected}`;
  expect(lower.value <= expected && expected <= upper.value, report).toBe(true);
  expect(upper.value - lower.value <= width * upper.value, `${report} within ${width}`).toBe(true);
  expect([lower.grade, upper.grade]).toEqual(['certified', 'certified']);
}

describe('the transport distance of two points', () => {
  // Maas, J. Funct. Anal. 261 (2011). With rate p each way |v|² = p/2, ‖f‖²_ρ = pΛ(ρ₁,ρ₂)(f₂ − f₁)² and, for ρ = (1 ± r)/2,
  // Λ = r/(2 artanh r): the action is ṙ² artanh r/(2pr), so W = (2p)^{−1/2} ∫ √(artanh r/r) dr.
  it.each([
    [1, -0.8, 0.6],
    [0.5, 0.1, 0.95],
    [3, -0.999, 0.2],
  ])('at equal rates %d follows the closed form from %d to %d to 1e-6', (p, from, to) => {
    const chain = analyse(
      ratesGenerator([
        [0, p],
        [p, 0],
      ]),
    );
    const expected = artanhIntegral(from, to) / Math.sqrt(2 * p);
    expectEnclosed(distance(chain, tilted(from), tilted(to), 1e-6), expected, 1e-6);
  });

  it('reaches both boundary points', () => {
    const chain = analyse(
      ratesGenerator([
        [0, 1],
        [1, 0],
      ]),
    );
    const expected = artanhIntegral(-1, 1) / Math.sqrt(2);
    expectEnclosed(distance(chain, tilted(-1), tilted(1), 1e-4), expected, 1e-4);
    expectEnclosed(distance(chain, tilted(-1), tilted(0), 1e-4), expected / 2, 1e-4);
  });

  it('at unequal rates is the integral of the one path there is', () => {
    // Rates a: 1→2 and b: 2→1, σ ∝ (b, a): the flux weight is Λ(aρ₁, bρ₂).
    const [a, b] = [0.7, 2.1];
    const chain = analyse(
      ratesGenerator([
        [0, a],
        [b, 0],
      ]),
    );
    const cells = 20000;
    let expected = 0;
    const [from, to] = [0.1, 0.85];
    for (let k = 0; k < cells; k++) {
      const x = from + ((k + 0.5) * (to - from)) / cells;
      const [u, v] = [a * x, b * (1 - x)];
      const mean = Math.abs(u - v) < 1e-9 ? u : (u - v) / Math.log(u / v);
      expected += (to - from) / cells / Math.sqrt(mean);
    }
    expectEnclosed(distance(chain, distribution(from, 1 - from), distribution(to, 1 - to), 1e-6), expected, 1e-6);
  });
});

describe('the transport distance of a qubit', () => {
  it('is the radial integral along a diameter of the depolarising semigroup', () => {
    // Averaging a path over rotations around the axis lengthens nothing, by convexity, so the straight one is shortest. With
    // V = σ_j/√8 its action is ṙ² artanh r/r.
    const qubit = analyse(depolarising(2));
    expectEnclosed(distance(qubit, tilted(-0.7), tilted(0.9), 1e-5), artanhIntegral(-0.7, 0.9), 1e-5);
    expectEnclosed(distance(qubit, tilted(-1), tilted(1), 1e-4), artanhIntegral(-1, 1), 1e-4);
  });

  it('on the axis of a thermal qubit is that of the chain of its two levels', () => {
    const beta = 1.3;
    const qubit = analyse(thermalQubit({ beta }));
    const rates = [2 * Math.exp(-beta / 2), 2 * Math.exp(beta / 2)];
    const chain = analyse(
      ratesGenerator([
        [0, rates[0]],
        [rates[1], 0],
      ]),
    );
    const ends = [distribution(0.9, 0.1), distribution(0.25, 0.75)] as const;
    const [whole, part] = [distance(qubit, ...ends, 1e-6), distance(chain, ...ends, 1e-6)];
    expectClose(whole.upper.value, part.upper.value, 2e-6, 'upper ends');
    expectClose(whole.lower.value, part.lower.value, 2e-6, 'lower ends');
  });
});
