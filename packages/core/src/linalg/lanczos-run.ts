import { ThalwegError } from '../errors.js';
import type { Random } from '../random.js';
import {
  EPSILON,
  KRYLOV_BREAKDOWN,
  LANCZOS_CHECK_DIMENSION,
  LANCZOS_CHECK_STEPS,
  LANCZOS_SUBSPACE,
  LANCZOS_WHOLE,
} from '../tolerances.js';
import { addCombination, norm, orthogonalise, projectOut } from './orthogonalise.js';
import { symmetricEigen } from './symmetric-eigen.js';

/** A symmetric operator with its account of work and the largest |Ritz value| seen. */
export interface KrylovOperator {
  readonly dimension: number;
  readonly apply: (x: Float64Array, y: Float64Array) => void;
  readonly maxMatvecs: number;
  matvecs: number;
  scale: number;
  /** Arrays of earlier work that may be overwritten: fresh memory is slow to touch. */
  readonly spare: Float64Array[];
}

export interface LanczosRun {
  readonly operator: KrylovOperator;
  /** Orthonormal vectors the whole iteration stays orthogonal to. */
  readonly locked: readonly Float64Array[];
  readonly want: number;
  readonly random: Random;
  readonly tolerance: number;
  /** The run may also end once the smallest Ritz value less its residual is above this: nothing below was seen. */
  readonly floor: number;
}

interface Ritz {
  readonly values: Float64Array;
  readonly vectors: Float64Array[];
}

/** One thick-restart Lanczos iteration from a random start; `want` Ritz pairs, ascending, orthonormal vectors. */
export function lanczosRun(run: LanczosRun): Ritz {
  const { operator, locked, want, tolerance, floor } = run;
  const size = subspaceSize(operator.dimension - locked.length, want);
  // Where products are dear, convergence is looked for between restarts as well.
  const stretch = operator.dimension < LANCZOS_CHECK_DIMENSION ? size : LANCZOS_CHECK_STEPS;
  const projected = new Float64Array(size * size);
  const basis = [freshDirection(run, [])];
  for (let from = 0; ;) {
    const to = Math.min(size, Math.max(want, from + stretch));
    const { coupling, next } = extend(run, basis, projected, size, from, to);
    const { values, vectors } = symmetricEigen(leadingBlock(projected, size, to), to);
    operator.scale = Math.max(operator.scale, Math.abs(values[0]), Math.abs(values[to - 1]));
    const residual = (j: number): number => coupling * Math.abs(vectors[(to - 1) * to + j]);
    let converged = true;
    for (let j = 0; j < want; j++) converged &&= residual(j) <= tolerance * operator.scale;
    if (converged || (to === size && values[0] - residual(0) > floor)) {
      combine(basis, vectors, want);
      operator.spare.push(...basis.splice(want), next);
      return { values: values.slice(0, want), vectors: basis };
    }
    from = to;
    if (to === size) {
      from = Math.min(size - 1, want + Math.floor((size - want) / 2));
      combine(basis, vectors, from);
      operator.spare.push(...basis.splice(from));
      projected.fill(0);
      for (let j = 0; j < from; j++) projected[j * size + j] = values[j];
    }
    basis.push(next);
  }
}

function leadingBlock(a: Float64Array, size: number, count: number): Float64Array {
  if (count === size) return a;
  const out = new Float64Array(count * count);
  for (let i = 0; i < count; i++) out.set(a.subarray(i * size, i * size + count), i * count);
  return out;
}

/** Small problems are solved whole, which also settles spectra too close for restarts. */
function subspaceSize(available: number, want: number): number {
  return available <= LANCZOS_WHOLE ? available : Math.min(available, 2 * want + LANCZOS_SUBSPACE);
}

/** Grows the basis to `to` vectors, filling the projected matrix from column `from`; returns the next direction. */
function extend(
  run: LanczosRun,
  basis: Float64Array[],
  projected: Float64Array,
  size: number,
  from: number,
  to: number,
): { coupling: number; next: Float64Array } {
  const { operator, locked } = run;
  let largest = operator.scale;
  for (let j = from; ; j++) {
    const w = multiply(operator, basis[j]);
    largest = Math.max(largest, norm(w));
    orthogonalise(w, locked);
    // The three-term recurrence first: what is left then is near orthogonal to the rest, and one more projection does.
    const first = Math.max(0, j - 1);
    const recent = projectOut(w, basis.slice(first));
    const coefficients = orthogonalise(w, basis);
    recent.forEach((product, i) => (coefficients[first + i] += product));
    for (let i = 0; i <= j; i++) projected[i * size + j] = projected[j * size + i] = coefficients[i];
    // Rounding left in w by the projections must not count as a new direction.
    orthogonalise(w, locked);
    let coupling = norm(w);
    const whole = basis.length + locked.length === operator.dimension;
    const exhausted = whole || coupling <= KRYLOV_BREAKDOWN * EPSILON * largest * Math.sqrt(operator.dimension);
    if (exhausted) coupling = 0;
    if (!exhausted) for (let p = 0; p < w.length; p++) w[p] /= coupling;
    if (j === to - 1) return { coupling, next: w };
    basis.push(exhausted ? freshDirection(run, basis) : w);
  }
}

function multiply(operator: KrylovOperator, x: Float64Array): Float64Array {
  if (operator.matvecs >= operator.maxMatvecs) {
    throw new ThalwegError(
      'no-convergence',
      `expected Lanczos to converge within ${operator.maxMatvecs} products; allow more or ask for less accuracy`,
    );
  }
  const y = operator.spare.pop() ?? new Float64Array(operator.dimension);
  operator.apply(x, y);
  operator.matvecs++;
  return y;
}

/** A random unit vector orthogonal to everything so far. */
function freshDirection({ operator, locked, random }: LanczosRun, basis: readonly Float64Array[]): Float64Array {
  for (;;) {
    const x = Float64Array.from({ length: operator.dimension }, () => random.normal());
    const before = norm(x);
    orthogonalise(x, locked);
    orthogonalise(x, basis);
    orthogonalise(x, locked);
    const left = norm(x);
    if (left > 1e-6 * before) return x.map((value) => value / left);
  }
}

/** Overwrite the first `count` basis vectors by the first columns of (basis as columns) · vectors, a stretch of entries at a time. */
function combine(basis: readonly Float64Array[], vectors: Float64Array, count: number): void {
  const size = basis.length;
  const dimension = basis[0].length;
  const stretch = basis.map(() => new Float64Array(STRETCH));
  const columns = Array.from({ length: count }, (_, j) =>
    Float64Array.from({ length: size }, (_, i) => vectors[i * size + j]),
  );
  const sum = new Float64Array(STRETCH);
  for (let from = 0; from < dimension; from += STRETCH) {
    const to = Math.min(dimension, from + STRETCH);
    basis.forEach((v, i) => stretch[i].set(v.subarray(from, to)));
    columns.forEach((column, j) => {
      sum.fill(0);
      addCombination(sum, stretch, column);
      basis[j].set(to - from < STRETCH ? sum.subarray(0, to - from) : sum, from);
    });
  }
}

/** Entries of all basis vectors that fit the second-level cache together. */
const STRETCH = 512;
