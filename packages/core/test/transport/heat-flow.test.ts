import { describe, expect, it } from 'vitest';
import { entropyProduction } from '../../src/entropy/entropy-production.js';
import { expectClose } from '../linalg/support/expect-close.js';
import { searchedCurvature } from './support/curvature.js';
import { type Density, cells, distanceToUniform, heatFlow, ornsteinUhlenbeck, wave } from './support/heat-flow.js';
import { distance, distribution } from './support/states.js';

const uniform = (n: number) => distribution(...Array.from({ length: n }, () => 1 / n));

/** Discrete distances to the uniform density, as midpoints of brackets of relative width 1e-5. */
function distances(density: Density, isCircle: boolean, sizes: readonly number[]): number[] {
  return sizes.map((n) => {
    const { lower, upper } = distance(heatFlow(n, isCircle), cells(density, n), uniform(n), 1e-5);
    return (lower.value + upper.value) / 2;
  });
}

/** The errors fall by about four when the number of points doubles, by a little less while it is small. */
function expectSecondOrder(errors: readonly number[], what: string): void {
  errors.slice(1).forEach((error, k) => {
    const ratio = errors[k] / error;
    expect(ratio > 3 && ratio < 5, `${what}: errors ${errors.join(', ')}, ratio ${ratio}`).toBe(true);
  });
}

describe('the heat flow on n points', () => {
  it.each([
    ['interval', false, wave(0.6, 0.5)],
    ['circle', true, wave(0.6, 1)],
  ])('has a distance that tends to the Wasserstein distance of the %s', (what, isCircle, density) => {
    // Gigli & Maas, SIAM J. Math. Anal. 45 (2013), for the torus. On the circle the wave and the uniform density are both even, so the
    // optimal map fixes 0 and is that of the interval.
    const limit = distanceToUniform(density);
    const found = distances(density, isCircle, [8, 16, 32]);
    expectSecondOrder(
      found.map((w) => Math.abs(w - limit)),
      what,
    );
    expectClose(found[2], limit, 1e-3 * limit, 'at 32 points');
  });

  it('has an entropy production that tends to the Fisher information', () => {
    // ∫ f'²/f = 4π²(1 − √(1 − a²)) for f = 1 + a cos 2πx.
    const a = 0.6;
    const limit = 4 * Math.PI ** 2 * (1 - Math.sqrt(1 - a * a));
    const errors = [8, 16, 32, 64].map((n) =>
      Math.abs(entropyProduction(heatFlow(n, true), cells(wave(a, 1), n)) - limit),
    );
    expectSecondOrder(errors, 'Fisher information');
  });
});

describe('the Ornstein–Uhlenbeck semigroup on n points', () => {
  it('has a curvature that tends to that of the continuum, 1', () => {
    // Mielke, Calc. Var. Partial Differ. Equ. 48 (2013): finite volumes in one dimension keep the convexity in the limit.
    const cases = [
      [5, 2],
      [9, 2.5],
      [17, 3],
    ] as const;
    const found = cases.map(([n, reach]) => {
      const { structure, step } = ornsteinUhlenbeck(n, reach);
      return { defect: 1 - searchedCurvature(structure).witness.value, step };
    });
    for (const { defect, step } of found) {
      expect(defect > 0 && defect < 0.11 * step * step, `1 − K = ${defect} at step ${step}`).toBe(true);
    }
    expect(found[2].defect).toBeLessThan(found[1].defect);
    expect(found[1].defect).toBeLessThan(found[0].defect);
  });
});
