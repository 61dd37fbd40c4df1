import type { Structure } from '../structure/structure.js';
import { assembleSheet, closedRows } from './assemble-sheet.js';
import type { SheetRow } from './close-brackets.js';
import { runSheetTask } from './run-sheet-task.js';
import { type SheetRequest, planEigenproblems, planSearches } from './sheet-plan.js';

/** Plan, run and assemble a sheet on this thread. */
export function computeSheet(structure: Structure, request: SheetRequest, stop?: () => boolean): SheetRow[] {
  const first = planEigenproblems(structure, request).map((task) => runSheetTask(structure, task, stop));
  const searches = planSearches(structure, request, closedRows(structure, request, first));
  const rest = searches.map((task) => runSheetTask(structure, task, stop));
  return assembleSheet(structure, request, [...first, ...rest]);
}
