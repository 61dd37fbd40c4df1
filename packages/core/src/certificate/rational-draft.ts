import {
  RATIONAL_ONE,
  RATIONAL_ZERO,
  type Rational,
  divideRational,
  multiplyRational,
  negateRational,
  rationalFromDouble,
} from '../checker/arithmetic/rational.js';
import type { CertificateJump, LiftCertificate, MatrixEntry } from '../checker/lift-certificate.js';
import { doubleOf, rationalOf } from '../checker/scalar.js';
import { guessRational } from './rational-guess.js';
import { rationalState } from './rational-state.js';

/** What becomes of a number that stands for no simple fraction: the draft is given up, or the double's exact value is taken. */
export type Fallback = 'none' | 'double';

/** Jumps of a model have entries with denominators up to this, once the largest of each is 1. */
const ENTRY_DENOMINATOR = 100;
/** Rates, ratios and entries of the state. */
const NUMBER_DENOMINATOR = 5000;
/** How far a double may be from the rational number it stands for, relative to 1 or to itself. */
const GUESS_TOLERANCE = 1e-12;
/** Entries below this, relative to the largest, are rounding. */
const DUST = 1e-13;

/**
 * The certificate with its state and jumps rational and the coefficients of the lift still doubles: W_j divided by its largest
 * entry, partners adjoint and in detailed balance exactly. Null when some number does not stand for a simple fraction and
 * `fallback` is `none`, or when no rational state has these jumps as eigenvectors of its modular group.
 */
export function rationalDraft(draft: LiftCertificate, fallback: Fallback = 'none'): LiftCertificate | null {
  const sizes = draft.jumps.map(({ entries }) => Math.max(...entries.map(modulus)));
  const state = fallback === 'double' ? rationalState(draft) : null;
  const entries = state?.entries ?? rationalEntries(draft.state, 1, NUMBER_DENOMINATOR, 'none');
  if (!entries) return null;
  const jumps: CertificateJump[] = [];
  for (const [j, jump] of draft.jumps.entries()) {
    const known = jump.partner < j ? jumps[jump.partner] : null;
    const next = known ? partnerOf(known, jump) : rationalJump(draft, j, sizes[j], fallback, state?.ratios[j] ?? null);
    if (!next) return null;
    jumps.push(next);
  }
  const size = (m: number): number => (m < 0 ? 1 : sizes[m]);
  const lift = draft.lift.map((term) => {
    const { left, right, from, to, re, im } = term;
    const factor = (size(left) * size(right) * sizes[from]) / sizes[to];
    return { ...term, re: doubleOf(re) * factor, im: doubleOf(im) * factor };
  });
  return { ...draft, state: entries, jumps, lift };
}

function rationalJump(
  { jumps }: LiftCertificate,
  j: number,
  size: number,
  fallback: Fallback,
  known: Rational | null,
): CertificateJump | null {
  const jump = jumps[j];
  const entries = rationalEntries(jump.entries, size, ENTRY_DENOMINATOR, fallback);
  const rate = numberOf(doubleOf(jump.rate) * size * size, fallback);
  const ratio = known ?? numberOf(doubleOf(jump.ratio), 'none');
  if (!entries || !rate || !ratio) return null;
  return { ...jump, entries: jump.partner === j ? selfAdjoint(entries) : entries, rate, ratio };
}

/** W* with the rate and ratio that detailed balance gives it. */
function partnerOf(known: CertificateJump, jump: CertificateJump): CertificateJump {
  return {
    ...jump,
    entries: known.entries.map(([i, j, re, im]) => [j, i, re, negateRational(rationalOf(im))]),
    rate: multiplyRational(rationalOf(known.rate), rationalOf(known.ratio)),
    ratio: divideRational(RATIONAL_ONE, rationalOf(known.ratio)),
    partner: jump.partner,
  };
}

/** Entries on and below the diagonal, mirrored. */
function selfAdjoint(entries: readonly MatrixEntry[]): MatrixEntry[] {
  return entries.flatMap(([i, j, re, im]): MatrixEntry[] => {
    if (i < j) return [];
    if (i === j) return [[i, i, re, RATIONAL_ZERO]];
    return [
      [i, j, re, im],
      [j, i, re, negateRational(rationalOf(im))],
    ];
  });
}

function rationalEntries(
  entries: readonly MatrixEntry[],
  size: number,
  limit: number,
  fallback: Fallback,
): MatrixEntry[] | null {
  const out: MatrixEntry[] = [];
  for (const [i, j, re, im] of entries) {
    const [x, y] = [re, im].map((part) => entryOf(doubleOf(part) / size, limit, fallback));
    if (!x || !y) return null;
    if (x.numerator !== 0n || y.numerator !== 0n) out.push([i, j, x, y]);
  }
  return out;
}

function entryOf(x: number, limit: number, fallback: Fallback): Rational | null {
  if (fallback === 'double' && Math.abs(x) < DUST) return RATIONAL_ZERO;
  return guessRational(x, limit, 10 * GUESS_TOLERANCE) ?? exactValue(x, fallback);
}

function numberOf(x: number, fallback: Fallback): Rational | null {
  return guessRational(x, NUMBER_DENOMINATOR, GUESS_TOLERANCE * Math.abs(x)) ?? exactValue(x, fallback);
}

function exactValue(x: number, fallback: Fallback): Rational | null {
  return fallback === 'double' && Number.isFinite(x) ? rationalFromDouble(x) : null;
}

function modulus([, , re, im]: MatrixEntry): number {
  return Math.hypot(doubleOf(re), doubleOf(im));
}
