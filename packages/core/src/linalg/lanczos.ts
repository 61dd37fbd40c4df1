import { ThalwegError } from '../errors.js';
import type { Random } from '../random.js';
import { lanczosRun, type KrylovOperator } from './lanczos-run.js';
import { appendOrthonormal } from './orthogonalise.js';
import { symmetricEigen } from './symmetric-eigen.js';

export interface LanczosRequest {
  readonly dimension: number;
  /** Writes A x into y for a symmetric A; must not change x. */
  readonly apply: (x: Float64Array, y: Float64Array) => void;
  /** How many eigenpairs, with multiplicity. */
  readonly count: number;
  /** Vectors spanning an invariant subspace to leave out, in any basis. */
  readonly deflate?: readonly Float64Array[];
  readonly random: Random;
  /** Residual ‖A v − λ v‖ accepted, relative to the largest |Ritz value|; a few times ε is the least that can be asked. */
  readonly tolerance: number;
  readonly maxMatvecs: number;
}

export interface LanczosResult {
  /** Ascending, with multiplicity. */
  readonly values: Float64Array;
  readonly vectors: Float64Array[];
  /** ‖A v − λ v‖, computed from the vectors returned. */
  readonly residuals: Float64Array;
  readonly matvecs: number;
}

/**
 * Smallest eigenvalues of a real symmetric operator by thick-restart Lanczos (Wu & Simon, SIAM J. Matrix Anal. Appl. 22
 * (2000)) with full reorthogonalisation. A Krylov space sees one vector of each eigenspace, so after convergence the
 * complement of what was found is searched, until nothing smaller is left there: multiplicities come out right. Throws
 * `usage`, and `no-convergence` when `maxMatvecs` is used up.
 */
export function lanczosSmallest(request: LanczosRequest): LanczosResult {
  const { dimension, count, random, tolerance } = request;
  const locked: Float64Array[] = [];
  for (const v of request.deflate ?? []) appendOrthonormal(locked, v);
  const available = dimension - locked.length;
  if (!Number.isInteger(count) || count < 0 || count > available) {
    throw new ThalwegError(
      'usage',
      `expected between 0 and ${available} eigenpairs (dimension less deflated), got ${count}`,
    );
  }
  const operator: KrylovOperator = {
    dimension,
    apply: request.apply,
    matvecs: 0,
    maxMatvecs: request.maxMatvecs,
    scale: 0,
    spare: [],
  };
  let found: Float64Array[] = [];
  if (count > 0) found = lanczosRun({ operator, locked, want: count, random, tolerance, floor: Infinity }).vectors;
  for (;;) {
    const pairs = rayleighRitz(operator, found);
    if (count === 0 || found.length >= available) return finish(operator, pairs, count);
    const floor = pairs.values[count - 1];
    const next = lanczosRun({ operator, locked: [...locked, ...found], want: 1, random, tolerance, floor });
    if (next.values[0] >= floor - tolerance * operator.scale) return finish(operator, pairs, count);
    // A copy of a multiple eigenvalue, or one the first start did not see: keep it, and look again.
    found = pairs.vectors;
    appendOrthonormal(found, next.vectors[0]);
  }
}

interface Pairs {
  readonly values: Float64Array;
  readonly vectors: Float64Array[];
  readonly images: Float64Array[];
}

/** Best approximations from the span of orthonormal vectors, ascending. */
function rayleighRitz(operator: KrylovOperator, basis: readonly Float64Array[]): Pairs {
  const k = basis.length;
  const images = basis.map((v) => {
    const y = new Float64Array(operator.dimension);
    operator.apply(v, y);
    operator.matvecs++;
    return y;
  });
  const projected = new Float64Array(k * k);
  for (let i = 0; i < k; i++) {
    for (let j = 0; j < k; j++) projected[i * k + j] = basis[i].reduce((sum, x, p) => sum + x * images[j][p], 0);
  }
  const { values, vectors } = symmetricEigen(projected, k);
  const combine = (list: readonly Float64Array[], j: number): Float64Array => {
    const x = new Float64Array(operator.dimension);
    list.forEach((v, i) => {
      for (let p = 0; p < x.length; p++) x[p] += vectors[i * k + j] * v[p];
    });
    return x;
  };
  const indices = Array.from({ length: k }, (_, j) => j);
  return { values, vectors: indices.map((j) => combine(basis, j)), images: indices.map((j) => combine(images, j)) };
}

function finish(operator: KrylovOperator, { values, vectors, images }: Pairs, count: number): LanczosResult {
  const residuals = Float64Array.from({ length: count }, (_, j) =>
    Math.sqrt(images[j].reduce((sum, y, p) => sum + (y - values[j] * vectors[j][p]) ** 2, 0)),
  );
  return { values: values.slice(0, count), vectors: vectors.slice(0, count), residuals, matvecs: operator.matvecs };
}
