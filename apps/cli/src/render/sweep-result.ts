import type { ConventionName } from '@thalweg/core';
import type { ConstantDocument, PointDocument, SweepDocument } from '@thalweg/format';
import { differencesOf, type Difference } from '../sweep/differences.js';
import type { SweepLimit } from '../sweep/sweep-limits.js';

/** A sweep as it is shown. */
export interface SweepResult {
  readonly sweep: SweepDocument;
  /** In the order of the sweep; those that were not reached are missing. */
  readonly points: readonly PointDocument[];
  /** Names of the swept parameters. */
  readonly over: readonly string[];
  readonly convention: ConventionName;
  /** The parameter along which differences are taken; null for none. */
  readonly along: string | null;
  readonly limits: readonly SweepLimit[];
}

export type SweptConstant = SweepDocument['constants'][number];

/** The row of a constant in the sheet of a point. */
export function rowOf(point: PointDocument, { id, mean }: SweptConstant): ConstantDocument | undefined {
  return point.sheet?.constants.find((row) => row.id === id && row.mean === mean);
}

/** The differences of a constant at each point; null where none are taken. */
export function differences(result: SweepResult, constant: SweptConstant): readonly Difference[] | null {
  const { along } = result;
  return along === null ? null : differencesOf({ ...result, along }, (point) => rowOf(point, constant));
}
