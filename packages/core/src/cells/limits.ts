/** Distance below the best witness, in the rates at hand, at which a proof of `ge` is tried first, and the cells it may take. */
export const FIRST_WIDTH = 1e-2;
export const FIRST_SHARE = 0.5;

/** What is tried when that fails. */
export const COARSE_WIDTH = 1e-1;

/** What is tried when it succeeds. */
export const SECOND_WIDTH = 1e-3;

/** The distance that closes a bracket and stands for a value of weaker grade: tried where the second took few cells more. */
export const CLOSING_WIDTH = 2e-9;
export const CLOSING_GROWTH = 2.6;

/** Cells of states examined at most for one lower end of `ge`. */
export const CELL_BUDGET = 5000;

/** Points of a chain up to which its states are covered by cells. */
export const CELL_CHAIN_POINTS = 3;

/** Log-ratios of eigenvalues beyond which no cell is cut any more. */
export const FARTHEST = 500;

/** Relative width given to a rate that a jump holds as a square root: a few roundings of 2^-53. */
export const RATE_ROOM = 2 ** -48;

/** Relative room for the rounding of a canonical form. */
export const AXIS_ROOM = 2 ** -44;

/** Eigenvalues of a Kossakowski matrix within this of each other, relative to its trace, are taken together. */
export const NEAR_AXES = 1e-7;
