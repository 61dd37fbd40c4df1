import type { CertificateTerm, LiftCertificate } from '../checker/lift-certificate.js';
import { doubleOf } from '../checker/scalar.js';

/** A real unknown of a lift: terms whose real or imaginary parts have one absolute value. */
export interface LiftPart {
  /** That absolute value, as the solver found it. */
  readonly value: number;
  /** Index of the term, and its coefficient re + i·im times the unknown, re and im in {−1, 0, 1}. */
  readonly terms: ReadonlyMap<number, { re: number; im: number }>;
}

/** Group the parts of all coefficients by absolute value: symmetries of the programme tie them to rounding. */
export function liftParts({ lift }: LiftCertificate): LiftPart[] {
  const parts = lift.flatMap((term, t) => partsOf(term, t)).sort((a, b) => a.size - b.size);
  const largest = parts.at(-1)?.size ?? 0;
  const out: { value: number; terms: Map<number, { re: number; im: number }> }[] = [];
  for (const { size, term, isReal, sign } of parts) {
    if (size <= TIE_TOLERANCE * largest) continue;
    let last = out.at(-1);
    if (!last || size - last.value > TIE_TOLERANCE * largest) out.push((last = { value: size, terms: new Map() }));
    const known = last.terms.get(term) ?? { re: 0, im: 0 };
    last.terms.set(term, isReal ? { ...known, re: sign } : { ...known, im: sign });
  }
  return out;
}

/** Relative to the largest coefficient. */
const TIE_TOLERANCE = 1e-10;

function partsOf({ re, im }: CertificateTerm, term: number) {
  return [doubleOf(re), doubleOf(im)].map((x, k) => ({ size: Math.abs(x), term, isReal: k === 0, sign: Math.sign(x) }));
}
