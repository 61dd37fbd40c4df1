import { checkCertificateDocument, makeCertificateDocument } from './tasks/certificate-tasks.js';
import { reportDocument } from './tasks/report-task.js';
import { sheetDocument, sheetProofs, sheetSearch } from './tasks/sheet-tasks.js';
import { checkWitness, witnessAtState } from './tasks/witness-tasks.js';

/** Every heavy computation, by the name under which verbs ask the pool for it. */
export const TASKS = {
  report: reportDocument,
  'sheet-proofs': sheetProofs,
  'sheet-search': sheetSearch,
  'sheet-document': sheetDocument,
  'witness-at': witnessAtState,
  'witness-check': checkWitness,
  certify: makeCertificateDocument,
  'certificate-check': checkCertificateDocument,
};
