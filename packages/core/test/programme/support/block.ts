import { fromRows } from '../../../src/linalg/complex-matrix.js';
import { sparseFromDense, sparseFromTriplets } from '../../../src/linalg/sparse-matrix.js';
import { type ProgrammeBlock } from '../../../src/programme/programme.js';

type Rows = readonly (readonly number[])[];

/** A real symmetric block from plain rows: the constant, then the coefficients of unknowns 0, 1, … */
export function symmetricBlock(constant: Rows, ...coefficients: readonly Rows[]): ProgrammeBlock {
  return {
    kind: 'symmetric',
    size: constant.length,
    constant: sparseFromDense(fromRows(constant)),
    coefficients: coefficients.map((rows, unknown) => ({ unknown, matrix: sparseFromDense(fromRows(rows)) })),
  };
}

/** Inequalities constant_p ≥ Σ_i y_i coefficients[i][p]. */
export function diagonalBlock(
  constant: readonly number[],
  ...coefficients: readonly (readonly number[])[]
): ProgrammeBlock {
  const size = constant.length;
  const diagonal = (values: readonly number[]): ProgrammeBlock['constant'] =>
    sparseFromTriplets(
      size,
      size,
      values.map((value, p) => [p, p, value, 0] as const),
    );
  return {
    kind: 'diagonal',
    size,
    constant: diagonal(constant),
    coefficients: coefficients.map((values, unknown) => ({ unknown, matrix: diagonal(values) })),
  };
}

/** The matrix with ones at (i, j) and (j, i). */
export function unit(n: number, i: number, j: number = i): number[][] {
  return Array.from({ length: n }, (_, r) =>
    Array.from({ length: n }, (__, s) => Number((r === i && s === j) || (r === j && s === i))),
  );
}
