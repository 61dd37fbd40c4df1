import type { SheetFinding } from '@thalweg/core';
import type { SheetDocument } from '@thalweg/format';
import { EXIT_STATUS, type ExitStatus } from '../../exit-status.js';
import { readModel } from '../../input/read-model.js';
import type { Output } from '../../output/output.js';
import { requireTarget } from '../../output/require-target.js';
import { writePicture } from '../../output/write-picture.js';
import { iterateLine } from '../../render/iterate-line.js';
import { renderSheet } from '../../render/render-sheet.js';
import type { Session } from '../../session.js';
import { computeSheet, unfinishedNote } from '../../sheet/compute-sheet.js';
import { rowKeys } from '../../sheet/row-keys.js';
import type { ConstantsPlan } from './plan.js';

/** Computes the sheet of a model and prints it. */
export async function constantsEffect(plan: ConstantsPlan, session: Session): Promise<ExitStatus> {
  if (plan.svg !== null) await requireTarget(plan.svg);
  const source = await readModel(plan, session);
  const { seed, convention, threads, timeLimit } = plan;
  const job = { source, rows: rowKeys(plan), seed, convention, limits: { threads, timeLimit } };
  const { sheet, findings, unfinished } = await computeSheet(job, session);
  const { output } = session;
  if (plan.verbose) tellIterations(findings, output);
  if (output.json) output.document(sheet);
  else output.result(renderSheet(sheet, output));
  if (plan.svg !== null) await writePicture(plan.svg, await pictureOf(sheet), output);
  if (unfinished !== null) output.note(unfinishedNote(unfinished, 'observed ends may be lower with more time'));
  return EXIT_STATUS.yes;
}

/** What the solver told while it looked for lifts. */
function tellIterations(findings: readonly SheetFinding[], output: Output): void {
  for (const finding of findings) {
    if (finding.kind !== 'lift') continue;
    for (const iterate of finding.iterates) output.note(iterateLine(iterate));
  }
}

/** Pictures are loaded where they are asked for. */
async function pictureOf(sheet: SheetDocument): Promise<string> {
  const { sheetPicture } = await import('../../render/sheet-picture.js');
  return sheetPicture(sheet);
}
