import { describe, expect, it } from 'vitest';
import { expmReal } from '../../src/linalg/expm-real.js';
import { seededRandom } from '../../src/random.js';
import { limitDistribution } from '../../src/structure/limit-distribution.js';
import { expectAllClose, expectClose } from '../linalg/support/expect-close.js';

/** (1/n,…,1/n) e^{tQ} for a late time, by the matrix exponential. */
function late(rates: Float64Array, n: number, t: number): number[] {
  const q = rates.slice();
  for (let x = 0; x < n; x++) {
    q[x * n + x] = 0;
    q[x * n + x] = -q.subarray(x * n, (x + 1) * n).reduce((sum, r) => sum + r, 0);
  }
  const e = expmReal(q.map((v) => t * v), n); // prettier-ignore
  return Array.from({ length: n }, (_, y) => {
    let sum = 0;
    for (let x = 0; x < n; x++) sum += e[x * n + y] / n;
    return sum;
  });
}

describe('limitDistribution', () => {
  it('is the limit of the flow for random chains, irreducible or not', () => {
    for (let seed = 0; seed < 30; seed++) {
      const random = seededRandom(`chain ${seed}`);
      const n = 1 + random.integer(7);
      const density = seed % 2 === 0 ? 0.9 : 0.25;
      const rates = Float64Array.from({ length: n * n }, (_, k) =>
        k % n !== Math.floor(k / n) && random.uniform() < density ? 0.2 + random.uniform() : 0,
      );
      expectAllClose(limitDistribution(rates, n), late(rates, n, 400), 1e-9, `seed ${seed} weight`);
    }
  });

  it('keeps relative accuracy over hundreds of orders of magnitude', () => {
    const n = 40;
    const rates = new Float64Array(n * n);
    for (let x = 0; x + 1 < n; x++) {
      rates[x * n + x + 1] = 1e-7;
      rates[(x + 1) * n + x] = 1;
    }
    const limit = limitDistribution(rates, n);
    for (let x = 0; x + 1 < n; x++) expectClose(limit[x + 1] / limit[x] / 1e-7, 1, 1e-13, `ratio at ${x}`);
    expect(limit[n - 1]).toBeLessThan(1e-270);
  });

  it('handles a point and no rates at all', () => {
    expectAllClose(limitDistribution(new Float64Array(1), 1), [1], 0);
    expectAllClose(limitDistribution(new Float64Array(9), 3), [1 / 3, 1 / 3, 1 / 3], 0);
  });
});
