import { clsiTasks } from '../constants/clsi.js';
import { isUnitarilyCovariant } from '../constants/covariance.js';
import type { EntropyStart } from '../constants/entropy-search.js';
import { lsiTasks } from '../constants/lsi.js';
import { mlsiTasks } from '../constants/mlsi.js';
import { type SearchStart, searchStarts } from '../constants/search-starts.js';
import { isCommutative } from '../algebra/block-algebra.js';
import type { LiftAnsatz } from '../lift/lift-terms.js';
import type { MeanName } from '../metric/operator-mean.js';
import { seededRandom } from '../random.js';
import type { Structure } from '../structure/structure.js';
import { DENSE_LIMIT, FORM_LIMIT, SEARCH_LIMIT } from '../tolerances.js';
import type { ConstantId } from './bracket.js';
import type { CellTask } from './cell-finding.js';
import { type SheetRow, nameOf } from './close-brackets.js';
import type { RowKey } from './order-relations.js';
import { hasGradientMetric } from './hypotheses.js';

/** What a sheet is asked for. */
export interface SheetRequest {
  /** Rows wanted, in order. */
  readonly rows: readonly RowKey[];
  readonly seed: number | string;
  /** Random starts of each search beside the structured ones; null for a number that suits the size. */
  readonly randomStarts: number | null;
  /** ε of `mixing`, trace norm, 0 < ε < 2. */
  readonly epsilon: number;
}

/** One piece of work, plain data; any thread that has analysed the same model can run it. */
export type SheetTask =
  | { readonly kind: 'gap' }
  | { readonly kind: 'bakry-emery'; readonly seed: number | string; readonly withPlain: boolean }
  | { readonly kind: 'comparison' }
  | { readonly kind: 'lift'; readonly target: number; readonly ansatz: LiftAnsatz | null }
  | { readonly kind: 'ge'; readonly mean: MeanName; readonly covariant: boolean; readonly start: SearchStart }
  | CellTask
  | { readonly kind: 'entropy'; readonly start: EntropyStart };

/** The rows of a full sheet, in the order they are shown. */
export const FULL_SHEET: readonly RowKey[] = [
  { id: 'gap' },
  { id: 'ge', mean: 'logarithmic' },
  { id: 'cge' },
  { id: 'be' },
  { id: 'cbe' },
  { id: 'mlsi' },
  { id: 'clsi' },
  { id: 'lsi' },
  { id: 't2' },
  { id: 'diameter' },
  { id: 'mixing' },
];

/** The eigenvalue problems of a sheet, to be run first: what they and the theorems close needs no search. */
export function planEigenproblems(structure: Structure, request: SheetRequest): SheetTask[] {
  const wants = wanting(request);
  const { algebra } = structure;
  const tasks: SheetTask[] = [{ kind: 'gap' }];
  if (algebra.dimension > DENSE_LIMIT) return tasks;
  if (wants('be', 'cbe', 'cge', 'ge') && algebra.dimension * Math.max(...algebra.blocks) <= FORM_LIMIT) {
    tasks.push({ kind: 'bakry-emery', seed: request.seed, withPlain: wants('be') });
  }
  if (wants('clsi', 'mlsi', 't2', 'diameter', 'mixing')) tasks.push({ kind: 'comparison' });
  return tasks;
}

/**
 * The lift that bounds cge, and with it most constants, from below: worth its programme where cge is still open, and the small
 * ansatz also where a closed lower end rests on floating point, which a lift over the rationals improves.
 */
export function planLifts(structure: Structure, request: SheetRequest, rows: readonly SheetRow[]): SheetTask[] {
  const wants = wanting(request);
  const cge = rows.find(({ key }) => key.id === 'cge');
  const target = cge?.upper?.value ?? Infinity;
  const useful = wants('cge', 'ge', 'mlsi', 'clsi', 't2', 'diameter', 'mixing') && hasGradientMetric(structure);
  if (!useful || target === -Infinity || structure.algebra.dimension > FORM_LIMIT) return [];
  if (!cge?.closed) return [{ kind: 'lift', target, ansatz: null }];
  return cge.lower?.grade === 'certified' ? [{ kind: 'lift', target, ansatz: 'diagonal' }] : [];
}

/** The searches of a sheet, cut into independent starts; `closed` names the rows that need none. */
export function planSearches(structure: Structure, request: SheetRequest, closed: ReadonlySet<string>): SheetTask[] {
  const wants = wanting(request);
  if (structure.algebra.dimension > SEARCH_LIMIT || !structure.state?.faithful) return [];
  const options = {
    seed: request.seed,
    ...(request.randomStarts === null ? {} : { randomStarts: request.randomStarts }),
  };
  const entropy: EntropyStart[] = [];
  if (wants('mlsi', 'clsi') && !closed.has('mlsi')) entropy.push(...mlsiTasks(structure, options));
  if (wants('clsi') && !closed.has('clsi')) entropy.push(...clsiTasks(structure, options));
  const hasLsi = structure.fixedPoints?.primitive && structure.symmetry.kind !== 'none';
  if (wants('lsi') && hasLsi && !closed.has('lsi')) entropy.push(...lsiTasks(structure, options));
  return [
    ...gradientEstimateTasks(structure, request, closed),
    ...entropy.map((start): SheetTask => ({ kind: 'entropy', start })),
  ];
}

function wanting(request: SheetRequest): (...ids: ConstantId[]) => boolean {
  return (...ids) => request.rows.some(({ id }) => ids.includes(id));
}

function gradientEstimateTasks(structure: Structure, request: SheetRequest, closed: ReadonlySet<string>): SheetTask[] {
  const { algebra, state, canonical } = structure;
  if (!hasGradientMetric(structure) || !state || !canonical || canonical.jumps.length === 0) return [];
  const means = new Set<MeanName>();
  for (const key of request.rows) {
    const { id, mean } = key;
    if (id === 'ge' && !closed.has(nameOf(key))) means.add(mean ?? 'logarithmic');
    if (id === 'cge' && !closed.has('cge') && !closed.has('ge')) means.add('logarithmic');
  }
  const covariant = isUnitarilyCovariant(structure.generator);
  const diagonal = covariant || isCommutative(algebra);
  const randomStarts = request.randomStarts ?? (algebra.dimension <= 4 ? 4 : 8);
  return [...means].flatMap((mean) =>
    searchStarts(
      algebra,
      { lambda: state.values, u: isCommutative(algebra) ? null : state.vectors },
      diagonal,
      randomStarts,
      seededRandom(`ge ${mean} ${request.seed}`),
    ).map((start): SheetTask => ({ kind: 'ge', mean, covariant, start })),
  );
}
