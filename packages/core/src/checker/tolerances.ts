/*
 * Scales of the certificate checker. Residuals are relative: to ‖L‖ = max ‖L(e)‖_F over matrix units e, and to the norm of the
 * jump they speak about.
 */

/** Largest residual of a certificate in floating point: of the state, the jumps, L put together from them, and ∂L − L̂∂. */
export const RESIDUAL_LIMIT = 1e-9;

/** What a residual of relative size ε costs: the bound is lowered by this many ε‖L‖. */
export const RESIDUAL_WEIGHT = 10;

/** Largest loss in K, relative to the larger of ‖L‖ and |K|, that rounding in a form may cost; a worse form is refused. */
export const FORM_LOSS_LIMIT = 1e-11;

/** The same, a factor on n²·2⁻⁵³ for the larger forms of side n, where the factorisation itself loses more. */
export const FORM_LOSS_GROWTH = 8;

/** Residual at which the doubles of a model count as the rounding of rational jumps: 2⁻⁴⁵, a few hundred roundings. */
export const MODEL_ROUNDING = 2 ** -45;

/** Rates, ratios and products of them outside [1/x, x] are refused before they can overflow. */
export const SCALE_LIMIT = 1e60;
