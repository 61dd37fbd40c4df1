import { applyGeneratorAdjoint } from '../generator/apply-generator.js';
import { generatorNormBound } from '../generator/generator-norm.js';
import type { Generator } from '../generator/generator.js';
import { zeros } from '../linalg/complex-matrix.js';
import { EPSILON, NOISE_RATE } from '../tolerances.js';

/**
 * The rates x→y of the classical chain that L† is on diagonal matrices, n×n row-major, or null when L† leads out of them (beyond
 * rounding) or is no chain there. Rates below the square of rounding, which squared rounding errors of jumps can produce, are zero.
 */
export function diagonalRates(g: Generator): Float64Array | null {
  const n = g.algebra.size;
  const bound = generatorNormBound(g);
  const rates = new Float64Array(n * n);
  const unit = zeros(n);
  for (let x = 0; x < n; x++) {
    unit.re[x * n + x] = 1;
    const image = applyGeneratorAdjoint(g, unit);
    unit.re[x * n + x] = 0;
    for (let i = 0; i < n; i++) {
      for (let j = 0; j < n; j++) {
        const k = i * n + j;
        if (i !== j && Math.hypot(image.re[k], image.im[k]) > n * EPSILON * bound) return null;
        if (i === j && i !== x) rates[x * n + i] = image.re[k];
      }
    }
  }
  if (rates.some((r) => r < -n * EPSILON * bound)) return null;
  return rates.map((r) => (r > NOISE_RATE * bound ? r : 0));
}
