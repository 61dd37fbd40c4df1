import { powerOfTwo } from './binary-parts.js';
import { type Interval, ONE, add, div, mul, point, sub } from './interval.js';
import { LN2_HIGH, LN2_LOW } from './interval-log.js';
import { EXP_TERMS } from './limits.js';
import { addDown, addUp, mulDown, mulUp, subDown } from './rounding.js';

/** e^x. */
export function exp(x: Interval): Interval {
  return { lo: expOfPoint(x.lo).lo, hi: expOfPoint(x.hi).hi };
}

/** e^x − 1, to a few units in the last place near zero too. */
export function expm1(x: Interval): Interval {
  return { lo: expm1OfPoint(x.lo).lo, hi: expm1OfPoint(x.hi).hi };
}

/** φ₂(x) = (e^x − 1 − x)/x², φ₂(0) = 1/2: positive and increasing. */
export function phi2(x: Interval): Interval {
  return { lo: phi2OfPoint(x.lo).lo, hi: phi2OfPoint(x.hi).hi };
}

function expOfPoint(x: number): Interval {
  if (x === 0) return ONE;
  if (x > 710) return { lo: Number.MAX_VALUE, hi: Infinity };
  if (x < -746) return { lo: 0, hi: Number.MIN_VALUE };
  const k = Math.round(x * Math.LOG2E);
  // k·LN2_HIGH is exact; any k is right, this one makes |r| ≤ 0.35.
  const r = k === 0 ? point(x) : sub(sub(point(x), point(k * LN2_HIGH)), mul(point(k), LN2_LOW));
  return scaleByPower(expSeries(r), k);
}

function expm1OfPoint(x: number): Interval {
  if (Math.abs(x) <= 0.5) return mul(point(x), phi1Series(x));
  return sub(expOfPoint(x), ONE);
}

function phi2OfPoint(x: number): Interval {
  if (x === -Infinity) return { lo: 0, hi: 0 };
  if (x === Infinity) return { lo: Number.MAX_VALUE, hi: Infinity };
  if (Math.abs(x) <= 0.5) return phi2Series(x);
  const z = point(x);
  return div(sub(div(expm1OfPoint(x), z), ONE), z);
}

/** 1/(k+2)! for k < EXP_TERMS. */
const COEFFICIENTS = inverseFactorials();

/**
 * Absolute error of Horner's rule below: term k meets at most 2k+2 roundings of 2^-53, and
 * Σ (2k+2)|z|^k/(k+2)! < 1.42 for |z| ≤ 1/2; the terms left out are below 2^-60. So 1.5·2^-53 holds everything.
 */
const SERIES_ERROR = 0.75 * Number.EPSILON;

/** φ₂(z) for |z| ≤ 1/2. */
function phi2Series(z: number): Interval {
  let sum = 0;
  for (let k = EXP_TERMS - 1; k >= 0; k--) sum = sum * z + COEFFICIENTS[k];
  return { lo: subDown(sum, SERIES_ERROR), hi: addUp(sum, SERIES_ERROR) };
}

/** (e^z − 1)/z = 1 + z φ₂(z) for |z| ≤ 1/2. */
function phi1Series(z: number): Interval {
  return add(ONE, mul(point(z), phi2Series(z)));
}

/** e^z = 1 + z + z² φ₂(z) for |z| ≤ 1/2, increasing. */
function expSeries(z: Interval): Interval {
  const low = mul(point(z.lo), phi1Series(z.lo)).lo;
  const high = mul(point(z.hi), phi1Series(z.hi)).hi;
  return { lo: addDown(1, low), hi: addUp(1, high) };
}

/** x·2^k for positive x near 1, |k| ≤ 1100. */
function scaleByPower(x: Interval, k: number): Interval {
  if (k >= -1000 && k <= 1000) {
    const scale = powerOfTwo(k);
    return { lo: x.lo * scale, hi: x.hi * scale };
  }
  const first = powerOfTwo(k < 0 ? -1000 : 1000);
  const second = powerOfTwo(k < 0 ? k + 1000 : k - 1000);
  return { lo: mulDown(x.lo * first, second), hi: mulUp(x.hi * first, second) };
}

function inverseFactorials(): Float64Array {
  let factorial = 1; // exact as a double up to 22!
  return Float64Array.from({ length: EXP_TERMS }, (_, k) => 1 / (factorial *= k + 2));
}
