import { frobeniusNorm, type ComplexMatrix } from '../linalg/complex-matrix.js';
import { hermitianEigenvalues } from '../linalg/hermitian-eigen.js';
import { denseFromSparse, sparseFromTriplets, type SparseMatrix } from '../linalg/sparse-matrix.js';
import { PROGRAMME_FINEST } from '../tolerances.js';
import { programmeSlack } from './programme-slack.js';
import { type Programme } from './programme.js';
import { type ProgrammeOptions } from './programme-options.js';
import { type ProgrammeSolution, type ProgrammeStatus } from './programme-solution.js';
import { solveProgramme } from './solve-programme.js';

/** A y inside the feasible set. */
export interface FeasiblePoint {
  readonly y: Float64Array;
  /** b·y. */
  readonly objective: number;
  /**
   * Smallest eigenvalue over the blocks of C − Σ y_i A_i, computed afresh; not positive where no better point was found.
   * +∞ without blocks.
   */
  readonly margin: number;
  /** How the search for it ended: `optimal` when no other y with this objective value has a larger margin. */
  readonly status: ProgrammeStatus;
  readonly iterations: number;
}

/**
 * The y deepest inside: maximises t subject to C_k − Σ y_i A_{k,i} ⪰ t · 1 for every block, b·y ≥ objectiveValue and
 * t ≤ the largest norm of a C_k (1 if all vanish). Errors as `solveProgramme`.
 */
export function deepestFeasible(
  programme: Programme,
  objectiveValue: number,
  options: ProgrammeOptions = {},
): FeasiblePoint {
  const unknowns = programme.objective.length;
  const solution = solveProgramme(marginProgramme(programme, objectiveValue), {
    ...options,
    tolerance: options.tolerance ?? PROGRAMME_FINEST,
  });
  const y = solution.y.slice(0, unknowns);
  return {
    y,
    objective: y.reduce((sum, value, i) => sum + value * programme.objective[i], 0),
    margin: smallestEigenvalue(programmeSlack(programme, y)),
    status: solution.status,
    iterations: solution.iterations,
  };
}

export interface BackOffOptions extends ProgrammeOptions {
  /** How far below its optimum the objective may fall, in its own units; positive. */
  readonly backOff: number;
}

/** The solution of a programme and, if it is `optimal`, the deepest point whose objective is within `backOff` of it. */
export function strictlyFeasible(
  programme: Programme,
  { backOff, ...options }: BackOffOptions,
): { readonly solution: ProgrammeSolution; readonly point: FeasiblePoint | null } {
  const solution = solveProgramme(programme, options);
  if (solution.status !== 'optimal') return { solution, point: null };
  return { solution, point: deepestFeasible(programme, solution.dualObjective - backOff, options) };
}

function marginProgramme({ objective, blocks }: Programme, objectiveValue: number): Programme {
  const depth = objective.length;
  const norm = blocks.reduce((top, block) => Math.max(top, frobeniusNorm(denseFromSparse(block.constant))), 0);
  const entry = (row: number, value: number): SparseMatrix => sparseFromTriplets(2, 2, [[row, row, value, 0]]);
  const rows = Array.from(objective, (value, unknown) => ({ unknown, matrix: entry(0, -value) }));
  return {
    objective: [...new Float64Array(depth), 1],
    blocks: [
      ...blocks.map((block) => ({
        ...block,
        coefficients: [...block.coefficients, { unknown: depth, matrix: sparseIdentity(block.size) }],
      })),
      {
        kind: 'diagonal',
        size: 2,
        constant: sparseFromTriplets(2, 2, [
          [0, 0, -objectiveValue, 0],
          [1, 1, norm > 0 ? norm : 1, 0],
        ]),
        coefficients: [...rows, { unknown: depth, matrix: entry(1, 1) }],
      },
    ],
  };
}

function sparseIdentity(n: number): SparseMatrix {
  return sparseFromTriplets(
    n,
    n,
    Array.from({ length: n }, (_, i) => [i, i, 1, 0] as const),
  );
}

function smallestEigenvalue(matrices: readonly ComplexMatrix[]): number {
  return matrices.reduce((least, a) => (a.rows > 0 ? Math.min(least, hermitianEigenvalues(a)[0]) : least), Infinity);
}
