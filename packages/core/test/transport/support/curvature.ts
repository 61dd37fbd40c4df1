import type { Witness } from '../../../src/sheet/bracket.js';
import { assembleSheet } from '../../../src/sheet/assemble-sheet.js';
import { proveSheet } from '../../../src/sheet/compute-sheet.js';
import { runSheetTask } from '../../../src/sheet/run-sheet-task.js';
import type { SheetRequest } from '../../../src/sheet/sheet-plan.js';
import type { Structure } from '../../../src/structure/structure.js';
import { comparisonWitness } from '../../../src/transport/comparison-witness.js';

const REQUEST: SheetRequest = {
  rows: [{ id: 'gap' }, { id: 'ge', mean: 'logarithmic' }],
  seed: 1,
  randomStarts: 2,
  epsilon: 0.01,
};

/** The proved lower end of `ge`: by theorems where they give a positive one, else by a lift. */
export function provedCurvature(structure: Structure): number {
  const lower = (searchClosed: boolean): number => {
    const { findings } = proveSheet(structure, REQUEST, { searchClosed });
    const rows = assembleSheet(structure, REQUEST, findings);
    return rows.find(({ key }) => key.id === 'ge')?.lower?.value ?? -Infinity;
  };
  const byTheorems = lower(true);
  return byTheorems > 0 ? byTheorems : lower(false);
}

/** The witness of `ge` that a search finds, and the gap. */
export function searchedCurvature(structure: Structure): { readonly witness: Witness; readonly gap: number } {
  const { findings, searches } = proveSheet(structure, REQUEST, { searchClosed: true });
  const witness = comparisonWitness(searches.map((task) => runSheetTask(structure, task)));
  const gap = findings.flatMap((finding) => (finding.kind === 'gap' ? [finding.dense?.value ?? 1] : []))[0];
  if (!witness) throw new Error('expected a witness');
  return { witness, gap };
}
