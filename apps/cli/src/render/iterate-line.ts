import type { ProgrammeIterate } from '@thalweg/core';

/** One iteration of the interior-point method on a line. */
export function iterateLine({
  iteration,
  primalObjective,
  dualObjective,
  gap,
  dualInfeasibility,
}: ProgrammeIterate): string {
  const objectives = `${primalObjective.toPrecision(10)} ${dualObjective.toPrecision(10)}`;
  return `iteration ${iteration}: objective ${objectives}, gap ${gap.toExponential(2)}, infeasibility ${dualInfeasibility.toExponential(2)}`;
}
