/** Spacing of doubles at 1, 2⁻⁵²; every relative tolerance below is a multiple of it. */
export const EPSILON = 2 ** -52;

/** |t| below which artanh(t)/t is summed as a series of ten terms; t^20 then stays below 1e-20. */
export const SERIES_ARTANH = 0.1;

/** |z| below which (e^z−1−z)/z² is summed as a series of seventeen terms; the rest stays below 1e-16. */
export const SERIES_PHI = 0.8;

/** |x1−x2|/(x1+x2) below which a divided difference is taken as the quadrature of a slope; six points then err below 1e-15. */
export const CLOSE_ARGUMENTS = 0.05;

/** Frequencies closer than this, relative to 1+|ω|, are one frequency. */
export const FREQUENCY_TOLERANCE = 1e-9;

/** Sufficient decrease of a line search, as a fraction of the slope at its start. */
export const WOLFE_DECREASE = 1e-4;

/** A line search ends where the slope has risen to this fraction of the slope at its start. */
export const WOLFE_CURVATURE = 0.5;

/** Evaluations of one line search at most; 2^-60 of the first step is below rounding. */
export const WOLFE_BISECTIONS = 60;
