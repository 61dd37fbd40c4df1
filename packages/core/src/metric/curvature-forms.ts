import { type MeanTable, emptyMeanTable, fillMeanTable } from './mean-table.js';
import type { MetricModel } from './metric-model.js';
import type { OperatorMean } from './operator-mean.js';
import { addJumpForms, addGeneratorUnits } from './jump-forms.js';
import { type MatrixUnits, matrixUnits } from '../algebra/matrix-units.js';
import { rotateInto } from './rotate.js';
import type { ComplexMatrix } from '../linalg/complex-matrix.js';

/**
 * The two forms of the gradient estimate at one state, over complex observables in the matrix units of the
 * state's eigenbasis (D×D Hermitian, row-major, real and imaginary parts apart):
 * metric: Σ_j <∂_jA,[ρ]_j∂_jA>;  curvature: ½ Σ_j <∂_jA,D[ρ;L†ρ]_j∂_jA> − Re Σ_j <∂_jA,[ρ]_j∂_jLA>.
 */
export interface CurvatureForms {
  readonly units: MatrixUnits;
  readonly metricRe: Float64Array;
  readonly metricIm: Float64Array;
  readonly curvatureRe: Float64Array;
  readonly curvatureIm: Float64Array;
  /** What the last evaluation left behind, all in the frame of ρ: V_j, η = L†ρ, L on matrix units, mean tables. */
  readonly rotated: readonly Parts[];
  readonly eta: Parts;
  readonly generator: Parts;
  readonly tables: readonly MeanTable[];
  /** The jumps that enter, with their weights. */
  readonly usedJumps: readonly { readonly index: number; readonly weight: number; readonly group: number }[];
  /** Evaluate at ρ = U diag(λ) U*, λ > 0 (any scale), U block-diagonal unitary or null for the identity. */
  evaluate(lambda: Float64Array, u: ComplexMatrix | null): void;
}

/**
 * Prepare the forms for a model and an operator mean. With `paired` one jump stands for each adjoint pair, which is
 * right on self-adjoint observables and for symmetric means only.
 */
export function curvatureForms(model: MetricModel, mean: OperatorMean, paired: boolean): CurvatureForms {
  const n = model.algebra.size;
  const units = matrixUnits(model.algebra);
  const d = units.count;
  const tables = model.frequencies.map(() => emptyMeanTable(n));
  const rotated = model.jumps.map(() => ({ re: new Float64Array(n * n), im: new Float64Array(n * n) }));
  const eta = { re: new Float64Array(n * n), im: new Float64Array(n * n) };
  const generator = { re: new Float64Array(d * d), im: new Float64Array(d * d) };
  const scratch = new Float64Array(8 * n * n * n + 4 * n * n);
  const usedJumps = model.jumps.flatMap((jump, index) => {
    const weight = paired ? jump.pairWeight : 1;
    return weight > 0 ? [{ index, weight, group: jump.group }] : [];
  });
  const forms = [0, 1, 2, 3].map(() => new Float64Array(d * d));
  const [metricRe, metricIm, curvatureRe, curvatureIm] = forms;

  function evaluate(lambda: Float64Array, u: ComplexMatrix | null): void {
    for (const form of forms) form.fill(0);
    tables.forEach((table, k) => fillMeanTable(table, mean, lambda, model.frequencies[k]));
    model.jumps.forEach((jump, j) => rotateInto(rotated[j], jump.matrix, u, scratch));
    flowInto(eta, model, rotated, lambda);
    generator.re.fill(0);
    generator.im.fill(0);
    model.jumps.forEach((jump, j) => {
      addGeneratorUnits(generator, units, rotated[j], Math.exp(-jump.frequency / 2), scratch);
    });
    for (const { index, weight, group } of usedJumps) {
      addJumpForms(forms, units, rotated[index], tables[group], eta, weight, scratch);
    }
    subtractGeneratorPart(forms, generator, d);
  }
  return { units, metricRe, metricIm, curvatureRe, curvatureIm, rotated, eta, generator, tables, usedJumps, evaluate };
}

interface Parts {
  readonly re: Float64Array;
  readonly im: Float64Array;
}

/** η = L†ρ in the eigenbasis of ρ: Σ_j e^{−ω_j/2}(2V_jρV_j* − V_j*V_jρ − ρV_j*V_j), blocks only. */
function flowInto(eta: Parts, model: MetricModel, rotated: readonly Parts[], lambda: Float64Array): void {
  const n = lambda.length;
  const { blockOf } = model.algebra;
  eta.re.fill(0);
  eta.im.fill(0);
  model.jumps.forEach((jump, j) => {
    const { re: vr, im: vi } = rotated[j];
    const weight = Math.exp(-jump.frequency / 2);
    for (let a = 0; a < n; a++) {
      for (let b = 0; b < n; b++) {
        if (blockOf[a] !== blockOf[b]) continue;
        let inRe = 0;
        let inIm = 0;
        let outRe = 0;
        let outIm = 0;
        for (let k = 0; k < n; k++) {
          const ak = a * n + k;
          const bk = b * n + k;
          inRe += lambda[k] * (vr[ak] * vr[bk] + vi[ak] * vi[bk]);
          inIm += lambda[k] * (vi[ak] * vr[bk] - vr[ak] * vi[bk]);
          const ka = k * n + a;
          const kb = k * n + b;
          outRe += vr[ka] * vr[kb] + vi[ka] * vi[kb];
          outIm += vr[ka] * vi[kb] - vi[ka] * vr[kb];
        }
        const sum = lambda[a] + lambda[b];
        eta.re[a * n + b] += weight * (2 * inRe - sum * outRe);
        eta.im[a * n + b] += weight * (2 * inIm - sum * outIm);
      }
    }
  });
}

/** curvature −= ½(G·L + (G·L)*), G the metric form and L the generator on matrix units. */
function subtractGeneratorPart(forms: readonly Float64Array[], generator: Parts, d: number): void {
  const [gr, gi, qr, qi] = forms;
  const { re: lr, im: li } = generator;
  for (let p = 0; p < d; p++) {
    for (let k = 0; k < d; k++) {
      const xr = 0.5 * gr[p * d + k];
      const xi = 0.5 * gi[p * d + k];
      if (xr === 0 && xi === 0) continue;
      for (let q = 0; q < d; q++) {
        const tr = xr * lr[k * d + q] - xi * li[k * d + q];
        const ti = xr * li[k * d + q] + xi * lr[k * d + q];
        qr[p * d + q] -= tr;
        qi[p * d + q] -= ti;
        qr[q * d + p] -= tr;
        qi[q * d + p] += ti;
      }
    }
  }
}
