import { fromCoordinates, toCoordinates } from '../algebra/block-algebra.js';
import { ThalwegError } from '../errors.js';
import { applyGeneratorAdjoint } from '../generator/apply-generator.js';
import { generatorNormBound } from '../generator/generator-norm.js';
import type { Generator } from '../generator/generator.js';
import { type ComplexMatrix, fromEntries } from '../linalg/complex-matrix.js';
import { EPSILON, STATE_ROUNDING } from '../tolerances.js';
import { dot, norm } from '../linalg/real-vector.js';

/** Vectors of one Krylov space; at D = 65536 they take 40 MB. */
const KRYLOV_SIZE = 80;

/** Restarts before giving up. */
const MAX_RESTARTS = 60;

/**
 * lim e^{tL†}ρ without D×D matrices. GMRES (Saad & Schultz, SIAM J. Sci. Stat. Comput. 7 (1986)) on L†x = 0 from x = ρ changes x within
 * the range of L† only, and 0 is a semisimple eigenvalue, so that the solution it reaches is E†ρ. Throws `no-convergence`.
 */
export function krylovLimit(g: Generator, rho: ComplexMatrix): ComplexMatrix {
  const { algebra } = g;
  const apply = (x: Float64Array): Float64Array =>
    toCoordinates(algebra, applyGeneratorAdjoint(g, fromCoordinates(algebra, x)));
  const x = toCoordinates(algebra, rho);
  const target = STATE_ROUNDING * algebra.size * EPSILON * generatorNormBound(g);
  for (let restart = 0; restart < MAX_RESTARTS; restart++) {
    const residual = apply(x);
    if (norm(residual) <= target * norm(x)) return withoutDust(fromCoordinates(algebra, x));
    improve(x, residual, apply);
  }
  throw new ThalwegError(
    'no-convergence',
    `expected the invariant state within ${MAX_RESTARTS} restarts of GMRES, got a state that still moves; declare the invariant state`,
    { pointer: '/state', details: { restarts: MAX_RESTARTS } },
  );
}

/** One cycle: x += z with ‖Az + r‖ least over the Krylov space of r = Ax. */
function improve(x: Float64Array, residual: Float64Array, apply: (x: Float64Array) => Float64Array): void {
  const start = norm(residual);
  const basis = [residual.map((v) => -v / start)];
  /** Columns of the triangular factor, and the rotations that make it. */
  const columns: Float64Array[] = [];
  const rotations: [number, number][] = [];
  const right = new Float64Array(KRYLOV_SIZE + 1);
  right[0] = start;
  for (let k = 0; k < KRYLOV_SIZE; k++) {
    const next = apply(basis[k]);
    const h = new Float64Array(k + 2);
    for (let pass = 0; pass < 2; pass++) {
      basis.forEach((b, i) => {
        const c = dot(b, next);
        h[i] += c;
        for (let at = 0; at < next.length; at++) next[at] -= c * b[at];
      });
    }
    h[k + 1] = norm(next);
    const size = norm(h);
    rotations.forEach(([c, s], i) => ([h[i], h[i + 1]] = [c * h[i] + s * h[i + 1], c * h[i + 1] - s * h[i]]));
    const length = Math.hypot(h[k], h[k + 1]);
    // An image already in the space adds nothing: the least-squares problem is solved as far as this space goes.
    if (!(length > EPSILON * size)) break;
    const rotation: [number, number] = [h[k] / length, h[k + 1] / length];
    const exhausted = !(h[k + 1] > EPSILON * size);
    rotations.push(rotation);
    [right[k], right[k + 1]] = [rotation[0] * right[k], -rotation[1] * right[k]];
    h[k] = length;
    columns.push(h);
    if (exhausted || Math.abs(right[k + 1]) <= EPSILON * start) break;
    const last = norm(next);
    basis.push(next.map((v) => v / last));
  }
  addCombination(x, basis, solveTriangular(columns, right));
}

function solveTriangular(columns: readonly Float64Array[], right: Float64Array): Float64Array {
  const y = right.slice(0, columns.length);
  for (let k = columns.length - 1; k >= 0; k--) {
    y[k] /= columns[k][k];
    for (let i = 0; i < k; i++) y[i] -= columns[k][i] * y[k];
  }
  return y;
}

function addCombination(x: Float64Array, basis: readonly Float64Array[], y: Float64Array): void {
  y.forEach((c, k) => {
    for (let at = 0; at < x.length; at++) x[at] += c * basis[k][at];
  });
}

/** Off-diagonal entries at rounding level become exact zeros, so that a diagonal limit is seen to be diagonal. */
function withoutDust(a: ComplexMatrix): ComplexMatrix {
  const n = a.rows;
  return fromEntries(n, n, (i, j) => {
    const k = i * n + j;
    return i !== j && Math.hypot(a.re[k], a.im[k]) <= EPSILON ? [0, 0] : [a.re[k], a.im[k]];
  });
}
