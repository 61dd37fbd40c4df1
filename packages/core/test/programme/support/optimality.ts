import { frobeniusNorm, innerProduct, multiply, type ComplexMatrix } from '../../../src/linalg/complex-matrix.js';
import { hermitianEigenvalues } from '../../../src/linalg/hermitian-eigen.js';
import { denseFromSparse } from '../../../src/linalg/sparse-matrix.js';
import { type Programme } from '../../../src/programme/programme.js';
import { type ProgrammeSolution } from '../../../src/programme/programme-solution.js';
import { expectBelow } from '../../linalg/support/expect-close.js';

/** The conditions of optimality, each relative to the size of what enters it; all are 0 for an exact solution. */
interface OptimalityResiduals {
  /** max_i |<A_i, X> − b_i| / (|b_i| + ‖A_i‖‖X‖). */
  readonly primal: number;
  /** ‖C − Σ y_i A_i − S‖ / (‖C‖ + Σ |y_i| ‖A_i‖). */
  readonly dual: number;
  /** −λ_min / λ_max of X and S, 0 if positive. */
  readonly positivity: number;
  /** ‖X S‖ / (1 + ‖X‖ (‖C‖ + Σ |y_i| ‖A_i‖)). */
  readonly complementarity: number;
  /** |<C, X> − b·y| / (1 + …), with the objectives evaluated afresh. */
  readonly gap: number;
  /** How far the reported objectives are from <C, X> and b·y, relative likewise. */
  readonly objectives: number;
}

/** Evaluated from the programme itself by plain dense formulas, sharing nothing with the solver but matrix storage. */
function optimalityResiduals(programme: Programme, solution: ProgrammeSolution): OptimalityResiduals {
  const { objective, blocks } = programme;
  const values = new Float64Array(objective.length);
  const norms = new Float64Array(objective.length);
  const slack = blocks.map(({ constant }) => denseFromSparse(constant));
  let size = norm(slack);
  blocks.forEach(({ coefficients }, k) => {
    for (const { unknown, matrix } of coefficients) {
      const a = denseFromSparse(matrix);
      values[unknown] += innerProduct(a, solution.x[k]).re;
      norms[unknown] = Math.hypot(norms[unknown], frobeniusNorm(a));
      for (let q = 0; q < a.re.length; q++) {
        slack[k].re[q] -= solution.y[unknown] * a.re[q];
        slack[k].im[q] -= solution.y[unknown] * a.im[q];
      }
    }
  });
  norms.forEach((value, i) => (size += value * Math.abs(solution.y[i])));
  const primalSize = norm(solution.x);
  const primal = Array.from(values, (value, i) => {
    const scale = Math.abs(objective[i]) + norms[i] * primalSize;
    return scale > 0 ? Math.abs(value - objective[i]) / scale : 0;
  });
  const products = solution.x.map((x, k) => multiply(x, solution.s[k]));
  const primalValue = blocks.reduce(
    (sum, b, k) => sum + innerProduct(denseFromSparse(b.constant), solution.x[k]).re,
    0,
  );
  const dualValue = solution.y.reduce((sum, value, i) => sum + value * objective[i], 0);
  const scale = 1 + Math.abs(primalValue) + Math.abs(dualValue);
  return {
    primal: Math.max(0, ...primal),
    dual: norm(slack.map((a, k) => difference(a, solution.s[k]))) / Math.max(size, Number.MIN_VALUE),
    positivity: Math.max(negativity(solution.x), negativity(solution.s)),
    complementarity: norm(products) / (1 + primalSize * size),
    gap: Math.abs(primalValue - dualValue) / scale,
    objectives:
      Math.max(Math.abs(primalValue - solution.primalObjective), Math.abs(dualValue - solution.dualObjective)) / scale,
  };
}

/** Asserts that all conditions hold to `tolerance`, the positivity to rounding. */
export function expectOptimal(
  programme: Programme,
  solution: ProgrammeSolution,
  tolerance: number,
  what: string,
): void {
  const residuals = optimalityResiduals(programme, solution);
  for (const name of ['primal', 'dual', 'gap', 'objectives'] as const) {
    expectBelow(residuals[name], tolerance, `${what}: ${name}`);
  }
  // X S is of size √gap where both share a direction without strict complementarity.
  expectBelow(residuals.complementarity, Math.sqrt(tolerance), `${what}: complementarity`);
  expectBelow(residuals.positivity, 1e-13, `${what}: negative part of X or S`);
}

function norm(list: readonly ComplexMatrix[]): number {
  return Math.hypot(0, ...list.map((a) => frobeniusNorm(a)));
}

function difference(a: ComplexMatrix, b: ComplexMatrix): ComplexMatrix {
  return { ...a, re: a.re.map((x, k) => x - b.re[k]), im: a.im.map((x, k) => x - b.im[k]) };
}

function negativity(list: readonly ComplexMatrix[]): number {
  const values = list.flatMap((a) => Array.from(hermitianEigenvalues(a)));
  const largest = Math.max(Number.MIN_VALUE, ...values.map(Math.abs));
  return Math.max(0, -Math.min(0, ...values) / largest);
}
