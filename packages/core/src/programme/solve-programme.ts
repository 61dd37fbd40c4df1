import { checkProgramme } from './check-programme.js';
import { conicForm } from './conic-form.js';
import { dependentCoefficients } from './dependent-coefficients.js';
import { interiorPoint, type InteriorPointResult } from './interior-point.js';
import { type Programme } from './programme.js';
import { resolveOptions, type ProgrammeOptions } from './programme-options.js';
import { type ProgrammeSolution } from './programme-solution.js';
import { restoreSolution } from './restore-solution.js';

/**
 * Solves a pair of semidefinite programmes. Throws `dimension-mismatch`, `not-finite`, `not-hermitian` or `usage` for a
 * malformed programme; how the solution ended is its `status`.
 */
export function solveProgramme(programme: Programme, options: ProgrammeOptions = {}): ProgrammeSolution {
  checkProgramme(programme);
  const all = Int32Array.from({ length: programme.objective.length }, (_, i) => i);
  let form = conicForm(programme, all);
  let analysis = dependentCoefficients(form);
  const { dependent, ray } = analysis;
  if (ray) return restoreSolution(programme, form, contradiction(ray, form.length), dependent);
  if (dependent.length > 0) {
    const drop = new Set(dependent);
    form = conicForm(
      programme,
      all.filter((i) => !drop.has(i)),
    );
    analysis = dependentCoefficients(form);
  }
  const result = interiorPoint(form, analysis.gramFactor, resolveOptions(options));
  return restoreSolution(programme, form, result, dependent);
}

/** The objective contradicts a linear dependence of coefficients: infeasible without any iteration. */
function contradiction(y: Float64Array, length: number): InteriorPointResult {
  return {
    status: 'primal-infeasible',
    reduced: false,
    x: new Float64Array(length),
    y: new Float64Array(y.length),
    s: new Float64Array(length),
    measures: {
      primalObjective: 0,
      dualObjective: 0,
      complementarity: 0,
      gap: Infinity,
      primalInfeasibility: Infinity,
      dualInfeasibility: Infinity,
      worst: Infinity,
    },
    iterations: 0,
    ray: { kind: 'primal', y },
  };
}
