import { DEPENDENCE_PIVOT, DEPENDENCE_RESIDUAL, NEGLIGIBLE_COEFFICIENT, OBJECTIVE_CONSISTENCY } from '../tolerances.js';
import { addProducts, addRowsTimes, BATCH, combineRows, type CoefficientRows } from './coefficient-rows.js';
import { type ConicForm } from './conic-form.js';
import { choleskyFactor } from './kernels/cholesky-factor.js';
import { solveLower, solveLowerAdjoint } from './kernels/triangular-solve.js';

export interface Dependence {
  /** Positions among the kept unknowns of the form whose coefficients are combinations of earlier ones, or vanish. */
  readonly dependent: readonly number[];
  /**
   * A scaled y with Σ y_i A_i = 0 and b·y > 0, if some dependent unknown has an objective coefficient that does not follow
   * its combination: then b·y is unbounded wherever it is feasible.
   */
  readonly ray: Float64Array | null;
  /** Cholesky factor of the m × m matrix <A_i, A_j>, +∞ on the diagonal where a pivot was skipped. */
  readonly gramFactor: Float64Array;
}

/**
 * Finds coefficients that depend linearly on earlier ones, or are rounding beside them: small pivots of the Cholesky factor of their Gram matrix, each
 * then confirmed by the norm of A_i − Σ_j c_j A_j, because a Gram matrix alone cannot tell distances below √ε.
 */
export function dependentCoefficients(form: ConicForm): Dependence {
  const m = form.unknowns.length;
  const parts = [...form.cones.map(({ rows }) => rows), form.linear.rows];
  const gram = gramMatrix(parts, m);
  const factor = new Float64Array(m * m);
  const skipped = new Uint8Array(m);
  choleskyFactor(gram, m, false, factor, { floors: new Float64Array(m).fill(DEPENDENCE_PIVOT), skipped });
  const dependent: number[] = [];
  let ray: Float64Array | null = null;
  for (let i = 0; i < m; i++) {
    if (isRounding(form, i)) dependent.push(i);
    if (!skipped[i] || isRounding(form, i)) continue;
    const c = combination(parts, gram, factor, m, i);
    const weight = c.reduce((sum, x) => sum + Math.abs(x), 0);
    if (combinationNorm(parts, c) > DEPENDENCE_RESIDUAL * weight) continue;
    dependent.push(i);
    let value = 0;
    let size = 0;
    for (let j = 0; j < m; j++) {
      value += form.objective[j] * c[j];
      size += Math.abs(form.objective[j] * c[j]);
    }
    if (Math.abs(value) > OBJECTIVE_CONSISTENCY * size) ray ??= c.map((x) => x / value);
  }
  return { dependent, ray, gramFactor: factor };
}

/** A coefficient that is nothing beside the others, of an unknown without a share in the objective. */
function isRounding({ norms, largestNorm, objective }: ConicForm, i: number): boolean {
  return norms[i] < NEGLIGIBLE_COEFFICIENT * largestNorm && !(Math.abs(objective[i]) > 0);
}

function gramMatrix(parts: readonly CoefficientRows[], m: number): Float64Array {
  const gram = new Float64Array(m * m);
  for (const rows of parts) {
    const vectors = new Float64Array(BATCH * rows.width);
    for (let first = 0; first < rows.count; first += BATCH) {
      vectors.fill(0);
      for (let t = first; t < Math.min(first + BATCH, rows.count); t++) {
        for (let e = rows.start[t]; e < rows.start[t + 1]; e++) {
          vectors[(t - first) * rows.width + rows.coordinate[e]] = rows.value[e];
        }
      }
      addProducts(rows, first, vectors, gram, m);
    }
  }
  return symmetrise(gram, m);
}

/** Every pair was added to one of its two places: both become the sum. */
export function symmetrise(matrix: Float64Array, m: number): Float64Array {
  for (let i = 0; i < m; i++) {
    for (let j = 0; j < i; j++) matrix[i * m + j] = matrix[j * m + i] = matrix[i * m + j] + matrix[j * m + i];
  }
  return matrix;
}

/** c with c_i = 1 and the other entries, on earlier unknowns that were not skipped, making Σ c_j A_j smallest. */
function combination(
  parts: readonly CoefficientRows[],
  gram: Float64Array,
  factor: Float64Array,
  m: number,
  i: number,
): Float64Array {
  const c = new Float64Array(m);
  c[i] = 1;
  const step = Float64Array.from({ length: m }, (_, j) => (j < i ? -gram[i * m + j] : 0));
  // The second pass refines: its right-hand side comes from the residual matrix itself.
  for (let pass = 0; pass < 2; pass++) {
    const head = step.subarray(0, i);
    const leading = leadingFactor(factor, m, i);
    solveLower(leading, i, false, head);
    solveLowerAdjoint(leading, i, false, head);
    for (let j = 0; j < i; j++) c[j] += head[j];
    step.fill(0);
    for (const rows of parts) {
      const residual = new Float64Array(rows.width);
      combineRows(rows, c, residual);
      addRowsTimes(rows, residual, -1, step);
    }
  }
  return c;
}

function leadingFactor(factor: Float64Array, m: number, n: number): Float64Array {
  const leading = new Float64Array(n * n);
  for (let i = 0; i < n; i++) leading.set(factor.subarray(i * m, i * m + i + 1), i * n);
  return leading;
}

function combinationNorm(parts: readonly CoefficientRows[], c: Float64Array): number {
  let sum = 0;
  for (const rows of parts) {
    const residual = new Float64Array(rows.width);
    combineRows(rows, c, residual);
    for (const x of residual) sum += x * x;
  }
  return Math.sqrt(sum);
}
