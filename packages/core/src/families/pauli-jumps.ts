import { blockAlgebra } from '../algebra/block-algebra.js';
import { ThalwegError } from '../errors.js';
import type { Generator } from '../generator/generator.js';
import { lindbladGenerator } from '../generator/lindblad-generator.js';
import { requireNonNegative } from './check-parameter.js';
import { pauliString } from './pauli-string.js';

/**
 * Jumps V = √rate · P/2 along Pauli strings P, so that L(A) = Σ rate/2 (PAP − A). On one qubit with rates γ₁ ≥ γ₂ ≥ γ₃ of X, Y, Z
 * the gap is γ₂ + γ₃. Throws `usage` for strings that are no Pauli strings of one length and negative rates.
 */
export function pauliJumps(terms: readonly { readonly string: string; readonly rate: number }[]): Generator {
  if (terms.length === 0) throw new ThalwegError('usage', 'expected at least one Pauli string, got none');
  const length = terms[0].string.length;
  const other = terms.find((term) => term.string.length !== length);
  if (other) {
    throw new ThalwegError('usage', `expected Pauli strings of ${length} letters, got "${other.string}"`);
  }
  for (const { string, rate } of terms) requireNonNegative(rate, `the rate of ${string}`);
  return lindbladGenerator({
    algebra: blockAlgebra([2 ** length]),
    jumps: terms.map(({ string, rate }) => ({ label: string, rate: rate / 2, matrix: pauliString(string) })),
  });
}
