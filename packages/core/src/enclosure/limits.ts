/** Dimension of the algebra up to which ends are enclosed; above it eigenvalues stay certified and searches observed. */
export const ENCLOSURE_DIMENSION = 36;

/** Side N·k of a state with an ancilla up to which its quotient is enclosed; a diagonal one may have ENCLOSURE_DIMENSION. */
export const ENCLOSURE_SIDE = 16;

/**
 * Radius of the box, relative to ‖V_j‖, to 1 + |ω_j|, to the eigenvalues of σ and to the jumps as given; the same residual, relative
 * to ‖L‖, is the largest at which the doubles of a model count as the rounding of its canonical form.
 */
export const BOX_RADIUS = 2 ** -47;

/** An enclosure wider than this, relative to its ends, is not used: the rounded value says more. */
export const ENCLOSURE_WIDTH = 1e-8;

/** Steps below an eigenvalue tried in turn until positivity is proved: the first, relative to the forms, and their ratio. */
export const FIRST_STEP = 2 ** -50;
export const STEP_RATIO = 4;
export const STEPS = 12;

/** A larger step than this is worth a proof in exact arithmetic. */
export const FINE_STEP = 2 ** -38;

/** Largest connected block of a form that is decided in exact arithmetic, and most bits that its jumps may take as integers. */
export const EXACT_BLOCK = 24;
export const EXACT_BITS = 200;
