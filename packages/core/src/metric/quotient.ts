import { EPSILON } from '../tolerances.js';
import { type ComplexMatrix, commutator, multiply, multiplyAdjointFirst, zeros } from '../linalg/complex-matrix.js';
import { type MeanTable, emptyMeanTable, fillMeanTable } from './mean-table.js';
import type { MetricModel } from './metric-model.js';
import type { OperatorMean } from './operator-mean.js';
import type { StateFrame } from './state-frame.js';
import { canonicalGenerator } from './canonical-generator.js';

/** The two quadratic forms of the gradient estimate at one (ρ, A). */
export interface Quotient {
  /** ‖A‖²_ρ = Σ_j <∂_jA,[ρ]_j∂_jA>. */
  readonly metric: number;
  /** q_ρ(A) = ½ Σ_j <∂_jA,D[ρ;L†ρ]_j∂_jA> − Re Σ_j <∂_jA,[ρ]_j∂_jLA>. */
  readonly curvature: number;
  /** Sum of the absolute values of the terms of `curvature`: its rounding error is a small multiple of 2⁻⁵² times this. */
  readonly magnitude: number;
}

/**
 * Evaluate both forms at ρ = U diag(λ) U*, λ > 0, and an observable A (N×N, Hermitian or not), plainly from the
 * definitions: O(J N³), sharing only the mean tables with the pencil.
 */
export function quotientAt(model: MetricModel, mean: OperatorMean, frame: StateFrame, a: ComplexMatrix): Quotient {
  const inFrame = rotateModel(model, frame, a);
  const n = model.algebra.size;
  const tables = meanTables(model, mean, frame.lambda);
  const generator = canonicalGenerator(inFrame.model);
  const flow = generator.onStates(diagonalMatrix(frame.lambda));
  const la = generator.onObservables(inFrame.observable);
  let metric = 0;
  let curvature = 0;
  let magnitude = 0;
  inFrame.model.jumps.forEach((jump) => {
    const table = tables[jump.group];
    const x = commutator(jump.matrix, inFrame.observable);
    const y = commutator(jump.matrix, la);
    for (let p = 0; p < n * n; p++) {
      metric += table.f[p] * (x.re[p] * x.re[p] + x.im[p] * x.im[p]);
      const term = table.f[p] * (x.re[p] * y.re[p] + x.im[p] * y.im[p]);
      curvature -= term;
      magnitude += Math.abs(term);
    }
    const g = formGradient(table, x, x);
    for (let p = 0; p < n * n; p++) {
      const term = 0.5 * (g.re[p] * flow.re[p] + g.im[p] * flow.im[p]);
      curvature += term;
      magnitude += Math.abs(term);
    }
  });
  return { metric, curvature, magnitude };
}

/** Bound on the rounding error of curvature/metric, from the size of the terms summed. */
export function quotientError(model: MetricModel, q: Quotient): number {
  return (16 * model.algebra.size ** 2 * EPSILON * q.magnitude) / q.metric;
}

/** Hermitian part of the gradient in ρ of Re <X,[ρ]Y>, in the frame of ρ. */
function formGradient(table: MeanTable, x: ComplexMatrix, y: ComplexMatrix): ComplexMatrix {
  const n = x.rows;
  const g = zeros(n);
  const { left, right } = table;
  for (let a = 0; a < n; a++) {
    for (let c = 0; c < n; c++) {
      let re = 0;
      let im = 0;
      for (let b = 0; b < n; b++) {
        const t = left[(a * n + c) * n + b];
        re += t * (x.re[a * n + b] * y.re[c * n + b] + x.im[a * n + b] * y.im[c * n + b]);
        im += t * (x.im[a * n + b] * y.re[c * n + b] - x.re[a * n + b] * y.im[c * n + b]);
        // Row index c of δ_cb with b ↔ c here: Σ X_{b,c} conj(Y_{b,a}) T2.
        const s = right[(b * n + a) * n + c];
        re += s * (x.re[b * n + c] * y.re[b * n + a] + x.im[b * n + c] * y.im[b * n + a]);
        im += s * (x.im[b * n + c] * y.re[b * n + a] - x.re[b * n + c] * y.im[b * n + a]);
      }
      g.re[a * n + c] += re / 2;
      g.im[a * n + c] += im / 2;
      g.re[c * n + a] += re / 2;
      g.im[c * n + a] -= im / 2;
    }
  }
  return g;
}

function meanTables(model: MetricModel, mean: OperatorMean, lambda: Float64Array): MeanTable[] {
  return model.frequencies.map((omega) => {
    const table = emptyMeanTable(lambda.length);
    fillMeanTable(table, mean, lambda, omega);
    return table;
  });
}

function rotateModel(model: MetricModel, frame: StateFrame, a: ComplexMatrix) {
  const { u } = frame;
  if (!u) return { model, observable: a };
  const turn = (x: ComplexMatrix): ComplexMatrix => multiplyAdjointFirst(u, multiply(x, u));
  return {
    model: { ...model, jumps: model.jumps.map((jump) => ({ ...jump, matrix: turn(jump.matrix) })) },
    observable: turn(a),
  };
}

function diagonalMatrix(lambda: Float64Array): ComplexMatrix {
  const n = lambda.length;
  const out = zeros(n);
  for (let i = 0; i < n; i++) out.re[i * n + i] = lambda[i];
  return out;
}
