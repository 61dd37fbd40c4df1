import type { Generator } from './generator.js';
import { unitsToHermitian } from './hermitian-units.js';
import { unitForm } from './unit-form.js';

/** L as a real D×D row-major matrix in the orthonormal Hermitian basis; row k holds the k-th coordinate of L(B_l). Kept while L lives. */
export function generatorMatrix(g: Generator): Float64Array {
  const known = matrices.get(g);
  if (known) return known;
  const { units, matrix } = unitForm(g);
  const out = unitsToHermitian(g.algebra, units, matrix);
  matrices.set(g, out);
  return out;
}

const matrices = new WeakMap<Generator, Float64Array>();
