import type { Structure } from '../structure/structure.js';
import { DENSE_LIMIT, FORM_LIMIT, SEARCH_LIMIT } from '../tolerances.js';
import { hasGradientMetric } from './hypotheses.js';
import type { RowKey } from './order-relations.js';
import type { SheetFinding } from './run-sheet-task.js';

/** What a reader of one row should know: why an end is missing, or what a value rests on. */
export function rowNotes(structure: Structure, found: readonly SheetFinding[], { id }: RowKey): string[] {
  const notes: string[] = [];
  const { algebra, state, symmetry, fixedPoints } = structure;
  if (!state?.faithful && id !== 'be' && id !== 'cbe') {
    return ['no faithful invariant state: this constant is not defined'];
  }
  const needsMetric = id === 'ge' || id === 'cge' || id === 't2' || id === 'diameter';
  if (needsMetric && !hasGradientMetric(structure)) {
    notes.push(
      `the gradient-flow metric needs GNS symmetry; this generator has ${symmetry.kind === 'none' ? 'none' : 'KMS symmetry only'}`,
    );
  }
  const needsPrimitive = id === 't2' || id === 'diameter' || id === 'lsi';
  if (needsPrimitive && fixedPoints && !fixedPoints.primitive) {
    notes.push('not primitive: states in different components stay apart, so this constant is not given');
  }
  if (id !== 'gap' && algebra.dimension > DENSE_LIMIT) {
    notes.push(`dimension ${algebra.dimension} is above ${DENSE_LIMIT}: only the gap is computed`);
  } else if (needsSearch(id) && algebra.dimension > SEARCH_LIMIT) {
    notes.push(`dimension ${algebra.dimension} is above ${SEARCH_LIMIT}: no search over states was made`);
  }
  if ((id === 'be' || id === 'cbe') && algebra.dimension * Math.max(...algebra.blocks) > FORM_LIMIT) {
    notes.push(`the forms Γ and Γ₂ would have side above ${FORM_LIMIT}: not computed`);
  }
  return [...notes, ...findingNotes(found, id)];
}

function needsSearch(id: RowKey['id']): boolean {
  return id === 'ge' || id === 'mlsi' || id === 'clsi' || id === 'lsi';
}

function findingNotes(found: readonly SheetFinding[], id: RowKey['id']): string[] {
  if (id === 'be' || id === 'cbe') {
    const finding = found.find(({ kind }) => kind === 'bakry-emery');
    if (finding?.kind !== 'bakry-emery') return [];
    if (!finding.complete.decided) return ['the kernel of Γ could not be told from its range in double precision'];
    if (finding.complete.value === -Infinity)
      return ['unbounded below: Γ₂ is negative, or unbalanced, where Γ vanishes'];
  }
  return [];
}
