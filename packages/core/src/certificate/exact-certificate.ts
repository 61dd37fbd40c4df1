import type { BlockAlgebra } from '../algebra/block-algebra.js';
import type { GaussianRational } from '../checker/arithmetic/gaussian-rational.js';
import { RATIONAL_ZERO, type Rational, negateRational, rational } from '../checker/arithmetic/rational.js';
import { nearestRational } from '../checker/arithmetic/rational-rounding.js';
import { liftDefect, unitsOf } from '../checker/lift-defects.js';
import type { LiftCertificate } from '../checker/lift-certificate.js';
import { liftForm } from '../checker/lift-form.js';
import { type RingModel, ringModel } from '../checker/ring-model.js';
import { DOUBLES, RATIONALS } from '../checker/ring.js';
import { rationalOf } from '../checker/scalar.js';
import { type SparseOperator } from '../checker/sparse-operator.js';
import { type RationalVector, rationalKernel } from './form-kernel.js';
import { type LiftPart, liftParts } from './lift-parts.js';
import { guessRational } from './rational-guess.js';
import { RationalSystem } from './rational-system.js';

/** Sizes beyond which no exact certificate is tried. */
const MOST_PARTS = 150;
const MOST_TERMS = 2000;
/** The same where numbers are doubles, whose exact sums and quotients grow long. */
const MOST_ENCLOSED_PARTS = 60;

/** Denominators that the free coefficients are rounded to, one after the other. */
const FRACTIONS = [12n, 720n];
const FINEST = 2n ** 40n;

/** How far below the optimum K is put in turn, relative to max(1, |K|), when no simple fraction is reached. */
const BACK_OFFS = [1e-9, 1e-8, 1e-7] as const;

export interface ExactRequest {
  readonly algebra: BlockAlgebra;
  /** State and jumps rational, the lift in doubles. */
  readonly draft: LiftCertificate;
  /** `exact`: forms that an exact factorisation passes, at a simple fraction where possible; `enclosed`: at the K of the draft. */
  readonly grade: 'exact' | 'enclosed';
  /** The optimum of the programme. */
  readonly optimum: number;
  /** Says whether a certificate passes. */
  readonly accepts: (certificate: LiftCertificate) => boolean;
  readonly stop: () => boolean;
}

/**
 * A certificate over the rationals near one in doubles, or null. The coefficients are tied as the solver's symmetries tied
 * them, ∂L = L̂∂ is solved exactly, and the free ones are rounded. At the optimum the form is singular: a simple fraction K is
 * reached only on the face it belongs to, so the kernel of the form is rounded too and imposed by equations (facial
 * reduction; Peyrl & Parrilo 2008 for the interior case). Otherwise K backs off into the interior.
 */
export function exactCertificate(request: ExactRequest): LiftCertificate | null {
  const { algebra, optimum, grade } = request;
  const draft = { ...request.draft, grade };
  const parts = liftParts(draft);
  if (parts.length > MOST_PARTS || draft.lift.length > MOST_TERMS) return null;
  if (grade === 'enclosed') {
    if (parts.length > MOST_ENCLOSED_PARTS) return null;
    return solved(request, { ...draft, bound: rationalOf(draft.bound) }, parts, [], [FINEST]);
  }
  const simple = guessRational(optimum, 1000, 1e-7 * Math.max(1, Math.abs(optimum)));
  if (simple) {
    const at = { ...draft, bound: simple };
    const kernel = rationalKernel(liftForm(ringModel(DOUBLES, algebra, at), 'left'));
    // Where the solver stops too far from the face to show it, its coefficients may still stand for simple fractions.
    const found = (kernel && solved(request, at, parts, kernel)) ?? solved(request, at, parts, [], FRACTIONS);
    if (found) return found;
  }
  const scale = Math.max(1, Math.abs(optimum));
  for (const backOff of BACK_OFFS) {
    const bound = roundedDown(optimum - backOff * scale, backOff);
    const found = solved(request, { ...draft, bound }, parts, [], [FINEST]);
    if (found) return found;
  }
  return null;
}

/** The largest multiple of a unit, 1/unit being an integer, that is not above x. */
function roundedDown(x: number, unit: number): Rational {
  const denominator = Math.round(1 / unit);
  return rational(BigInt(Math.floor(x * denominator)), BigInt(denominator));
}

function solved(
  { algebra, accepts, stop }: ExactRequest,
  draft: LiftCertificate,
  parts: readonly LiftPart[],
  kernel: readonly RationalVector[],
  denominators: readonly bigint[] = [...FRACTIONS, FINEST],
): LiftCertificate | null {
  const model = ringModel(RATIONALS, algebra, draft);
  const system = equations(model, parts, kernel, stop);
  if (!system) return null;
  for (const limit of denominators) {
    if (stop()) return null;
    const x = system.solve(parts.map(({ value }) => nearestRational(value, limit)));
    const candidate: LiftCertificate = { ...draft, lift: liftAt(draft, parts, x) };
    if (accepts(candidate)) return candidate;
  }
  return null;
}

/** ∂L = L̂∂, and M·v = 0 for the vectors of the kernel, in the unknowns; null when they contradict each other. */
function equations(
  model: RingModel<GaussianRational>,
  parts: readonly LiftPart[],
  kernel: readonly RationalVector[],
  stop: () => boolean,
): RationalSystem | null {
  const system = new RationalSystem();
  const base = withParts(model, []);
  const models = parts.map((part) => withParts(model, [part]));
  for (const [a, b] of unitsOf(model)) {
    if (stop()) return null;
    const constant = liftDefect(base, a, b);
    const columns = models.map((each) => liftDefect(each, a, b));
    for (let k = 0; k < constant.length; k++) {
      if (
        !addAll(
          system,
          constant[k],
          columns.map((column) => column[k]),
        )
      )
        return null;
    }
  }
  if (kernel.length === 0) return system;
  const constant = applied(liftForm(base, 'left').rows, kernel);
  const columns = models.map((each) => applied(liftForm(each, 'left').rows, kernel));
  return addAll(system, constant, columns) ? system : null;
}

/** The model with only these parts of the lift, each at 1; all terms stay, so that rows stand where they stood. */
function withParts(model: RingModel<GaussianRational>, parts: readonly LiftPart[]): RingModel<GaussianRational> {
  const terms = model.terms.map((term, t) => {
    const sign = parts[0]?.terms.get(t);
    return { ...term, z: sign ? RATIONALS.of(sign.re, sign.im) : RATIONALS.zero };
  });
  return { ...model, terms };
}

/** M·v for each vector, as the rows of an operator. */
function applied(
  rows: SparseOperator<GaussianRational>,
  kernel: readonly RationalVector[],
): SparseOperator<GaussianRational> {
  return kernel.map((vector) => {
    const out = new Map<number, GaussianRational>();
    rows.forEach((row, i) => {
      let sum = RATIONALS.zero;
      for (const [j, x] of row) {
        const y = vector.get(j);
        if (y) sum = RATIONALS.add(sum, RATIONALS.multiply(x, y));
      }
      if (!RATIONALS.isZero(sum)) out.set(i, sum);
    });
    return out;
  });
}

/** Entry by entry: constant + Σ x_u (column_u − constant) = 0, real and imaginary parts. */
function addAll(
  system: RationalSystem,
  constant: SparseOperator<GaussianRational>,
  columns: readonly SparseOperator<GaussianRational>[],
): boolean {
  return constant.every((base, i) => {
    const places = new Set([...base.keys(), ...columns.flatMap((column) => [...column[i].keys()])]);
    return [...places].every((j) => {
      const origin = base.get(j) ?? RATIONALS.zero;
      return (['re', 'im'] as const).every((part) => {
        const coefficients = new Map<number, Rational>();
        columns.forEach((column, u) => {
          const x = RATIONALS.add(column[i].get(j) ?? RATIONALS.zero, RATIONALS.negate(origin))[part];
          if (x.numerator !== 0n) coefficients.set(u, x);
        });
        return system.add({ coefficients, right: negateRational(origin[part]) });
      });
    });
  });
}

function liftAt(draft: LiftCertificate, parts: readonly LiftPart[], x: readonly Rational[]): LiftCertificate['lift'] {
  const values = draft.lift.map(() => ({ re: RATIONAL_ZERO, im: RATIONAL_ZERO }));
  parts.forEach(({ terms }, u) => {
    for (const [t, sign] of terms) {
      if (sign.re !== 0) values[t].re = sign.re > 0 ? x[u] : negateRational(x[u]);
      if (sign.im !== 0) values[t].im = sign.im > 0 ? x[u] : negateRational(x[u]);
    }
  });
  return draft.lift
    .map(({ left, right, from, to }, t) => ({ left, right, from, to, ...values[t] }))
    .filter(({ re, im }) => re.numerator !== 0n || im.numerator !== 0n);
}
