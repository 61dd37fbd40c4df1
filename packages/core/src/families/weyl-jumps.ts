import { blockAlgebra } from '../algebra/block-algebra.js';
import { ThalwegError } from '../errors.js';
import type { Generator } from '../generator/generator.js';
import { lindbladGenerator } from '../generator/lindblad-generator.js';
import { INPUT_TOLERANCE } from '../tolerances.js';
import { requireNonNegative, requireWhole } from './check-parameter.js';
import { weylOperator } from './weyl-operator.js';

interface WeylTerm {
  readonly a: number;
  readonly b: number;
  readonly rate: number;
}

/**
 * Jumps V = √rate · W/2 along Weyl operators W = X^aZ^b of Z_n together with their adjoints, which are added where not listed:
 * L(A) = Σ rate/2 (W*AW − A). For n = 2 these are Pauli jumps. Throws `usage` for a repeated term, a negative rate or adjoints of different rate.
 */
export function weylJumps(n: number, terms: readonly WeylTerm[]): Generator {
  requireWhole(n, 2, 64, 'the dimension');
  const rates = new Map<number, number>();
  const place = (a: number, b: number): number => modulo(a, n) * n + modulo(b, n);
  for (const { a, b, rate } of terms) {
    requireWhole(a, -n, n, 'a');
    requireWhole(b, -n, n, 'b');
    requireNonNegative(rate, `the rate of (${a}, ${b})`);
    const at = place(a, b);
    if (rates.has(at)) throw new ThalwegError('usage', `expected each Weyl operator once, got (${a}, ${b}) again`);
    rates.set(at, rate);
  }
  for (const { a, b, rate } of terms) {
    const listed = rates.get(place(-a, -b));
    if (listed !== undefined && Math.abs(listed - rate) > INPUT_TOLERANCE * Math.abs(rate)) {
      throw new ThalwegError('usage', `expected one rate for (${a}, ${b}) and its adjoint, got ${rate} and ${listed}`);
    }
    rates.set(place(-a, -b), rate);
  }
  return lindbladGenerator({
    algebra: blockAlgebra([n]),
    jumps: [...rates].map(([at, rate]) => {
      const a = Math.floor(at / n);
      const b = at % n;
      return { label: `W(${a},${b})`, rate: rate / 2, matrix: weylOperator(n, a, b) };
    }),
  });
}

function modulo(a: number, n: number): number {
  return ((a % n) + n) % n;
}
