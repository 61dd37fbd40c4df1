import { convert, type ConventionName } from '@thalweg/core';
import type { ClaimDocument } from '@thalweg/format';

/** The value of a claim in a convention, whichever its author wrote it in. */
export function claimValue(
  { value, constant, convention = 'two-alpha' }: ClaimDocument,
  wanted: ConventionName,
): number {
  return (value * convert(1, constant, wanted)) / convert(1, constant, convention);
}
