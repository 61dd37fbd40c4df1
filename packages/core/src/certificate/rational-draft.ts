import { negateRational, RATIONAL_ONE, divideRational, multiplyRational } from '../checker/arithmetic/rational.js';
import type { Rational } from '../checker/arithmetic/rational.js';
import type { CertificateJump, LiftCertificate, MatrixEntry } from '../checker/lift-certificate.js';
import { doubleOf } from '../checker/scalar.js';
import { guessRational } from './rational-guess.js';

/** Jumps of a model have entries with denominators up to this, once the largest of each is 1. */
const ENTRY_DENOMINATOR = 100;
/** Rates, ratios and entries of the state. */
const NUMBER_DENOMINATOR = 5000;
/** How far a double may be from the rational number it stands for, relative to 1 or to itself. */
const GUESS_TOLERANCE = 1e-12;

/**
 * The certificate with its state and jumps rational and the coefficients of the lift still doubles: W_j divided by its largest
 * entry. Null when some number does not stand for a simple fraction.
 */
export function rationalDraft(draft: LiftCertificate): LiftCertificate | null {
  const state = rationalEntries(draft.state, 1, NUMBER_DENOMINATOR);
  const sizes = draft.jumps.map(({ entries }) => Math.max(...entries.map(modulus)));
  const jumps: CertificateJump[] = [];
  for (const [j, jump] of draft.jumps.entries()) {
    const known = jump.partner < j ? jumps[jump.partner] : null;
    const next = known ? partnerOf(known, jump) : rationalJump(jump, sizes[j]);
    if (!next) return null;
    jumps.push(next);
  }
  if (!state) return null;
  const size = (m: number): number => (m < 0 ? 1 : sizes[m]);
  const lift = draft.lift.map((term) => {
    const { left, right, from, to, re, im } = term;
    const factor = (size(left) * size(right) * sizes[from]) / sizes[to];
    return { ...term, re: doubleOf(re) * factor, im: doubleOf(im) * factor };
  });
  return { ...draft, state, jumps, lift };
}

function rationalJump(jump: CertificateJump, size: number): CertificateJump | null {
  const entries = rationalEntries(jump.entries, size, ENTRY_DENOMINATOR);
  const rate = guess(doubleOf(jump.rate) * size * size);
  const ratio = guess(doubleOf(jump.ratio));
  return entries && rate && ratio ? { ...jump, entries, rate, ratio } : null;
}

/** W* with the rate and ratio that detailed balance gives it. */
function partnerOf(known: CertificateJump, jump: CertificateJump): CertificateJump {
  return {
    ...jump,
    entries: known.entries.map(([i, j, re, im]) => [j, i, re, negateRational(im as Rational)]),
    rate: multiplyRational(known.rate as Rational, known.ratio as Rational),
    ratio: divideRational(RATIONAL_ONE, known.ratio as Rational),
    partner: jump.partner,
  };
}

function rationalEntries(entries: readonly MatrixEntry[], size: number, limit: number): MatrixEntry[] | null {
  const out: MatrixEntry[] = [];
  for (const [i, j, re, im] of entries) {
    const x = guessRational(doubleOf(re) / size, limit, 10 * GUESS_TOLERANCE);
    const y = guessRational(doubleOf(im) / size, limit, 10 * GUESS_TOLERANCE);
    if (!x || !y) return null;
    if (x.numerator !== 0n || y.numerator !== 0n) out.push([i, j, x, y]);
  }
  return out;
}

function guess(x: number): Rational | null {
  return guessRational(x, NUMBER_DENOMINATOR, GUESS_TOLERANCE * Math.abs(x));
}

function modulus([, , re, im]: MatrixEntry): number {
  return Math.hypot(doubleOf(re), doubleOf(im));
}
