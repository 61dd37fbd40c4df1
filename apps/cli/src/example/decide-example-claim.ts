import type { ConventionName } from '@thalweg/core';
import { endValue, type ClaimDocument, type ConstantDocument, type ReproductionDocument } from '@thalweg/format';
import { claimValue } from './claim-value.js';

export type DecidedClaim = ReproductionDocument['points'][number]['claims'][number];

/** Rounding allowed to a claim, relative to the larger of 1 and its value. */
const CLAIM_SLACK = 1e-9;

/**
 * Decides what an author claims from the bracket of its constant. An upper end, observed ones too, comes with a witness and so
 * refutes and proves what lies above it; a claim about the lower side that only a search failed to refute is supported.
 */
export function decideExampleClaim(
  claim: ClaimDocument,
  row: ConstantDocument,
  convention: ConventionName,
): DecidedClaim {
  const { lower, upper } = row;
  return {
    ...claim,
    state: stateOf(claim, row, claimValue(claim, convention)),
    bracket: { lower: plain(lower), upper: plain(upper) },
  };
}

function stateOf(
  { relation }: ClaimDocument,
  { id, lower, upper }: ConstantDocument,
  value: number,
): DecidedClaim['state'] {
  if (relation === 'tends-to') return 'limit';
  const slack = CLAIM_SLACK * Math.max(1, Math.abs(value));
  const below = lower === null ? -Infinity : endValue(id, lower);
  const above = upper === null ? Infinity : endValue(id, upper);
  const atLeast =
    above < value - slack ? 'refuted' : below >= value - slack ? 'proved' : upper === null ? 'open' : 'supported';
  const atMost = below > value + slack ? 'refuted' : above <= value + slack ? 'proved' : 'open';
  if (relation === 'at-least') return atLeast;
  if (relation === 'at-most') return atMost;
  return WEAKEST_FIRST.find((state) => state === atLeast || state === atMost) ?? 'open';
}

const WEAKEST_FIRST = ['refuted', 'open', 'supported', 'proved'] as const;

function plain(end: ConstantDocument['lower']): ConstantDocument['lower'] {
  if (end === null) return null;
  const { evidence: _evidence, ...rest } = end;
  return rest;
}
