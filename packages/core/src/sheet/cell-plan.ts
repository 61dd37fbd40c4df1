import { cellCharts } from '../cells/gradient-estimate-cells.js';
import type { Structure } from '../structure/structure.js';
import type { ConstantId } from './bracket.js';
import type { CellTask } from './cell-finding.js';
import type { SheetRow } from './close-brackets.js';
import { hasGradientMetric } from './hypotheses.js';
import { type SheetRequest, type SheetTask, planSearches } from './sheet-plan.js';

/** Rows that a lower end of `ge` improves. */
const ABOVE: readonly ConstantId[] = ['ge', 'mlsi', 't2', 'diameter', 'mixing'];

/** The lower end of `ge` by cells of states: where these can be covered by them, and nothing stronger has closed the bracket. */
export function planCells(structure: Structure, request: SheetRequest, rows: readonly SheetRow[]): SheetTask[] {
  const ge = rows.find(({ key }) => key.id === 'ge' && (key.mean ?? 'logarithmic') === 'logarithmic');
  const scale = rows.find(({ key }) => key.id === 'gap')?.upper?.value ?? NaN;
  const isRounded = ge?.lower?.grade === 'certified';
  const useful = request.rows.some(({ id, mean }) => ABOVE.includes(id) && (mean ?? 'logarithmic') === 'logarithmic');
  if (!useful || !ge || (ge.closed && !isRounded) || !(scale > 0 && scale < Infinity) || !hasGradientMetric(structure))
    return [];
  if (!cellCharts(structure)) return [];
  const searches = planSearches(structure, { ...request, rows: [{ id: 'ge', mean: 'logarithmic' }] }, new Set());
  const task: CellTask = {
    kind: 'cells',
    covariant: searches.some((search) => search.kind === 'ge' && search.covariant),
    starts: searches.flatMap((search) => (search.kind === 'ge' ? [search.start] : [])),
    lower: isRounded ? -Infinity : (ge.lower?.value ?? -Infinity),
    upper: ge.upper?.value ?? Infinity,
    scale,
  };
  return [task];
}
