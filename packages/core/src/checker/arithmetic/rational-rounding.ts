import { ThalwegError } from '../../errors.js';
import { type Interval } from './interval.js';
import {
  type Rational,
  compareRational,
  negateRational,
  rational,
  rationalFromDouble,
  signRational,
  subtractRational,
} from './rational.js';
import { nextDown, nextUp } from './rounding.js';

/**
 * The rational nearest to x with denominator at most `limit`, the smaller denominator in a tie: the last convergent of the
 * continued fraction or the last semiconvergent (Khinchin, Continued Fractions, §6). Throws `usage` for limit < 1.
 */
export function nearestRational(x: Rational | number, limit: bigint): Rational {
  if (limit < 1n) throw new ThalwegError('usage', `expected a denominator bound of at least 1, got ${limit}`);
  const target = typeof x === 'number' ? rationalFromDouble(x) : x;
  if (target.denominator <= limit) return target;
  let [p0, q0, p1, q1] = [0n, 1n, 1n, 0n];
  let { numerator: n, denominator: d } = target;
  for (;;) {
    const digit = floorDivide(n, d);
    const q2 = q0 + digit * q1;
    if (q2 > limit) break;
    [p0, q0, p1, q1] = [p1, q1, p0 + digit * p1, q2];
    [n, d] = [d, n - digit * d];
  }
  const steps = (limit - q0) / q1;
  const semi = rational(p0 + steps * p1, q0 + steps * q1);
  const full = rational(p1, q1);
  const order = compareRational(distance(full, target), distance(semi, target));
  if (order !== 0) return order < 0 ? full : semi;
  return full.denominator <= semi.denominator ? full : semi;
}

/** The interval of the doubles next to a rational number on either side, a point when it is a double itself. */
export function intervalFromRational(a: Rational): Interval {
  let x = nearDouble(a);
  if (x === Infinity) return { lo: Number.MAX_VALUE, hi: Infinity };
  if (x === -Infinity) return { lo: -Infinity, hi: -Number.MAX_VALUE };
  let order = compareRational(rationalFromDouble(x), a);
  const upwards = order < 0;
  // Walk to the other side of a; the last step crosses it.
  let before = x;
  while (order !== 0 && order < 0 === upwards) {
    before = x;
    x = upwards ? nextUp(x) : nextDown(x);
    if (!Number.isFinite(x)) break;
    order = compareRational(rationalFromDouble(x), a);
  }
  if (order === 0) return { lo: x, hi: x };
  return upwards ? { lo: before, hi: x } : { lo: x, hi: before };
}

/** A double within a few units in the last place of a, from its leading 64 bits. */
function nearDouble(a: Rational): number {
  const sign = signRational(a);
  if (sign === 0) return 0;
  const n = sign < 0 ? -a.numerator : a.numerator;
  const shift = 64 - (bits(n) - bits(a.denominator));
  const quotient = shift >= 0 ? (n << BigInt(shift)) / a.denominator : n / (a.denominator << BigInt(-shift));
  return sign * scaled(Number(quotient), -shift) + 0; // never −0
}

/** x·2^k by steps that stay in range; the result may be rounded once more, or be infinite. */
function scaled(x: number, k: number): number {
  let y = x;
  let rest = k;
  while (rest > 500 && y < Infinity) {
    y *= 2 ** 500;
    rest -= 500;
  }
  while (rest < -500 && y > 0) {
    y *= 2 ** -500;
    rest += 500;
  }
  return y === 0 || y === Infinity ? y : y * 2 ** rest;
}

function bits(n: bigint): number {
  const text = n.toString(16);
  return 4 * text.length;
}

function floorDivide(n: bigint, d: bigint): bigint {
  const q = n / d;
  return n % d < 0n ? q - 1n : q;
}

function distance(a: Rational, b: Rational): Rational {
  const d = subtractRational(a, b);
  return signRational(d) < 0 ? negateRational(d) : d;
}
