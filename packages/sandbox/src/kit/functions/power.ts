import { scaled, highWord, truncated, withHighWord } from './words.js';

const BREAKS = [1, 1.5] as const;
/** log2(1.5) in two parts. */
const LOG2_BREAKS = [
  [0, 0],
  [5.84962487220764160156e-1, 1.35003920212974897128e-8],
] as const;

/** Coefficients of the logarithm, (3/2)(log(1+s) − log(1−s) − 2s − (2/3)s³) in s². */
const L = [
  5.99999999999994648725e-1, 4.28571428578550184252e-1, 3.33333329818377432918e-1, 2.72728123808534006489e-1,
  2.30660745775561754067e-1, 2.06975017800338417784e-1,
] as const;

const P = [
  1.66666666666666019037e-1, -2.77777777770155933842e-3, 6.61375632143793436117e-5, -1.6533902205465251539e-6,
  4.13813679705723846039e-8,
] as const;

const LN2 = [6.93147182464599609375e-1, -1.90465429995776804525e-9, 6.93147180559945286227e-1] as const;
/** 2/(3 ln 2). */
const CP = [9.61796700954437255859e-1, -7.02846165095275826516e-9, 9.61796693925975554329e-1] as const;

/**
 * x^y for x ≥ 0, and for x < 0 with whole y (fdlibm's e_pow.c, Sun Microsystems 1993, the last sum
 * compensated): log2 of x in two doubles, times y, then 2 to that power.
 * 1 for y = 0. Throws for other x < 0 and for NaN.
 */
export function pow(x: number, y: number): number {
  if (Number.isNaN(x) || Number.isNaN(y)) throw new RangeError(`expected pow of two numbers, got ${x} and ${y}`);
  if (x < 0 && !Number.isInteger(y)) throw new RangeError(`expected pow of x ≥ 0 or a whole y, got ${x} and ${y}`);
  const sign = x < 0 && y % 2 !== 0 ? -1 : 1;
  return sign * positivePower(Math.abs(x), y);
}

function positivePower(x: number, y: number): number {
  if (x === 1 || !(Math.abs(y) > 0)) return 1;
  if (!(x > 0) || x === Infinity || Math.abs(y) === Infinity) {
    const grows = x > 1 === y > 0;
    return grows ? Infinity : 0;
  }
  const [high, low] = log2InTwo(x);
  const yHigh = truncated(y);
  const small = (y - yHigh) * high + y * low;
  const large = yHigh * high;
  const z = small + large;
  if (z > 1100) return Infinity;
  if (z < -1100) return 0;
  return powerOfTwo(large, small);
}

/** log2 x = high + low. */
function log2InTwo(x: number): [number, number] {
  const subnormal = x < 2.2250738585072014e-308;
  const ax = subnormal ? x * 9007199254740992 : x;
  const fraction = highWord(ax) & 0xfffff;
  const k = fraction <= 0x3988e ? 0 : fraction < 0xbb67a ? 1 : 0;
  const up = fraction >= 0xbb67a ? 1 : 0;
  const n = (subnormal ? -53 : 0) + (highWord(ax) >> 20) - 0x3ff + up;
  const a = withHighWord(ax, fraction | (up ? 0x3fe00000 : 0x3ff00000));
  const [ssHigh, ssLow] = sOf(a, BREAKS[k]);
  const ss = ssHigh + ssLow;
  const s2 = ss * ss;
  const tail =
    s2 * s2 * (L[0] + s2 * (L[1] + s2 * (L[2] + s2 * (L[3] + s2 * (L[4] + s2 * L[5]))))) + ssLow * (ssHigh + ss);
  const square = ssHigh * ssHigh;
  const tHigh = truncated(3 + square + tail);
  const tLow = tail - (tHigh - 3 - square);
  const u = ssHigh * tHigh;
  const v = ssLow * tHigh + tLow * ss;
  const pHigh = truncated(u + v);
  const pLow = v - (pHigh - u);
  const zHigh = CP[0] * pHigh;
  const zLow = CP[1] * pHigh + pLow * CP[2] + LOG2_BREAKS[k][1];
  const sum = truncated(zHigh + zLow + LOG2_BREAKS[k][0] + n);
  return [sum, zLow - (sum - n - LOG2_BREAKS[k][0] - zHigh)];
}

/** (a − b)/(a + b) in two parts, the first with its lower half cleared. */
function sOf(a: number, b: number): [number, number] {
  const u = a - b;
  const v = 1 / (a + b);
  const ss = u * v;
  const sHigh = truncated(ss);
  const tHigh = truncated(a + b);
  const tLow = a - (tHigh - b);
  return [sHigh, v * (u - sHigh * tHigh - sHigh * tLow)];
}

/** 2^(large + small). */
function powerOfTwo(large: number, small: number): number {
  const n = Math.round(large + small);
  const rest = large - n;
  const t = truncated(small + rest);
  const u = t * LN2[0];
  const v = (small - (t - rest)) * LN2[2] + t * LN2[1];
  const z = u + v;
  const w = v - (z - u);
  const square = z * z;
  const t1 = z - square * (P[0] + square * (P[1] + square * (P[2] + square * (P[3] + square * P[4]))));
  const r = (z * t1) / (t1 - 2) - (w + z * w);
  const one = 1 + z;
  return scaled(one + (z - (one - 1) - r), n);
}
