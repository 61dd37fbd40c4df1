import type { Structure } from '../structure/structure.js';
import { allRows, assembleSheet } from './assemble-sheet.js';
import { planCells } from './cell-plan.js';
import { type SheetRow, nameOf } from './close-brackets.js';
import { type SheetFinding, runSheetTask } from './run-sheet-task.js';
import { type SheetRequest, type SheetTask, planEigenproblems, planLifts, planSearches } from './sheet-plan.js';

/** What is proved before any search: findings, and the searches that could still improve a row. */
export interface ProvedPart {
  readonly findings: SheetFinding[];
  readonly searches: SheetTask[];
}

/**
 * Solve the eigenvalue problems of a sheet, then look for a lift where cge is still open. With `searchClosed` searches are
 * planned even for rows that are closed by then.
 */
export function proveSheet(
  structure: Structure,
  request: SheetRequest,
  { stop, searchClosed = false }: { readonly stop?: () => boolean; readonly searchClosed?: boolean } = {},
): ProvedPart {
  const run = (task: SheetTask): SheetFinding => runSheetTask(structure, task, stop);
  const findings = planEigenproblems(structure, request).map(run);
  if (!searchClosed) findings.push(...planLifts(structure, request, allRows(structure, request, findings)).map(run));
  if (searchClosed) return { findings, searches: planSearches(structure, request, new Set()) };
  const rows = allRows(structure, request, findings);
  const closed = new Set(rows.filter((row) => row.closed).map((row) => nameOf(row.key)));
  return {
    findings,
    searches: [...planSearches(structure, request, closed), ...planCells(structure, request, rows)],
  };
}

/** Prove, search and assemble a sheet on this thread. */
export function computeSheet(structure: Structure, request: SheetRequest, stop?: () => boolean): SheetRow[] {
  const { findings, searches } = proveSheet(structure, request, stop ? { stop } : {});
  return assembleSheet(structure, request, [
    ...findings,
    ...searches.map((task) => runSheetTask(structure, task, stop)),
  ]);
}
