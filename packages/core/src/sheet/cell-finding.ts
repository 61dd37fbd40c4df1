import { gradientEstimateByCells } from '../cells/gradient-estimate-cells.js';
import { type GradientEstimateProblem, runGradientEstimateStart } from '../constants/gradient-estimate.js';
import type { SearchStart } from '../constants/search-starts.js';
import type { Structure } from '../structure/structure.js';
import type { End } from './bracket.js';

/** A lower end of `ge` by branch and bound over all states, aimed at the best of some starts of the search. */
export interface CellTask {
  readonly kind: 'cells';
  readonly covariant: boolean;
  readonly starts: readonly SearchStart[];
  /** Ends of `ge` known before. */
  readonly lower: number;
  readonly upper: number;
  /** A rate that sets the scale: the gap. */
  readonly scale: number;
}

/** Run it: search first, then prove just below what was found. */
export function cellEnd(
  structure: Structure,
  problem: GradientEstimateProblem,
  task: CellTask,
  stop?: () => boolean,
): End | null {
  let upper = task.upper;
  for (const start of task.starts) {
    const { value, error } = runGradientEstimateStart(problem, start, stop);
    upper = Math.min(upper, value + error);
  }
  if (!(upper < Infinity)) return null;
  const bound = gradientEstimateByCells(structure, {
    upper,
    lower: task.lower,
    scale: Math.max(Math.abs(upper), task.scale),
    ...(stop ? { shouldStop: stop } : {}),
  });
  return (
    bound && {
      value: bound.value,
      grade: 'enclosed',
      by: `all states, cut into ${bound.cells} cells`,
    }
  );
}
