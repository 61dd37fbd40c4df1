import type { CellForms } from './cell-forms.js';
import { type Cell, displacements, halves, isBounded } from './cell.js';
import { inverseFactor, isPositiveDefinite, meanValueMatrix } from './definite.js';
import { FARTHEST } from './limits.js';

/** Outcome of one attempt. */
export interface CellProof {
  /** q_ρ ≥ K‖·‖²_ρ at every state of the root. */
  readonly proved: boolean;
  /** Cells examined. */
  readonly cells: number;
}

/** Try to prove q_ρ ≥ K‖·‖²_ρ over the root by subdivision, depth first, within a number of cells. */
export function proveOverCells(
  forms: CellForms,
  k: number,
  limits: { readonly maxCells: number; readonly shouldStop?: () => boolean },
): CellProof {
  const stack: Cell[] = [forms.root];
  let cells = 0;
  for (let cell = stack.pop(); cell; cell = stack.pop()) {
    if (cells >= limits.maxCells || (cells % 32 === 31 && limits.shouldStop?.())) return { proved: false, cells };
    cells++;
    const cut = cutOf(forms, cell, k);
    if (cut === 'never') return { proved: false, cells };
    if (cut !== 'none') stack.push(...halves(cell, cut));
  }
  return { proved: true, cells };
}

/**
 * The coordinate along which a cell must be cut, none where the form is positive on it; never when it is not at the centre, or the
 * cell is too near infinity to go on.
 */
function cutOf(forms: CellForms, cell: Cell, k: number): number | 'none' | 'never' {
  const { below, jets, exact } = forms.at(cell, k);
  if (isPositiveDefinite(below, forms.side)) return 'none';
  const factor = inverseFactor(jets, forms.side);
  if (!factor) return exact || isFarthest(cell) ? 'never' : largest(cell.map(extent));
  const { entries, influence, spread } = meanValueMatrix(jets, forms.side, factor, displacements(cell));
  if (isPositiveDefinite(entries, forms.side)) return 'none';
  return isFarthest(cell)
    ? 'never'
    : largest(cell.map((range, l) => (isBounded(range) ? influence[l] : spread / (1 + range.lo))));
}

function isFarthest(cell: Cell): boolean {
  return cell.some(({ lo, hi }) => hi === Infinity && lo > FARTHEST);
}

function largest(values: readonly number[]): number {
  return values.reduce((best, value, k) => (value > values[best] ? k : best), 0);
}

function extent({ lo, hi }: { readonly lo: number; readonly hi: number }): number {
  return hi < Infinity ? hi - lo : 16 / (1 + Math.abs(lo));
}
