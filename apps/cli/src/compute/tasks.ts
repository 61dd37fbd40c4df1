import { reportDocument } from './tasks/report-task.js';
import { sheetDocument, sheetEigenproblems, sheetSearch } from './tasks/sheet-tasks.js';
import { checkWitness, witnessAtState } from './tasks/witness-tasks.js';

/** Every heavy computation, by the name under which verbs ask the pool for it. */
export const TASKS = {
  report: reportDocument,
  'sheet-eigenproblems': sheetEigenproblems,
  'sheet-search': sheetSearch,
  'sheet-document': sheetDocument,
  'witness-at': witnessAtState,
  'witness-check': checkWitness,
};
