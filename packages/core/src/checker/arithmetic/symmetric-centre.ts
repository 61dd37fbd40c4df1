import { binaryParts, powerOfTwo } from './binary-parts.js';
import { midpointRadius } from './midpoint-radius.js';
import { modulusUp, nonNegativeNormBound } from './norm-bound.js';
import { subDown } from './rounding.js';
import type { SymmetricEmbedding } from './symmetric-embedding.js';

/** A symmetric midpoint and how far the members of an interval matrix are from it, scaled to entries near one. */
export interface SymmetricCentre {
  /** Row-major n×n. */
  readonly mid: Float64Array;
  readonly n: number;
  /** Bound of ‖A·scale − mid‖₂ for every member A. */
  readonly radius: number;
  /** The power of two by which everything has been multiplied. */
  readonly scale: number;
}

/** Midpoint and norm of the radius of an embedded interval matrix; null when it is unbounded. */
export function symmetricCentre({ matrix, copies }: SymmetricEmbedding): SymmetricCentre | null {
  const n = matrix.rows;
  let top = 0;
  for (let k = 0; k < n * n; k++) top = Math.max(top, -matrix.lo[k], matrix.hi[k]);
  if (!(top < Infinity)) return null;
  const exponent = top > 0 ? Math.max(-1000, Math.min(1000, -binaryParts(top).exponent)) : 0;
  const scale = powerOfTwo(exponent);
  const { mid, rad } = midpointRadius({
    ...matrix,
    lo: matrix.lo.map((x) => scaledDown(x, scale)),
    hi: matrix.hi.map((x) => 0 - scaledDown(-x, scale)),
  });
  return { mid, n, radius: rad ? radiusNorm(rad, n, copies) : 0, scale };
}

/** x/scale rounded down. */
export function unscaledDown(x: number, scale: number): number {
  return exactOrLower(x, x / scale);
}

/** x·scale rounded down. */
function scaledDown(x: number, scale: number): number {
  return exactOrLower(x, x * scale);
}

/** Scaling by a power of two is exact but for results in the subnormal range. */
function exactOrLower(x: number, y: number): number {
  return x === 0 || Math.abs(y) > NORMAL_FLOOR ? y : subDown(y, Number.MIN_VALUE);
}

const NORMAL_FLOOR = 1e-300;

/** Norm of the radii: of those of the moduli where the matrix stands for a complex one. */
function radiusNorm(rad: Float64Array, n: number, copies: 1 | 2): number {
  if (copies === 1) return nonNegativeNormBound(rad, n);
  const half = n / 2;
  const moduli = new Float64Array(half * half);
  for (let i = 0; i < half; i++) {
    for (let j = 0; j < half; j++) {
      const top = Math.max(rad[(half + i) * n + j], rad[(half + j) * n + i]);
      moduli[i * half + j] = modulusUp(rad[i * n + j], top);
    }
  }
  return nonNegativeNormBound(moduli, half);
}
