import type { Generator } from '../../../src/generator/generator.js';
import { sumGenerator } from '../../../src/generator/sum-generator.js';
import { type ComplexMatrix, diagonal, hermitianPart } from '../../../src/linalg/complex-matrix.js';
import type { Structure } from '../../../src/structure/structure.js';
import { analyse } from '../../../src/structure/structure.js';
import { type TransportDistance, transportDistance } from '../../../src/transport/transport-distance.js';
import { transportModel } from '../../../src/transport/transport-model.js';

/** The diagonal state with the given eigenvalues. */
export function distribution(...weights: number[]): ComplexMatrix {
  return hermitianPart(diagonal(weights));
}

export function distance(
  structure: Structure,
  a: ComplexMatrix,
  b: ComplexMatrix,
  relativeWidth: number,
): TransportDistance {
  return transportDistance(transportModel(structure), a, b, { relativeWidth });
}

/** The structure of rate · L. */
export function scaled(generator: Generator, rate: number): Structure {
  return analyse(sumGenerator([{ weight: rate, generator }]));
}

/** ∫_a^b √(artanh r / r) dr; r = tanh u takes the weak singularity at ±1 to infinity, where dr = du/cosh² u decays. */
export function artanhIntegral(a: number, b: number): number {
  const [from, to] = [Math.max(-20, Math.atanh(a)), Math.min(20, Math.atanh(b))];
  const cells = 4000;
  const width = (to - from) / cells;
  let sum = 0;
  for (let k = 0; k < cells; k++) {
    // Two-point Gauss–Legendre rule.
    for (const sign of [-1, 1]) {
      const u = from + (k + 0.5 + sign / (2 * Math.sqrt(3))) * width;
      const root = Math.sqrt(Math.abs(u) < 1e-6 ? 1 : u / Math.tanh(u));
      sum += ((width / 2) * root) / Math.cosh(u) ** 2;
    }
  }
  return sum;
}
