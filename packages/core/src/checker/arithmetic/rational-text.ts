import { ThalwegError } from '../../errors.js';
import { RATIONAL_DIGITS } from './limits.js';
import { type Rational, rational } from './rational.js';

/** "p/q" in lowest terms, or "p" for a whole number. */
export function printRational(a: Rational): string {
  return a.denominator === 1n ? a.numerator.toString() : `${a.numerator}/${a.denominator}`;
}

/**
 * Read "p/q" or "p", decimal digits with an optional minus sign. Throws `too-large` for more than RATIONAL_DIGITS digits in
 * either part, before any of them is converted, and `wrong-schema` for anything else.
 */
export function parseRational(text: string, pointer?: string): Rational {
  const context = pointer === undefined ? {} : { pointer };
  if (text.length > 2 * RATIONAL_DIGITS + 2) throw tooLong(text.length, context);
  const match = /^(-?)(\d+)(?:\/(\d+))?$/.exec(text);
  if (!match) {
    throw new ThalwegError(
      'wrong-schema',
      `expected a rational number such as "-3/4" or "2", got ${JSON.stringify(text.slice(0, 40))}`,
      context,
    );
  }
  const [, sign, p, q = '1'] = match;
  const digits = Math.max(p.length, q.length);
  if (digits > RATIONAL_DIGITS) throw tooLong(digits, context);
  const denominator = BigInt(q);
  if (denominator === 0n) {
    throw new ThalwegError('wrong-schema', 'expected a denominator other than 0, got a rational number p/0', context);
  }
  return rational(sign === '-' ? -BigInt(p) : BigInt(p), denominator);
}

function tooLong(digits: number, context: { pointer?: string }): ThalwegError {
  return new ThalwegError(
    'too-large',
    `expected at most ${RATIONAL_DIGITS} digits in a numerator or denominator, got ${digits}; round the number first`,
    context,
  );
}
