/** Products with modulus in (x, y), and factors below z, have a rounding error that is a double and Dekker's product finds it. */
export const EXACT_PRODUCT_FLOOR = 1e-285;
export const EXACT_PRODUCT_CEILING = 1e300;
export const EXACT_FACTOR_CEILING = 1e290;

/** Terms of Σ t^{2k}/(2k+3) summed for |t| ≤ 0.172; the rest stays below 2^-60. */
export const ARTANH_TERMS = 12;

/** |t| up to which the series of artanh is used directly. */
export const ARTANH_RANGE = 0.172;

/** Terms of (e^z−1−z)/z² = Σ z^k/(k+2)! summed for |z| ≤ 1/2; the rest stays below 2^-60. */
export const EXP_TERMS = 16;

/** Terms of the series of divided differences of exp, arguments within 1 of each other; the rest stays below 2^-60. */
export const DIVIDED_DIFFERENCE_TERMS = 18;

/** Spread of log-arguments up to which divided differences of exp are summed as a series. */
export const DIVIDED_DIFFERENCE_RANGE = 1;

/** Digits of a numerator or denominator at most: more are refused before they are read as a number. */
export const RATIONAL_DIGITS = 20_000;

/** Diagonals outside [1/x, x] are rescaled by a power of two before a verified Cholesky factorisation. */
export const CHOLESKY_SAFE_RANGE = 1e150;

/** Factor on the a-priori error of the floating-point Cholesky factorisation that covers underflow in the range above. */
export const CHOLESKY_INFLATION = 1.01;

/** Factorisations tried at most while looking for a shift near the smallest eigenvalue. */
export const SHIFT_ATTEMPTS = 60;

/** A shift is accepted within this multiple of n·2^-53·trace of the smallest eigenvalue. */
export const SHIFT_SLACK = 1;

/** Inverse iterations with one factorisation. */
export const INVERSE_ITERATIONS = 6;

/** Sweeps of Jacobi rotations at most; below twelve are typical. */
export const JACOBI_SWEEP_LIMIT = 60;

/** Steps of the power iteration that finds weights for the norm of a non-negative matrix. */
export const NORM_ITERATIONS = 6;

/** Bits after the binary point where a model is rotated into the frame of a state: eigenvalues of 1e-26 then still resolve. */
export const FIXED_BITS = 256;

/** Newton–Schulz steps towards a unitary matrix at most; from rounding errors three are enough. */
export const POLAR_STEPS = 12;

/** ‖u*u − 1‖ above which a frame does not count as nearly unitary. */
export const UNITARITY_LIMIT = 0.25;

/** Terms of the series of a divided difference of exp over any number of arguments up to five, within 1 of each other. */
export const EXP_DIFFERENCE_TERMS = 19;
