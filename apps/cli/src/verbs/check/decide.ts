import { endValue, type ConstantDocument, type VerdictDocument } from '@thalweg/format';
import type { Claim } from '../option-values.js';

type ClaimVerdict = VerdictDocument['claims'][number];

/**
 * Decide a claim from the bracket of its constant. `slack`, relative to the larger of 1 and the bound, is the rounding that a
 * claim is allowed: a bound of 1 holds against a lower end of 1 − 1e-14. Observed ends refute (their witness is a proof up
 * to rounding) but never confirm a lower bound.
 */
export function decideClaim(claim: Claim, row: ConstantDocument, slack: number): ClaimVerdict {
  const { relation, bound, constant } = claim;
  const tolerance = slack * Math.max(1, Math.abs(bound));
  const lower = row.lower && endValue(row.id, row.lower);
  const upper = row.upper && endValue(row.id, row.upper);
  const verdict =
    relation === 'at-least'
      ? between(lower !== null && lower >= bound - tolerance, upper !== null && upper < bound - tolerance)
      : between(upper !== null && upper <= bound + tolerance, lower !== null && lower > bound + tolerance);
  return {
    constant: constant.id,
    ...(row.mean === undefined ? {} : { mean: row.mean }),
    relation,
    value: bound,
    verdict,
    bracket: { lower: row.lower, upper: row.upper },
    ...(row.note === undefined ? {} : { note: row.note }),
  };
}

function between(holds: boolean, fails: boolean): ClaimVerdict['verdict'] {
  return holds ? 'holds' : fails ? 'refuted' : 'undecided';
}
