import { type MeanTable, emptyMeanTable, fillMeanTable } from './mean-table.js';
import type { MetricModel } from './metric-model.js';
import type { OperatorMean } from './operator-mean.js';
import { addJumpForms, addJumpTensor, addPairedTensor, flowFromTensor, generatorFromTensor } from './jump-forms.js';
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
  const rotated = model.jumps.map(() => parts(n * n));
  const [eta, square] = [parts(n * n), parts(n * n)];
  const [generator, sandwich] = [parts(d * d), parts(d * d)];
  const scratch = new Float64Array(Math.max(2 * n * n, 2 * d));
  const usedJumps = model.jumps.flatMap((jump, index) => {
    const weight = paired ? jump.pairWeight : 1;
    return weight > 0 ? [{ index, weight, group: jump.group }] : [];
  });
  // A frequency whose jumps are all partners left out has nothing to add.
  const tensors = model.frequencies.map((_, k) => (usedJumps.some(({ group }) => group === k) ? parts(d * d) : null));
  const forms = [0, 1, 2, 3].map(() => new Float64Array(d * d));
  const [metricRe, metricIm, curvatureRe, curvatureIm] = forms;

  function evaluate(lambda: Float64Array, u: ComplexMatrix | null): void {
    for (const form of forms) form.fill(0);
    clear(sandwich);
    for (const tensor of tensors) if (tensor) clear(tensor);
    for (const { index, weight, group } of usedJumps) {
      rotateInto(rotated[index], model.jumps[index].matrix, u, n, scratch);
      addJumpTensor(tensors[group] as Parts, units, rotated[index], weight);
    }
    tensors.forEach((tensor, k) => {
      if (tensor) addPairedTensor(sandwich, units, tensor, model.frequencies[k]);
    });
    generatorFromTensor(generator, square, units, sandwich);
    flowFromTensor(eta, units, sandwich, square, lambda);
    tensors.forEach((tensor, k) => {
      if (!tensor) return;
      fillMeanTable(tables[k], mean, lambda, model.frequencies[k]);
      addJumpForms(forms, units, tensor, tables[k], eta, scratch);
    });
    subtractGeneratorPart(forms, generator, d, scratch);
  }
  return { units, metricRe, metricIm, curvatureRe, curvatureIm, rotated, eta, generator, tables, usedJumps, evaluate };
}

interface Parts {
  readonly re: Float64Array;
  readonly im: Float64Array;
}

function parts(length: number): Parts {
  return { re: new Float64Array(length), im: new Float64Array(length) };
}

function clear({ re, im }: Parts): void {
  re.fill(0);
  im.fill(0);
}

/** curvature −= ½(G·L + (G·L)*), G the metric form and L the generator on matrix units; work holds 2D numbers. */
function subtractGeneratorPart(
  [gr, gi, qr, qi]: readonly Float64Array[],
  { re: lr, im: li }: Parts,
  d: number,
  work: Float64Array,
): void {
  for (let p = 0; p < d; p++) {
    work.fill(0);
    for (let k = 0; k < d; k++) {
      const xr = 0.5 * gr[p * d + k];
      const xi = 0.5 * gi[p * d + k];
      if (xr === 0 && xi === 0) continue;
      for (let q = 0, at = k * d; q < d; q++, at++) {
        work[q] += xr * lr[at] - xi * li[at];
        work[d + q] += xr * li[at] + xi * lr[at];
      }
    }
    for (let q = 0; q < d; q++) {
      qr[p * d + q] -= work[q];
      qi[p * d + q] -= work[d + q];
      qr[q * d + p] -= work[q];
      qi[q * d + p] += work[d + q];
    }
  }
}
