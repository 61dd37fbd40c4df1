import {
  RATIONAL_ZERO,
  type Rational,
  addRational,
  divideRational,
  multiplyRational,
  negateRational,
} from '../checker/arithmetic/rational.js';

/** Σ coefficient·x = right. */
export interface RationalEquation {
  readonly coefficients: ReadonlyMap<number, Rational>;
  readonly right: Rational;
}

/** Linear equations over the rationals, kept in reduced echelon form. */
export class RationalSystem {
  readonly #rows = new Map<number, { coefficients: Map<number, Rational>; right: Rational }>();

  /** Add an equation; false when it contradicts the others. */
  add({ coefficients, right }: RationalEquation): boolean {
    const row = { coefficients: new Map(coefficients), right };
    for (const [pivot, value] of coefficients) {
      const known = this.#rows.get(pivot);
      if (known) subtract(row, known, value);
    }
    const [first] = row.coefficients;
    if (!first) return row.right.numerator === 0n;
    const [pivot, value] = first;
    for (const [k, x] of row.coefficients) row.coefficients.set(k, divideRational(x, value));
    row.right = divideRational(row.right, value);
    for (const other of this.#rows.values()) {
      const factor = other.coefficients.get(pivot);
      if (factor) subtract(other, row, factor);
    }
    this.#rows.set(pivot, row);
    return true;
  }

  /** True when the equations give this unknown in terms of others. */
  determines(unknown: number): boolean {
    return this.#rows.has(unknown);
  }

  /** The solution with the free unknowns as given; those that equations determine are ignored. */
  solve(free: readonly Rational[]): Rational[] {
    return free.map((value, k) => {
      const row = this.#rows.get(k);
      if (!row) return value;
      let sum = row.right;
      for (const [l, x] of row.coefficients)
        if (l !== k) sum = addRational(sum, negateRational(multiplyRational(x, free[l])));
      return sum;
    });
  }
}

/** row −= factor · other, zeros removed. */
function subtract(
  row: { coefficients: Map<number, Rational>; right: Rational },
  other: { coefficients: Map<number, Rational>; right: Rational },
  factor: Rational,
): void {
  const minus = negateRational(factor);
  for (const [k, x] of other.coefficients) {
    const sum = addRational(row.coefficients.get(k) ?? RATIONAL_ZERO, multiplyRational(minus, x));
    if (sum.numerator === 0n) row.coefficients.delete(k);
    else row.coefficients.set(k, sum);
  }
  row.right = addRational(row.right, multiplyRational(minus, other.right));
}
