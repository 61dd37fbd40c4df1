import { fromCoordinates } from '../algebra/block-algebra.js';
import { applyGenerator } from '../generator/apply-generator.js';
import type { Generator } from '../generator/generator.js';
import { scaleSparse } from '../generator/lindblad-generator.js';
import { MAX_DENSE_DIMENSION } from '../generator/superoperator-parts.js';
import { addDrift, addSandwich } from '../generator/unit-form.js';
import { frobeniusNorm, multiply, multiplyAdjointFirst, scale, subtract, zeros } from '../linalg/complex-matrix.js';
import { denseFromSparse, sparseFromDense } from '../linalg/sparse-matrix.js';
import { seededRandom } from '../random.js';
import type { StoredJump } from './canonical-form.js';
import { basisOf, generatorInStateBasis } from './generator-in-basis.js';
import type { ReferenceState } from './reference-state.js';

/** ‖L − L rebuilt from canonical jumps‖_F/‖L‖_F: over the whole algebra, or on random observables where that is too large. */
export function canonicalResidual(g: Generator, state: ReferenceState, jumps: readonly StoredJump[]): number {
  return g.algebra.dimension <= MAX_DENSE_DIMENSION ? exactResidual(g, state, jumps) : probedResidual(g, jumps);
}

function exactResidual(g: Generator, state: ReferenceState, jumps: readonly StoredJump[]): number {
  const { units, matrix } = generatorInStateBasis(g, state);
  const size = frobeniusNorm(matrix);
  const u = basisOf(state);
  const rebuilt = zeros(units.count);
  const drift = zeros(units.size);
  for (const { sparse, frequency } of jumps) {
    const v = u ? sparseFromDense(multiplyAdjointFirst(u, multiply(denseFromSparse(sparse), u))) : sparse;
    addSandwich(rebuilt, drift, units, v, 2 * Math.exp(-frequency / 2));
  }
  addDrift(rebuilt, units, scale(drift, -0.5));
  const difference = frobeniusNorm(subtract(rebuilt, matrix));
  return size > 0 ? difference / size : difference;
}

const PROBES = 2;

function probedResidual(g: Generator, jumps: readonly StoredJump[]): number {
  const rebuilt: Generator = {
    ...g,
    hamiltonian: null,
    superoperator: null,
    jumps: jumps.map(({ sparse, frequency }) => ({
      matrix: scaleSparse(sparse, Math.SQRT2 * Math.exp(-frequency / 4)),
    })),
  };
  const random = seededRandom('canonical probes');
  let difference = 0;
  let total = 0;
  for (let k = 0; k < PROBES; k++) {
    const a = fromCoordinates(
      g.algebra,
      Float64Array.from({ length: g.algebra.dimension }, () => random.normal()),
    );
    const image = applyGenerator(g, a);
    total += frobeniusNorm(image) ** 2;
    difference += frobeniusNorm(subtract(image, applyGenerator(rebuilt, a))) ** 2;
  }
  return total > 0 ? Math.sqrt(difference / total) : Math.sqrt(difference);
}
