import { checkCertificateDocument, makeCertificateDocument } from './tasks/certificate-tasks.js';
import { comparedPair, comparisonDocument, pairsToCompare } from './tasks/comparison-tasks.js';
import { distanceDocument } from './tasks/distance-task.js';
import { flowDocument } from './tasks/flow-task.js';
import { pointSheet } from './tasks/point-task.js';
import { reliefDocument, reliefRings, reliefSlice } from './tasks/relief-tasks.js';
import { reportDocument } from './tasks/report-task.js';
import { sheetDocument, sheetProofs, sheetSearch } from './tasks/sheet-tasks.js';
import { checkWitness, witnessAtState, witnessDocument } from './tasks/witness-tasks.js';

/** Every heavy computation, by the name under which verbs ask the pool for it. */
export const TASKS = {
  report: reportDocument,
  'sheet-proofs': sheetProofs,
  'sheet-search': sheetSearch,
  'sheet-document': sheetDocument,
  'point-sheet': pointSheet,
  'witness-at': witnessAtState,
  'witness-check': checkWitness,
  'witness-found': witnessDocument,
  certify: makeCertificateDocument,
  'compare-starts': pairsToCompare,
  'compare-pair': comparedPair,
  'compare-document': comparisonDocument,
  distance: distanceDocument,
  flow: flowDocument,
  'relief-slice': reliefSlice,
  'relief-rings': reliefRings,
  'relief-document': reliefDocument,
  'certificate-check': checkCertificateDocument,
};
