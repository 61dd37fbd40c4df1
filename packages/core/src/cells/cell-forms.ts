import type { Interval } from '../checker/arithmetic/interval.js';
import type { Cell } from './cell.js';
import type { Jet } from './jet.js';

/**
 * q_ρ − K‖·‖²_ρ over the states of one cell, in a basis of the observables modulo the fixed points: upper triangles, row-major. A form
 * that is below it at every state does as well, for positivity is what is asked.
 */
export interface FormsOnCell {
  /** A matrix of intervals that contains, for every state of the cell, a form not above the one meant. */
  readonly below: readonly Interval[];
  /** The form, or one not above it, as functions on the cell. */
  readonly jets: readonly Jet[];
  /** The functions are the form itself. */
  readonly exact: boolean;
}

/** The form of a model over states that a box of parameters describes, boundary states as limits. */
export interface CellForms {
  /** Side of the matrices. */
  readonly side: number;
  /** The box of all parameters. */
  readonly root: Cell;
  /** The form for a rate K over a cell in the root. */
  readonly at: (cell: Cell, k: number) => FormsOnCell;
}
