/** Relative to the larger of the two values: how far a tabulated bath spectrum may be from g(−w) = e^{−beta w} g(w). */
export const SPECTRUM_BALANCE_TOLERANCE = 1e-9;

/** Relative to the largest frequency of the table: how near a Bohr frequency must be to a tabulated one. */
export const SPECTRUM_FREQUENCY_TOLERANCE = 1e-9;
