import { type ComplexMatrix, frobeniusNorm } from '../linalg/complex-matrix.js';
import { hermitianEigenvalues } from '../linalg/hermitian-eigen.js';
import { denseFromSparse } from '../linalg/sparse-matrix.js';
import { solveProgramme } from '../programme/solve-programme.js';
import type { ProgrammeIterate } from '../programme/programme-options.js';
import type { Programme } from '../programme/programme.js';
import type { CanonicalForm } from '../structure/canonical-form.js';
import { FORM_ROUNDING, LIFT_BACK_OFFS } from '../tolerances.js';
import { solveIntertwining } from './lift-constraints.js';
import type { LiftUnknown } from './lift-orbits.js';
import { liftProgramme } from './lift-programme.js';
import type { LiftAnsatz, LiftTerm } from './lift-terms.js';
import { type PreparedLift, prepareLift } from './prepare-lift.js';

/** A lift found by the semidefinite programme, before it is checked. */
export interface FoundLift {
  readonly ansatz: LiftAnsatz;
  /** The optimum of the programme. */
  readonly optimum: number;
  /** K for which the coefficients below are offered, a little under the optimum. */
  readonly curvature: number;
  /** Smallest eigenvalue of the left form at that K, assembled afresh. */
  readonly margin: number;
  /** Largest entry of ∂L − L̂∂, relative to ‖L‖. */
  readonly residual: number;
  readonly coefficients: readonly { readonly term: LiftTerm; readonly re: number; readonly im: number }[];
  /** Real unknowns of the programme, side of its form, symmetries used. */
  readonly unknowns: number;
  readonly side: number;
  readonly symmetries: number;
  readonly iterations: number;
}

export interface LiftOptions {
  /** An ansatz with more real unknowns than this is left out (null is returned). */
  readonly maxUnknowns: number;
  readonly stop?: () => boolean;
  readonly onIterate?: (record: ProgrammeIterate) => void;
}

/**
 * The best lift of one ansatz for a GNS-symmetric generator: largest K with CGE(K) proved by it (§6). Null when the ansatz
 * has no lift at all, is too large, or its programme ends without an optimum.
 */
export function findLift(canonical: CanonicalForm, ansatz: LiftAnsatz, options: LiftOptions): FoundLift | null {
  return solveLift(prepareLift(canonical, ansatz), options);
}

/** The same for an ansatz that is laid out already. */
export function solveLift(
  { ansatz, model, unknowns, symmetries }: PreparedLift,
  options: LiftOptions,
): FoundLift | null {
  if (unknowns.length > options.maxUnknowns || options.stop?.()) return null;
  const solutions = solveIntertwining(model, unknowns);
  if (!solutions) return null;
  const programme = liftProgramme(model, unknowns, solutions);
  const solution = solveProgramme(programme, options);
  if (solution.status !== 'optimal') return null;
  const free = solutions.directions.length;
  const x = Float64Array.from(solutions.origin);
  for (let d = 0; d < free; d++) for (let i = 0; i < x.length; i++) x[i] += solution.y[d] * solutions.directions[d][i];
  const optimum = solution.y[free];
  const offered = offeredCurvature(programme, solution.y, optimum);
  if (!offered) return null;
  return {
    ansatz,
    optimum,
    curvature: offered.curvature,
    margin: offered.margin,
    residual: solutions.residual,
    coefficients: coefficientsOf(unknowns, x),
    unknowns: free + 1,
    side: programme.blocks[0].size,
    symmetries,
    iterations: solution.iterations,
  };
}

/**
 * The K that is offered: below the optimum by the least of LIFT_BACK_OFFS at which the form, assembled afresh, has no
 * eigenvalue below −FORM_ROUNDING of its size; null when there is none.
 */
function offeredCurvature(
  programme: Programme,
  y: Float64Array,
  optimum: number,
): { curvature: number; margin: number } | null {
  const point = Float64Array.from(y);
  for (const backOff of LIFT_BACK_OFFS) {
    const curvature = optimum - backOff * Math.max(1, Math.abs(optimum));
    point[point.length - 1] = curvature;
    const form = formAt(programme, point);
    const margin = hermitianEigenvalues(form)[0];
    if (margin >= -FORM_ROUNDING * frobeniusNorm(form)) return { curvature, margin };
  }
  return null;
}

/** C − Σ y_iA_i, dense. */
function formAt({ blocks: [block] }: Programme, y: Float64Array): ComplexMatrix {
  const out = denseFromSparse(block.constant);
  for (const { unknown, matrix } of block.coefficients) {
    for (let i = 0; i < matrix.rows; i++) {
      for (let s = matrix.rowStart[i]; s < matrix.rowStart[i + 1]; s++) {
        out.re[i * matrix.cols + matrix.colIndex[s]] -= y[unknown] * matrix.re[s];
        out.im[i * matrix.cols + matrix.colIndex[s]] -= y[unknown] * matrix.im[s];
      }
    }
  }
  return out;
}

function coefficientsOf(unknowns: readonly LiftUnknown[], x: Float64Array): FoundLift['coefficients'] {
  return unknowns.flatMap(({ terms }, k) => terms.map(({ term, re, im }) => ({ term, re: re * x[k], im: im * x[k] })));
}
