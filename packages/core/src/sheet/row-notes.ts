import type { Structure } from '../structure/structure.js';
import { DENSE_LIMIT, FORM_LIMIT, SEARCH_LIMIT } from '../tolerances.js';
import type { End } from './bracket.js';
import { hasGradientMetric } from './hypotheses.js';
import type { SheetRow } from './close-brackets.js';
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
  if ((id === 'mixing' || id === 'lsi') && symmetry.kind === 'none') {
    notes.push(
      id === 'mixing'
        ? 'the bounds on it need KMS symmetry; this generator has none'
        : 'an upper end needs KMS symmetry; this generator has none',
    );
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

/** Why an end is still missing once all ends have been passed along. */
export function missingEndNotes(structure: Structure, row: SheetRow, t2: End | null): string[] {
  const { key, lower, upper, notes } = row;
  const { fixedPoints, algebra } = structure;
  if (notes.length > 0) return [];
  if (key.id === 'gap' && fixedPoints?.dimension === algebra.dimension) {
    return ['L = 0: every observable is fixed, and the inequality holds with any constant'];
  }
  if (key.id === 'cge' && !lower) {
    return upper?.value === -Infinity
      ? ['no complete curvature bound exists']
      : ['no lower end: no theorem applies, and no lift of ∂ was found among the forms tried'];
  }
  if (key.id === 'diameter' && !upper && !t2) return ['only a positive lower end of t2 bounds it, and none is known'];
  return [];
}

function needsSearch(id: RowKey['id']): boolean {
  return id === 'ge' || id === 'mlsi' || id === 'clsi' || id === 'lsi';
}

function findingNotes(found: readonly SheetFinding[], id: RowKey['id']): string[] {
  if (id === 'be' || id === 'cbe') {
    const finding = found.find(({ kind }) => kind === 'bakry-emery');
    if (finding?.kind !== 'bakry-emery') return [];
    if (!finding.complete.decided) return ['the kernel of Γ could not be told from its range in double precision'];
    if (id === 'cbe' && finding.direction !== null) return [`unbounded below: ${finding.direction}`];
    const value = id === 'cbe' ? finding.complete.value : finding.plain?.value;
    if (value === -Infinity) return ['unbounded below: Γ₂ is negative, or unbalanced, where Γ vanishes'];
  }
  return [];
}
