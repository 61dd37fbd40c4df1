import type { ConventionName } from '@thalweg/core';
import { endValue, type ConstantDocument, type PointDocument } from '@thalweg/format';
import { claimValue } from '../example/claim-value.js';
import { pointKey } from '../example/recorded-sheet.js';
import { without, type SweepLimit } from './sweep-limits.js';

/** How a constant changed since the point before, and how far it is from its limit; null where one of the two is not known. */
export interface Difference {
  readonly toPrevious: number | null;
  readonly toLimit: number | null;
}

/** What differences are taken of, for one constant. */
export interface DifferenceQuestion {
  readonly points: readonly PointDocument[];
  /** The parameter along which points follow each other; all others are the same. */
  readonly along: string;
  readonly limits: readonly SweepLimit[];
  readonly convention: ConventionName;
}

/**
 * The differences of one constant at each point. Of a closed bracket its value is taken, of an open one the upper end, or the lower
 * one where there is no upper.
 */
export function differencesOf(
  { points, along, limits, convention }: DifferenceQuestion,
  rowOf: (point: PointDocument) => ConstantDocument | undefined,
): Difference[] {
  const before = new Map<string, number>();
  return points.map((point) => {
    const row = rowOf(point);
    const value = row === undefined ? null : rowValue(row);
    if (row === undefined || value === null) return { toPrevious: null, toLimit: null };
    const others = pointKey(without(point.parameters, along));
    const previous = before.get(others);
    before.set(others, value);
    const limit = limits.find(({ claim, others: own }) => own === others && isOf(claim, row));
    return {
      toPrevious: previous === undefined ? null : value - previous,
      toLimit: limit === undefined ? null : value - claimValue(limit.claim, convention),
    };
  });
}

function rowValue({ id, lower, upper }: ConstantDocument): number | null {
  const end = upper ?? lower;
  const value = end === null ? null : endValue(id, end);
  return value !== null && Number.isFinite(value) ? value : null;
}

function isOf({ constant, mean = 'logarithmic' }: SweepLimit['claim'], row: ConstantDocument): boolean {
  return constant === row.id && (row.mean === undefined || row.mean === mean);
}
