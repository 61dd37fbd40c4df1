import { ThalwegError } from '../../errors.js';
import { binaryParts } from './binary-parts.js';

/** A rational number in lowest terms, denominator > 0. */
export interface Rational {
  readonly numerator: bigint;
  readonly denominator: bigint;
}

export const RATIONAL_ZERO: Rational = { numerator: 0n, denominator: 1n };
export const RATIONAL_ONE: Rational = { numerator: 1n, denominator: 1n };

/** numerator/denominator in lowest terms; throws `usage` for a zero denominator. */
export function rational(numerator: bigint, denominator: bigint = 1n): Rational {
  if (denominator === 0n) throw new ThalwegError('usage', `expected a denominator other than 0, got ${numerator}/0`);
  if (denominator === 1n) return { numerator, denominator };
  const g = gcd(numerator, denominator);
  const sign = denominator < 0n ? -g : g;
  return { numerator: numerator / sign, denominator: denominator / sign };
}

/** The exact value of a finite double; throws `not-finite` otherwise. */
export function rationalFromDouble(x: number): Rational {
  if (!Number.isFinite(x)) throw new ThalwegError('not-finite', `expected a finite number, got ${x}`);
  if (Number.isInteger(x)) return { numerator: BigInt(x), denominator: 1n };
  const { mantissa, exponent } = binaryParts(x);
  const integer = BigInt(mantissa * TWO_52);
  return rational(integer, 1n << BigInt(52 - exponent));
}

export function addRational(a: Rational, b: Rational): Rational {
  if (a.denominator === b.denominator) return rational(a.numerator + b.numerator, a.denominator);
  return rational(a.numerator * b.denominator + b.numerator * a.denominator, a.denominator * b.denominator);
}

export function subtractRational(a: Rational, b: Rational): Rational {
  return addRational(a, negateRational(b));
}

export function multiplyRational(a: Rational, b: Rational): Rational {
  if (a.numerator === 0n || b.numerator === 0n) return RATIONAL_ZERO;
  return rational(a.numerator * b.numerator, a.denominator * b.denominator);
}

/** a/b; throws `usage` when b is zero. */
export function divideRational(a: Rational, b: Rational): Rational {
  return rational(a.numerator * b.denominator, a.denominator * b.numerator);
}

export function negateRational(a: Rational): Rational {
  return { numerator: -a.numerator, denominator: a.denominator };
}

/** −1, 0 or 1. */
export function signRational(a: Rational): number {
  return a.numerator > 0n ? 1 : a.numerator < 0n ? -1 : 0;
}

/** Sign of a − b. */
export function compareRational(a: Rational, b: Rational): number {
  const d = a.numerator * b.denominator - b.numerator * a.denominator;
  return d > 0n ? 1 : d < 0n ? -1 : 0;
}

/** Greatest common divisor, ≥ 0; small numbers go through doubles. */
export function gcd(a: bigint, b: bigint): bigint {
  let x = a < 0n ? -a : a;
  let y = b < 0n ? -b : b;
  while (y > SMALL || x > SMALL) {
    if (y === 0n) return x;
    [x, y] = [y, x % y];
  }
  let m = Number(x);
  let n = Number(y);
  while (n !== 0) [m, n] = [n, m % n];
  return BigInt(m);
}

/** Least common multiple of positive numbers. */
export function lcm(a: bigint, b: bigint): bigint {
  return (a / gcd(a, b)) * b;
}

const TWO_52 = 4503599627370496;
const SMALL = BigInt(Number.MAX_SAFE_INTEGER);
