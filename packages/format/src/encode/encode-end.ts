import type { Bracket, End } from '@thalweg/core';
import type { EndDocument } from '../schema/end-schema.js';
import { encodeEvidence } from './encode-witness.js';

/** A bracket as a document holds it. */
export function encodeBracket({ lower, upper }: Bracket): { lower: EndDocument | null; upper: EndDocument | null } {
  return { lower: lower && encodeEnd(lower), upper: upper && encodeEnd(upper) };
}

/** An end as a document holds it: an infinite one becomes null, "unbounded", and its reason a note. */
export function encodeEnd({ value, grade, by, margin, evidence }: End): EndDocument {
  const finite = Number.isFinite(value);
  return {
    value: finite ? value : null,
    grade,
    by: finite ? by : 'unbounded',
    ...(finite && margin !== undefined && { margin }),
    ...(evidence && { evidence: encodeEvidence(evidence) }),
    ...(!finite && { unbounded: value > 0 ? ('above' as const) : ('below' as const), note: by }),
  };
}
