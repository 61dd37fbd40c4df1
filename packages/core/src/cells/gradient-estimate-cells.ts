import type { Structure } from '../structure/structure.js';
import { proveOverCells } from './branch-and-bound.js';
import type { CellForms } from './cell-forms.js';
import type { ChainRates } from './chain-edges.js';
import { chainForms } from './chain-forms.js';
import { chainRates } from './chain-rates.js';
import {
  CELL_BUDGET,
  CELL_CHAIN_POINTS,
  CLOSING_GROWTH,
  CLOSING_WIDTH,
  COARSE_WIDTH,
  FIRST_SHARE,
  FIRST_WIDTH,
  SECOND_WIDTH,
} from './limits.js';
import { qubitAxes } from './qubit-axes.js';
import { tracialQubitForms } from './tracial-qubit-forms.js';

/** A rate K proved to be a lower bound of `ge` with the logarithmic mean, in interval arithmetic. */
export interface CellBound {
  readonly value: number;
  /** Cells of states examined in the proof. */
  readonly cells: number;
}

/** What to aim at. */
export interface CellTarget {
  /** A value of the quotient at some state: K is sought just below it. */
  readonly upper: number;
  /** A bound already known; values not above it are of no use. */
  readonly lower: number;
  /** A rate: how near to `upper` K is sought is measured in it. */
  readonly scale: number;
  readonly maxCells?: number;
  readonly shouldStop?: () => boolean;
}

/**
 * Lower bound of `ge` by branch and bound over the states, for chains of two or three points and for primitive qubits with tracial
 * symmetry; null when the structure is of another kind or nothing above `lower` is proved.
 *
 * Proved is q_ρ(A) ≥ K‖A‖²_ρ for all faithful states ρ and all A, for every generator of the kind whose rates (chains, with the metric
 * Σ Λ(r_xyρ_x, r_yxρ_y)(a_y − a_x)² over pairs) or Kossakowski matrix (qubits) lie in intervals a few roundings wide about those of the
 * structure. By §5 of Carlen & Maas (2017) this is the gradient estimate at the faithful states, which P_t† keeps faithful; at others
 * ρ ↦ ‖P_tA‖²_ρ and ρ ↦ ‖A‖²_{P_t†ρ} are continuous, and the estimate is closed.
 */
export function gradientEstimateByCells(structure: Structure, target: CellTarget): CellBound | null {
  const charts = cellCharts(structure);
  return charts && boundOnCharts(charts, target);
}

/**
 * Near a smooth minimum every digit costs as many cells as the one before, along a valley a multiple of them: the second attempt tells
 * whether the bracket can be closed.
 */
function boundOnCharts(charts: readonly CellForms[], target: CellTarget): CellBound | null {
  let left = target.maxCells ?? CELL_BUDGET;
  const attempt = (width: number, share = 1): CellBound | null => {
    const value = target.upper - width * target.scale;
    if (!(value > target.lower)) return null;
    const { proved, cells } = proveOnCharts(charts, value, Math.floor(share * left), target.shouldStop);
    left -= cells;
    return proved ? { value, cells } : null;
  };
  const first = attempt(FIRST_WIDTH, FIRST_SHARE);
  if (!first && target.upper - FIRST_WIDTH * target.scale > target.lower) return attempt(COARSE_WIDTH);
  const second = attempt(SECOND_WIDTH);
  if (!second) return first;
  const isSmooth = !first || second.cells <= CLOSING_GROWTH * first.cells;
  return (isSmooth ? attempt(CLOSING_WIDTH) : null) ?? second;
}

/** Try to prove q_ρ ≥ K‖·‖²_ρ on every chart within a number of cells. */
function proveOnCharts(charts: readonly CellForms[], k: number, maxCells: number, shouldStop?: () => boolean) {
  let cells = 0;
  for (const chart of charts) {
    const result = proveOverCells(chart, k, { maxCells: maxCells - cells, ...(shouldStop ? { shouldStop } : {}) });
    cells += result.cells;
    if (!result.proved) return { proved: false, cells };
  }
  return { proved: true, cells };
}

/** Charts that cover the states of a structure up to its symmetries; null when it is of no kind known here. */
export function cellCharts(structure: Structure): CellForms[] | null {
  const { generator, canonical, symmetry, fixedPoints } = structure;
  if (!canonical || !fixedPoints?.primitive) return null;
  const rates = structure.algebra.size <= CELL_CHAIN_POINTS ? chainRates(generator) : null;
  if (rates) return chainCharts(rates);
  const axes = symmetry.kind === 'tracial' ? qubitAxes(canonical) : null;
  return axes && [tracialQubitForms(axes.body, axes.angles)];
}

/** One chart for every order of the points by size of ρ; orders with the same rates are alike. */
function chainCharts(rates: ChainRates): CellForms[] {
  const charts = new Map<string, CellForms>();
  for (const order of orders(rates.length)) {
    const turned = order.map((x) => order.map((y) => rates[x][y]));
    const key = JSON.stringify(turned);
    if (!charts.has(key)) charts.set(key, chainForms(turned));
  }
  return [...charts.values()];
}

function orders(n: number): number[][] {
  if (n === 0) return [[]];
  return orders(n - 1).flatMap((order) =>
    Array.from({ length: n }, (_, at) => [...order.slice(0, at), n - 1, ...order.slice(at)]),
  );
}
