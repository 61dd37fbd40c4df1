import { adjoint } from '../matrix/arithmetic.js';
import { fromTriplets, SIDE_LIMIT, type Entry, type Matrix } from '../matrix/matrix.js';
import { requireWhole } from '../require.js';

/** Annihilation operator of an oscillator cut off after so many levels: a e_k = √k e_{k−1}. */
export function annihilation(levels: number): Matrix {
  requireWhole(levels, 2, SIDE_LIMIT, 'the number of levels');
  const triplets = Array.from({ length: levels - 1 }, (_, k): Entry => [k, k + 1, Math.sqrt(k + 1), 0]);
  return fromTriplets(levels, levels, triplets);
}

/** Creation operator, the adjoint of `annihilation`. */
export function creation(levels: number): Matrix {
  return adjoint(annihilation(levels));
}

/** Number operator diag(0, 1, …), exact; `multiply(creation(n), annihilation(n))` has roundings. */
export function numberOperator(levels: number): Matrix {
  requireWhole(levels, 2, SIDE_LIMIT, 'the number of levels');
  return fromTriplets(
    levels,
    levels,
    Array.from({ length: levels }, (_, k): Entry => [k, k, k, 0]),
  );
}
