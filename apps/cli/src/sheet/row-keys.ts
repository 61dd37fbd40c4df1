import { FULL_SHEET, type MeanName, type RowKey } from '@thalweg/core';
import type { ConstantName } from '../verbs/option-values.js';

/** The rows of a full sheet or those asked for; `mean` is that of a `ge` that names none. */
export function rowKeys({
  only,
  mean,
}: {
  readonly only: readonly ConstantName[] | null;
  readonly mean: MeanName;
}): RowKey[] {
  const rows: readonly { id: RowKey['id']; mean?: RowKey['mean'] | null }[] =
    only ?? FULL_SHEET.map(({ id }) => ({ id }));
  return rows.map((row) => (row.id === 'ge' ? { id: row.id, mean: row.mean ?? mean } : { id: row.id }));
}
