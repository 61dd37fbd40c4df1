import { FULL_SHEET, type RowKey } from '@thalweg/core';
import { EXIT_STATUS, type ExitStatus } from '../../exit-status.js';
import { readSource } from '../../input/read-source.js';
import { renderSheet } from '../../render/render-sheet.js';
import type { Session } from '../../session.js';
import { computeSheet, unfinishedNote } from '../../sheet/compute-sheet.js';
import type { ConstantsPlan } from './plan.js';

/** Computes the sheet of a model and prints it. */
export async function constantsEffect(plan: ConstantsPlan, session: Session): Promise<ExitStatus> {
  const source = await readSource(plan.model, session.terminal.stdin);
  const { seed, convention, threads, timeLimit } = plan;
  const job = { source, rows: rowsOf(plan), seed, convention, limits: { threads, timeLimit } };
  const { sheet, unfinished } = await computeSheet(job, session);
  const { output } = session;
  if (output.json) output.document(sheet);
  else output.result(renderSheet(sheet, output));
  if (unfinished !== null) output.note(unfinishedNote(unfinished, 'observed ends may be lower with more time'));
  return EXIT_STATUS.yes;
}

/** The rows of a full sheet or those asked for; `--mean` decides the mean of a `ge` that names none. */
function rowsOf({ only, mean }: ConstantsPlan): RowKey[] {
  const rows: readonly { id: RowKey['id']; mean?: RowKey['mean'] | null }[] =
    only ?? FULL_SHEET.map(({ id }) => ({ id }));
  return rows.map((row) => (row.id === 'ge' ? { id: row.id, mean: row.mean ?? mean } : { id: row.id }));
}
