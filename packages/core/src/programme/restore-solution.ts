import { innerProduct, zeros, type ComplexMatrix } from '../linalg/complex-matrix.js';
import { hermitianEigenvalues } from '../linalg/hermitian-eigen.js';
import { type ConicForm } from './conic-form.js';
import { type Ray } from './infeasibility.js';
import { type InteriorPointResult } from './interior-point.js';
import { type Programme } from './programme.js';
import { programmeDirection, sparseInnerProduct } from './programme-slack.js';
import { type DualInfeasibility, type PrimalInfeasibility, type ProgrammeSolution } from './programme-solution.js';

/** Undoes scaling, splitting and renumbering. `dependent` numbers unknowns of the programme. */
export function restoreSolution(
  programme: Programme,
  form: ConicForm,
  result: InteriorPointResult,
  dependent: readonly number[],
): ProgrammeSolution {
  const { measures } = result;
  const unit = form.objectiveNorm * form.constantNorm;
  return {
    status: result.status,
    reduced: result.reduced,
    y: restoreUnknowns(programme, form, result.y, form.constantNorm),
    x: restoreBlocks(programme, form, result.x, form.objectiveNorm),
    s: restoreBlocks(programme, form, result.s, form.constantNorm),
    primalObjective: measures.primalObjective * unit,
    dualObjective: measures.dualObjective * unit,
    gap: measures.gap,
    primalInfeasibility: measures.primalInfeasibility,
    dualInfeasibility: measures.dualInfeasibility,
    iterations: result.iterations,
    dependent,
    certificate: result.ray && restoreRay(programme, form, result.ray),
  };
}

function restoreUnknowns({ objective }: Programme, form: ConicForm, y: Float64Array, factor: number): Float64Array {
  const restored = new Float64Array(objective.length);
  form.unknowns.forEach((unknown, i) => (restored[unknown] = (y[i] * factor) / form.norms[i]));
  return restored;
}

function restoreBlocks({ blocks }: Programme, form: ConicForm, flat: Float64Array, factor: number): ComplexMatrix[] {
  const restored = blocks.map((block) => zeros(block.size));
  form.cones.forEach(({ block, size, complex, indices }, k) => {
    const { re, im, cols } = restored[block];
    const start = form.offsets[k];
    for (let p = 0; p < size; p++) {
      for (let q = 0; q < size; q++) {
        const target = indices[p] * cols + indices[q];
        re[target] = factor * flat[start + p * size + q];
        if (complex) im[target] = factor * flat[start + size * size + p * size + q];
      }
    }
  });
  const { linear, linearOffset } = form;
  for (let p = 0; p < linear.size; p++) {
    const { re, cols } = restored[linear.block[p]];
    re[linear.index[p] * (cols + 1)] = factor * flat[linearOffset + p];
  }
  return restored;
}

function restoreRay(programme: Programme, form: ConicForm, ray: Ray): PrimalInfeasibility | DualInfeasibility {
  if (ray.kind === 'dual') {
    // <C, X> = −1 in scaled units: divide by the norm of C.
    const x = restoreBlocks(programme, form, ray.x, 1 / form.constantNorm);
    return { kind: 'dual', x, residual: equationResidual(programme, x) };
  }
  const y = restoreUnknowns(programme, form, ray.y, 1 / form.objectiveNorm);
  return { kind: 'primal', y, margin: directionMargin(programme, y) };
}

/** Smallest eigenvalue of −Σ y_i A_{k,i} over the blocks, relative to the largest modulus; 0 if all vanish. */
function directionMargin(programme: Programme, y: Float64Array): number {
  let smallest = Infinity;
  let largest = 0;
  for (const direction of programmeDirection(programme, y)) {
    for (const value of hermitianEigenvalues(direction)) {
      smallest = Math.min(smallest, value);
      largest = Math.max(largest, Math.abs(value));
    }
  }
  return largest > 0 ? smallest / largest : 0;
}

/** Largest |Σ_k <A_{k,i}, X_k>| / (‖A_i‖ ‖X‖). */
function equationResidual({ objective, blocks }: Programme, x: readonly ComplexMatrix[]): number {
  const values = new Float64Array(objective.length);
  const squares = new Float64Array(objective.length);
  blocks.forEach(({ coefficients }, k) => {
    for (const { unknown, matrix } of coefficients) {
      values[unknown] += sparseInnerProduct(matrix, x[k]);
      for (let e = 0; e < matrix.re.length; e++) squares[unknown] += matrix.re[e] ** 2 + matrix.im[e] ** 2;
    }
  });
  let worst = 0;
  for (let i = 0; i < values.length; i++) {
    if (squares[i] > 0) worst = Math.max(worst, Math.abs(values[i]) / Math.sqrt(squares[i]));
  }
  return worst / Math.sqrt(x.reduce((sum, block) => sum + innerProduct(block, block).re, 0));
}
