import { gapDense } from '../constants/gap.js';
import { ThalwegError } from '../errors.js';
import { type ComplexMatrix, addScaledInto, copy, multiply, zeros } from '../linalg/complex-matrix.js';
import { hermitianEigenvalues } from '../linalg/hermitian-eigen.js';
import { matrixFunction } from '../linalg/matrix-function.js';
import type { ReferenceState } from '../structure/reference-state.js';
import type { Structure } from '../structure/structure.js';
import { type NamedState, planeThrough } from './choose-slice.js';
import type { StateSlice } from './state-slice.js';

/**
 * A plane through σ and the states given, filled up to two from the slowest mode and the levels in their order. The first pair
 * that spans a plane is taken; what is given is kept. Throws `usage` when what is given lies on a line with σ.
 */
export function usualPlane(structure: Structure, given: readonly NamedState[]): StateSlice {
  const { algebra, state } = structure;
  if (!state?.faithful) {
    throw new ThalwegError('not-supported', 'expected a generator with a faithful invariant state, got one without');
  }
  const [first, second] = given;
  if (first && second) return planeThrough(algebra, state.sigma, [first, second]);
  const others = [slowMode(structure, state), ...levels(algebra.size)].filter((named) => named !== null);
  const pairs = others.flatMap((a, k): [NamedState, NamedState][] =>
    first ? [[first, a]] : others.slice(k + 1).map((b): [NamedState, NamedState] => [a, b]),
  );
  let refusal: unknown = null;
  for (const pair of pairs) {
    try {
      return planeThrough(algebra, state.sigma, pair);
    } catch (error) {
      if (!(error instanceof ThalwegError) || error.code !== 'usage') throw error;
      refusal ??= error;
    }
  }
  throw refusal;
}

/** σ moved along σ^{1/2}Aσ^{1/2}, A the observable of the gap, half of the way to the boundary; null where there is no gap. */
function slowMode({ generator, fixedPoints }: Structure, state: ReferenceState): NamedState | null {
  if (!fixedPoints) return null;
  const { value, observable } = gapDense(generator, state, fixedPoints);
  if (!Number.isFinite(value)) return null;
  const root = matrixFunction(state, Math.sqrt);
  const lowest = hermitianEigenvalues(observable)[0];
  if (!(lowest < 0)) return null;
  const direction = multiply(root, multiply(observable, root));
  return { name: 'slow mode', rho: addScaledInto(copy(state.sigma), direction, -0.5 / lowest) };
}

function levels(size: number): NamedState[] {
  return Array.from({ length: size }, (_, k) => ({ name: `level ${k}`, rho: level(size, k) }));
}

function level(size: number, k: number): ComplexMatrix {
  const rho = zeros(size);
  rho.re[k * size + k] = 1;
  return rho;
}
