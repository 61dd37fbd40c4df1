import type { SheetFinding } from '../sheet/run-sheet-task.js';
import type { Witness } from '../sheet/bracket.js';
import { WITNESS_TIE } from './tolerances.js';

/**
 * The witness of `ge` that a comparison starts from: among those that are lowest to rounding the one furthest from the boundary of
 * state space, where geodesics are resolved best. Null where no search was made.
 */
export function comparisonWitness(findings: readonly SheetFinding[]): Witness | null {
  const found = findings.flatMap((finding) =>
    finding.kind === 'ge' && finding.mean === 'logarithmic' ? [finding.result] : [],
  );
  if (found.length === 0) return null;
  const lowest = Math.min(...found.map(({ value }) => value));
  const tied = found.filter(({ value }) => value <= lowest + WITNESS_TIE * Math.max(1, Math.abs(lowest)));
  const { value, state, observable } = tied.reduce((a, b) => (b.smallestEigenvalue > a.smallestEigenvalue ? b : a));
  return { constant: 'ge', mean: 'logarithmic', value, state, observable, amplification: 1 };
}
