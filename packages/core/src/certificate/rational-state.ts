import {
  RATIONAL_ONE,
  RATIONAL_ZERO,
  type Rational,
  addRational,
  divideRational,
  multiplyRational,
  rational,
  rationalFromDouble,
} from '../checker/arithmetic/rational.js';
import type { LiftCertificate, MatrixEntry } from '../checker/lift-certificate.js';
import { doubleOf } from '../checker/scalar.js';
import { RationalSystem } from './rational-system.js';

/** A diagonal state with rational entries, and the ratio that it gives each jump. */
export interface RationalState {
  readonly entries: readonly MatrixEntry[];
  readonly ratios: readonly Rational[];
}

/** Entries of a state and of jumps below this, relative to the largest, and logarithms of ratios below it, are rounding. */
const DUST = 1e-12;

/**
 * A rational state with σWσ⁻¹ = W/ratio exactly for every jump, near the one of the draft: log σ solves the linear equations
 * log σ_b − log σ_a = log ratio for the entries (a,b) of each W, in integers over some free entries, whose doubles are taken.
 * Null when the state of the draft is not diagonal, or fractional powers would be needed.
 */
export function rationalState(draft: LiftCertificate): RationalState | null {
  const n = draft.blocks.reduce((sum, size) => sum + size, 0);
  const diagonal = new Float64Array(n);
  for (const [i, j, re, im] of draft.state) {
    if (i === j) diagonal[i] = doubleOf(re);
    else if (Math.hypot(doubleOf(re), doubleOf(im)) > DUST) return null;
  }
  const places = draft.jumps.map(({ entries }) => placesOf(entries));
  const powers = freePowers(draft, n, places);
  if (!powers) return null;
  const sigma = powers.map((row) =>
    [...row].reduce((product, [f, power]) => multiplyRational(product, powerOf(diagonal[f], power)), RATIONAL_ONE),
  );
  const trace = sigma.reduce(addRational, RATIONAL_ZERO);
  const entries = sigma.map((x, i): MatrixEntry => [i, i, divideRational(x, trace), RATIONAL_ZERO]);
  const ratios = places.map(([[a, b]]) => divideRational(sigma[b], sigma[a]));
  return { entries, ratios };
}

/** Where a jump is not zero. */
function placesOf(entries: readonly MatrixEntry[]): [number, number][] {
  const size = ([, , re, im]: MatrixEntry): number => Math.hypot(doubleOf(re), doubleOf(im));
  const top = Math.max(...entries.map(size));
  return entries.filter((entry) => size(entry) > DUST * top).map(([i, j]) => [i, j]);
}

/** log σ_a = Σ power·log σ_f over free f; null when some power is not an integer. */
function freePowers(
  { jumps }: LiftCertificate,
  n: number,
  places: readonly (readonly [number, number][])[],
): Map<number, number>[] | null {
  const system = new RationalSystem();
  places.forEach((list, j) => {
    const balanced = Math.abs(Math.log(doubleOf(jumps[j].ratio))) <= DUST;
    const [a0, b0] = list[0];
    for (const [a, b] of balanced ? list : list.slice(1)) {
      const row = new Map<number, number>();
      for (const [k, sign] of balanced ? ends(a, b, 1) : [...ends(a, b, 1), ...ends(a0, b0, -1)])
        row.set(k, (row.get(k) ?? 0) + sign);
      // A pivot of ±1 keeps powers whole.
      const terms = [...row].filter(([, x]) => x !== 0).sort(([, x], [, y]) => Math.abs(x) - Math.abs(y));
      system.add({
        coefficients: new Map(terms.map(([k, x]) => [k, rational(BigInt(x))])),
        right: RATIONAL_ZERO,
      });
    }
  });
  const powers = Array.from({ length: n }, () => new Map<number, number>());
  for (let f = 0; f < n; f++) {
    if (system.determines(f)) continue;
    const unit = Array.from({ length: n }, (_, k) => (k === f ? RATIONAL_ONE : RATIONAL_ZERO));
    for (const [a, power] of system.solve(unit).entries()) {
      if (power.denominator !== 1n) return null;
      if (power.numerator !== 0n) powers[a].set(f, Number(power.numerator));
    }
  }
  return powers;
}

function ends(a: number, b: number, sign: number): [number, number][] {
  return [
    [b, sign],
    [a, -sign],
  ];
}

function powerOf(x: number, power: number): Rational {
  const base = rationalFromDouble(x);
  const n = BigInt(Math.abs(power));
  const { numerator, denominator } = { numerator: base.numerator ** n, denominator: base.denominator ** n };
  return power < 0 ? rational(denominator, numerator) : rational(numerator, denominator);
}
