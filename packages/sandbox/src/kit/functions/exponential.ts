import { scaled } from './words.js';

const LN2_HIGH = 6.9314718036912381649e-1;
const LN2_LOW = 1.90821492927058770002e-10;
const INVERSE_LN2 = 1.442695040888963387;
const OVERFLOW = 7.09782712893383973096e2;
const UNDERFLOW = -7.4513321910194110842e2;

/** Remez coefficients of x coth(x/2) on [0, ln2/2]. */
const P = [
  1.66666666666666019037e-1, -2.77777777770155933842e-3, 6.61375632143793436117e-5, -1.6533902205465251539e-6,
  4.13813679705723846039e-8,
] as const;

/** Coefficients of the rational part of expm1 on the same interval. */
const Q = [
  -3.33333333333331316428e-2, 1.58730158725481460165e-3, -7.93650757867487942473e-5, 4.00821782732936239552e-6,
  -2.01099218183624371326e-7,
] as const;

/**
 * e^x after reduction to |r| ≤ ln2/2 and a rational approximation there: the published algorithm of fdlibm's e_exp.c (Sun Microsystems 1993), its last
 * sum compensated.
 */
export function exp(x: number): number {
  if (Number.isNaN(x)) return x;
  if (x > OVERFLOW) return Infinity;
  if (x < UNDERFLOW) return 0;
  if (Math.abs(x) < 3.725290298461914e-9) return 1 + x;
  const k = Math.abs(x) > LN2_HIGH / 2 ? Math.trunc(INVERSE_LN2 * x + (x < 0 ? -0.5 : 0.5)) : 0;
  const high = x - k * LN2_HIGH;
  const low = k * LN2_LOW;
  const r = high - low;
  const t = r * r;
  const c = r - t * (P[0] + t * (P[1] + t * (P[2] + t * (P[3] + t * P[4]))));
  const one = 1 + high;
  const lost = high - (one - 1);
  return scaled(one + (lost + ((r * c) / (2 - c) - low)), k);
}

/** e^x − 1 without cancellation near 0 (fdlibm's s_expm1.c). */
export function expm1(x: number): number {
  if (Number.isNaN(x) || x > OVERFLOW) return x > 0 ? Infinity : x;
  if (x < -40) return -1;
  if (Math.abs(x) < 5.551115123125783e-17) return x;
  const k = Math.abs(x) > LN2_HIGH / 2 ? Math.trunc(INVERSE_LN2 * x + (x < 0 ? -0.5 : 0.5)) : 0;
  const high = x - k * LN2_HIGH;
  const low = k * LN2_LOW;
  const r = high - low;
  const rest = high - r - low;
  const half = 0.5 * r;
  const square = r * half;
  const r1 = 1 + square * (Q[0] + square * (Q[1] + square * (Q[2] + square * (Q[3] + square * Q[4]))));
  const t = 3 - r1 * half;
  const e = square * ((r1 - t) / (6 - r * t));
  if (k === 0) return r - (r * e - square);
  return assemble(r, r * (e - rest) - rest - square, k);
}

/** 2^k (1 + (r − e)) − 1, each case by the order that loses nothing. */
function assemble(r: number, e: number, k: number): number {
  if (k === -1) return 0.5 * (r - e) - 0.5;
  if (k === 1) return r < -0.25 ? -2 * (e - (r + 0.5)) : 1 + 2 * (r - e);
  if (k <= -2 || k > 56) return scaled(1 - (e - r), k) - 1;
  const t = scaled(1, -k);
  return scaled(k < 20 ? 1 - t - (e - r) : r - (e + t) + 1, k);
}
