import { highWord, withHighWord } from './words.js';

const LN2_HIGH = 6.9314718036912381649e-1;
const LN2_LOW = 1.90821492927058770002e-10;

/** Remez coefficients of (log(1+s) − log(1−s) − 2s)/s on [0, 0.1716] in s². */
const LG = [
  6.66666666666673513e-1, 3.999999999940941908e-1, 2.857142874366239149e-1, 2.222219843214978396e-1,
  1.818357216161805012e-1, 1.531383769920937332e-1, 1.479819860511658591e-1,
] as const;

/** Natural logarithm; −∞ at 0, NaN below (the published algorithm of fdlibm's e_log.c, Sun Microsystems 1993). */
export function log(x: number): number {
  if (Number.isNaN(x) || x < 0) return NaN;
  if (x < 2.2250738585072014e-308) return x > 0 ? logOf(x * 18014398509481984, -54) : -Infinity;
  return x < Infinity ? logOf(x, 0) : x;
}

/** log(1 + x) without cancellation near 0 (fdlibm's s_log1p.c). */
export function log1p(x: number): number {
  if (Number.isNaN(x) || x < -1) return NaN;
  if (x < -0.9999999999999999) return -Infinity;
  if (!(x < Infinity)) return x;
  if (Math.abs(x) < 5.551115123125783e-17) return x;
  if (Math.abs(x) < 1.862645149230957e-9) return x - x * x * 0.5;
  if (x > -0.29289321881345254 && x < 0.41421356237309515) return series(x, 0, 0);
  const u = 1 + x;
  const k = (highWord(u) >> 20) - 1023;
  const lost = (x < 9007199254740992 ? (k > 0 ? 1 - (u - x) : x - (u - 1)) : 0) / u;
  const fraction = highWord(u) & 0xfffff;
  const up = fraction >= 0x6a09e;
  return series(withHighWord(u, fraction | (up ? 0x3fe00000 : 0x3ff00000)) - 1, k + (up ? 1 : 0), lost);
}

/** log x + k log 2 for normal x. */
function logOf(x: number, shift: number): number {
  const word = highWord(x);
  const fraction = word & 0xfffff;
  const i = (fraction + 0x95f64) & 0x100000;
  const k = shift + (word >> 20) - 1023 + (i >> 20);
  const f = withHighWord(x, fraction | (i ^ 0x3ff00000)) - 1;
  if ((0xfffff & (2 + fraction)) < 3) return nearOne(f, k);
  const s = f / (2 + f);
  const z = s * s;
  const w = z * z;
  const t1 = w * (LG[1] + w * (LG[3] + w * LG[5]));
  const t2 = z * (LG[0] + w * (LG[2] + w * (LG[4] + w * LG[6])));
  const r = t2 + t1;
  if (((fraction - 0x6147a) | (0x6b851 - fraction)) > 0) {
    const half = 0.5 * f * f;
    if (k === 0) return f - (half - s * (half + r));
    return k * LN2_HIGH - (half - (s * (half + r) + k * LN2_LOW) - f);
  }
  return k === 0 ? f - s * (f - r) : k * LN2_HIGH - (s * (f - r) - k * LN2_LOW - f);
}

/** The same for |f| < 2^-20, f = x − 1. */
function nearOne(f: number, k: number): number {
  const r = f * f * (0.5 - 0.3333333333333333 * f);
  return k === 0 ? f - r : k * LN2_HIGH - (r - k * LN2_LOW - f);
}

/** log(1 + f) + k log 2 + lost. */
function series(f: number, k: number, lost: number): number {
  const half = 0.5 * f * f;
  const s = f / (2 + f);
  const z = s * s;
  const r = z * (LG[0] + z * (LG[1] + z * (LG[2] + z * (LG[3] + z * (LG[4] + z * (LG[5] + z * LG[6]))))));
  if (k === 0) return f - (half - s * (half + r));
  return k * LN2_HIGH - (half - (s * (half + r) + (k * LN2_LOW + lost)) - f);
}
