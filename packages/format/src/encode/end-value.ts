import type { ConstantId } from '@thalweg/core';
import type { EndDocument } from '../schema/end-schema.js';

/**
 * The value of a written end, ±∞ where it is unbounded. Where a document does not say which, a rate is unbounded below, and a
 * length or time (`diameter`, `mixing`) above.
 */
export function endValue(constant: ConstantId, { value, unbounded }: EndDocument): number {
  if (value !== null) return value;
  const direction = unbounded ?? (constant === 'diameter' || constant === 'mixing' ? 'above' : 'below');
  return direction === 'above' ? Infinity : -Infinity;
}
