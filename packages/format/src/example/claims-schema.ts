import { z } from 'zod';
import { CONVENTION_NAMES } from '@thalweg/core';
import { fault, type Fault } from '../fault.js';
import { constantIdSchema, meanSchema } from '../schema/end-schema.js';
import { finite, list, strict, text, withoutFault } from '../schema/fields.js';

/** How a claim relates a constant to its value; `tends-to` is a limit, which no single point decides. */
const CLAIM_RELATIONS = ['at-least', 'at-most', 'equals', 'tends-to'] as const;

/** The fields of a claim. */
export const claimFields = {
  constant: constantIdSchema,
  /** The operator mean of `ge`; the logarithmic one where left out. */
  mean: meanSchema.optional(),
  relation: z.enum(CLAIM_RELATIONS),
  value: finite,
  /** Where the statement stands: author, year, journal, theorem; or how it follows. */
  source: text.min(1),
  /** The convention of `value`; two-alpha where left out. */
  convention: z.enum(CONVENTION_NAMES).optional(),
  /** The integer parameter that grows, for `tends-to`. */
  along: text.optional(),
};

/** What an author says about a constant at given parameters, and who showed it. */
const claimSchema = withoutFault(strict(claimFields), findClaimFault);

export const claimsSchema = list(claimSchema);

export type ClaimDocument = z.infer<typeof claimSchema>;

interface ClaimFields {
  readonly constant: string;
  readonly mean?: string | undefined;
  readonly relation: string;
  readonly along?: string | undefined;
}

function findClaimFault({ constant, mean, relation, along }: ClaimFields): Fault | null {
  if (mean !== undefined && constant !== 'ge') {
    return fault('wrong-schema', `expected no "mean" beside "${constant}", got "${mean}"; only ge has one`, ['mean']);
  }
  if (relation === 'tends-to' && along === undefined) {
    const message = 'expected the parameter that grows, got nothing; add the field "along"';
    return fault('wrong-schema', message, ['along']);
  }
  if (relation !== 'tends-to' && along !== undefined) {
    return fault('wrong-schema', `expected "along" beside "tends-to" only, got "${along}"; remove it`, ['along']);
  }
  return null;
}
