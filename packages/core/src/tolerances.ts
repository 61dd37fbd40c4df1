/** Spacing of doubles at 1, 2⁻⁵²; every relative tolerance below is a multiple of it. */
export const EPSILON = 2 ** -52;
