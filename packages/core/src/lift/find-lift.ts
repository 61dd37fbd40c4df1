import type { Generator } from '../generator/generator.js';
import { solveProgramme } from '../programme/solve-programme.js';
import type { ProgrammeIterate } from '../programme/programme-options.js';
import type { ProgrammeStatus } from '../programme/programme-solution.js';
import type { CanonicalForm } from '../structure/canonical-form.js';
import { LIFT_BACK_OFF } from '../tolerances.js';
import { solveIntertwining } from './lift-constraints.js';
import { liftModel } from './lift-jumps.js';
import { type LiftUnknown, liftUnknowns } from './lift-orbits.js';
import { liftProgramme } from './lift-programme.js';
import { candidateUnitaries, diagonalCharges, jumpSymmetries } from './lift-symmetries.js';
import { type LiftAnsatz, type LiftTerm, liftTerms } from './lift-terms.js';

/** A lift found by the semidefinite programme, before it is checked. */
export interface FoundLift {
  readonly ansatz: LiftAnsatz;
  /** The optimum of the programme. */
  readonly optimum: number;
  /** K for which the coefficients below are offered, a little under the optimum. */
  readonly curvature: number;
  readonly coefficients: readonly { readonly term: LiftTerm; readonly re: number; readonly im: number }[];
  readonly status: ProgrammeStatus;
  /** Real unknowns of the programme, side of its form, symmetries used. */
  readonly unknowns: number;
  readonly side: number;
  readonly symmetries: number;
  readonly iterations: number;
}

export interface LiftOptions {
  readonly stop?: () => boolean;
  readonly onIterate?: (record: ProgrammeIterate) => void;
}

/**
 * The best lift of one ansatz for a GNS-symmetric generator: largest K with CGE(K) proved by it (§6). Null when the ansatz
 * has no lift at all or the programme is infeasible.
 */
export function findLift(
  g: Generator,
  canonical: CanonicalForm,
  ansatz: LiftAnsatz,
  options: LiftOptions = {},
): FoundLift | null {
  const model = liftModel(canonical);
  const symmetries = jumpSymmetries(model, candidateUnitaries(model));
  const terms = liftTerms(model, ansatz, diagonalCharges(model));
  const unknowns = liftUnknowns(model, terms, symmetries);
  const solutions = solveIntertwining(g, model, unknowns);
  if (!solutions) return null;
  const programme = liftProgramme(model, unknowns, solutions);
  const solution = solveProgramme(programme, options);
  if (solution.status !== 'optimal') return null;
  const free = solutions.directions.length;
  const x = Float64Array.from(solutions.origin);
  for (let d = 0; d < free; d++) for (let i = 0; i < x.length; i++) x[i] += solution.y[d] * solutions.directions[d][i];
  const optimum = solution.y[free];
  return {
    ansatz,
    optimum,
    curvature: optimum - LIFT_BACK_OFF * Math.max(1, Math.abs(optimum)),
    coefficients: coefficientsOf(unknowns, x),
    status: solution.status,
    unknowns: free + 1,
    side: programme.blocks[0].size,
    symmetries: symmetries.length,
    iterations: solution.iterations,
  };
}

function coefficientsOf(unknowns: readonly LiftUnknown[], x: Float64Array): FoundLift['coefficients'] {
  return unknowns.flatMap(({ terms }, k) => terms.map(({ term, re, im }) => ({ term, re: re * x[k], im: im * x[k] })));
}
