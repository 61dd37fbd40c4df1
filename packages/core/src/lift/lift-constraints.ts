import type { BlockAlgebra } from '../algebra/block-algebra.js';
import {
  type ComplexMatrix,
  addScaledInto,
  multiply,
  multiplyAdjointFirst,
  scale,
  zeros,
} from '../linalg/complex-matrix.js';
import { symmetricEigen } from '../linalg/symmetric-eigen.js';
import { CONSTRAINT_RANK, CONSTRAINT_RESIDUAL } from '../tolerances.js';
import { type LiftModel, subMatrix } from './lift-jumps.js';
import type { LiftUnknown } from './lift-orbits.js';
import type { LiftTerm } from './lift-terms.js';

/** All x with ∂L = L̂∂: x = origin + directions·y. */
export interface LiftSolutions {
  /** Least-norm solution, one number an unknown. */
  readonly origin: Float64Array;
  /** Orthonormal columns. */
  readonly directions: readonly Float64Array[];
  /** Largest entry of ∂L − L̂∂ at `origin`, relative to ‖L‖. */
  readonly residual: number;
}

/** Solve the intertwining equations in the unknowns; null when the ansatz has no solution. */
export function solveIntertwining(model: LiftModel, unknowns: readonly LiftUnknown[]): LiftSolutions | null {
  const p = unknowns.length;
  const { gram, right, norm, rows } = normalEquations(model, unknowns);
  const { values, vectors } = symmetricEigen(gram, p);
  const top = p > 0 ? Math.max(values[p - 1], 0) : 0;
  const origin = new Float64Array(p);
  const directions: Float64Array[] = [];
  for (let k = 0; k < p; k++) {
    const v = Float64Array.from({ length: p }, (_, i) => vectors[i * p + k]);
    if (values[k] <= CONSTRAINT_RANK * top) {
      directions.push(v);
      continue;
    }
    let dot = 0;
    for (let i = 0; i < p; i++) dot += v[i] * right[i];
    for (let i = 0; i < p; i++) origin[i] += (v[i] * dot) / values[k];
  }
  const residual = largestDefect(rows, origin) / norm;
  return residual <= CONSTRAINT_RESIDUAL ? { origin, directions, residual } : null;
}

/** One equation Σ coefficient·x = right, sparse. */
interface Equation {
  readonly columns: readonly number[];
  readonly values: readonly number[];
  readonly right: number;
}

function normalEquations(model: LiftModel, unknowns: readonly LiftUnknown[]) {
  const p = unknowns.length;
  const gram = new Float64Array(p * p);
  const right = new Float64Array(p);
  const rows: Equation[] = [];
  let norm = 0;
  const byTarget = termsByTarget(model, unknowns);
  for (const e of matrixUnitsOf(model)) {
    const image = generatorImage(model, e);
    const derivatives = model.jumps.map((_, j) => derivative(model, j, e));
    model.jumps.forEach((_, k) => {
      const target = derivative(model, k, image);
      const drift = driftPart(model, k, derivatives[k]);
      const rhs = addScaledInto(target, drift, 1);
      for (const x of rhs.re) norm = Math.max(norm, Math.abs(x));
      for (const equation of equationsOf(rhs, byTarget[k], model, derivatives)) {
        rows.push(equation);
        accumulate(gram, right, p, equation);
      }
    });
  }
  return { gram, right, norm: Math.max(norm, Number.MIN_VALUE), rows };
}

interface TargetTerm {
  readonly unknown: number;
  readonly term: LiftTerm;
  readonly re: number;
  readonly im: number;
}

function termsByTarget(model: LiftModel, unknowns: readonly LiftUnknown[]): TargetTerm[][] {
  const out: TargetTerm[][] = model.jumps.map(() => []);
  unknowns.forEach(({ terms }, unknown) => {
    for (const { term, re, im } of terms) out[term.to].push({ unknown, term, re, im });
  });
  return out;
}

/** L(A) = Σ_m R_m*AR_m − ½(SA + AS). */
function generatorImage({ jumps, drift, algebra }: LiftModel, a: ComplexMatrix): ComplexMatrix {
  const out = zeros(algebra.size);
  for (const { corner, row, col } of jumps) {
    const inside = subMatrix(algebra, a, row, row);
    addCornerInto(out, algebra, col, multiplyAdjointFirst(corner, multiply(inside, corner)), 1);
  }
  drift.forEach((s, b) => {
    const inside = subMatrix(algebra, a, b, b);
    addCornerInto(out, algebra, b, addScaledInto(multiply(s, inside), multiply(inside, s), 1), -0.5);
  });
  return out;
}

function addCornerInto(
  out: ComplexMatrix,
  algebra: BlockAlgebra,
  block: number,
  part: ComplexMatrix,
  factor: number,
): void {
  const start = algebra.offsets[block];
  for (let i = 0; i < part.rows; i++) {
    for (let j = 0; j < part.cols; j++) {
      const to = (start + i) * algebra.size + start + j;
      out.re[to] += factor * part.re[i * part.cols + j];
      out.im[to] += factor * part.im[i * part.cols + j];
    }
  }
}

/** ½(Sξ + ξS) in the corner of k: the fixed part of a lift, moved to the right-hand side. */
function driftPart({ jumps, drift }: LiftModel, k: number, xi: ComplexMatrix): ComplexMatrix {
  const { row, col } = jumps[k];
  return scale(addScaledInto(multiply(drift[row], xi), multiply(xi, drift[col]), 1), 0.5);
}

/** ∂_jA = V_jA − AV_j in the corner of j. */
function derivative({ jumps, algebra }: LiftModel, j: number, a: ComplexMatrix): ComplexMatrix {
  const { matrix, row, col } = jumps[j];
  const v = subMatrix(algebra, matrix, row, col);
  const left = multiply(v, subMatrix(algebra, a, col, col));
  return addScaledInto(left, multiply(subMatrix(algebra, a, row, row), v), -1);
}

/** R_left* ξ R_right in corners; −1 for the identity. */
function termImage({ jumps }: LiftModel, { left, right }: LiftTerm, xi: ComplexMatrix): ComplexMatrix {
  const once = left < 0 ? xi : multiplyAdjointFirst(jumps[left].corner, xi);
  return right < 0 ? once : multiply(once, jumps[right].corner);
}

function equationsOf(
  rhs: ComplexMatrix,
  terms: readonly TargetTerm[],
  model: LiftModel,
  derivatives: readonly ComplexMatrix[],
): Equation[] {
  const size = rhs.re.length;
  const columns = new Map<number, { re: Float64Array; im: Float64Array }>();
  for (const { unknown, term, re, im } of terms) {
    if (derivatives[term.from].re.every((x) => x === 0) && derivatives[term.from].im.every((x) => x === 0)) continue;
    const image = termImage(model, term, derivatives[term.from]);
    const column = columns.get(unknown) ?? { re: new Float64Array(size), im: new Float64Array(size) };
    for (let p = 0; p < size; p++) {
      column.re[p] += re * image.re[p] - im * image.im[p];
      column.im[p] += re * image.im[p] + im * image.re[p];
    }
    columns.set(unknown, column);
  }
  const out: Equation[] = [];
  for (let p = 0; p < size; p++) {
    for (const part of ['re', 'im'] as const) {
      const used = [...columns].filter(([, column]) => column[part][p] !== 0);
      if (used.length === 0 && rhs[part][p] === 0) continue;
      out.push({
        columns: used.map(([unknown]) => unknown),
        values: used.map(([, column]) => column[part][p]),
        right: rhs[part][p],
      });
    }
  }
  return out;
}

function accumulate(gram: Float64Array, right: Float64Array, p: number, { columns, values, right: b }: Equation): void {
  for (let i = 0; i < columns.length; i++) {
    right[columns[i]] += values[i] * b;
    for (let j = 0; j < columns.length; j++) gram[columns[i] * p + columns[j]] += values[i] * values[j];
  }
}

function largestDefect(rows: readonly Equation[], x: Float64Array): number {
  let worst = 0;
  for (const { columns, values, right } of rows) {
    let sum = -right;
    for (let i = 0; i < columns.length; i++) sum += values[i] * x[columns[i]];
    worst = Math.max(worst, Math.abs(sum));
  }
  return worst;
}

function matrixUnitsOf({ algebra }: LiftModel): ComplexMatrix[] {
  const n = algebra.size;
  const out: ComplexMatrix[] = [];
  for (let a = 0; a < n; a++) {
    for (let b = 0; b < n; b++) {
      if (algebra.blockOf[a] !== algebra.blockOf[b]) continue;
      const e = zeros(n);
      e.re[a * n + b] = 1;
      out.push(e);
    }
  }
  return out;
}
