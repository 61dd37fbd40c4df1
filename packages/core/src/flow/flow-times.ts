import type { ComplexMatrix } from '../linalg/complex-matrix.js';

/** The times of a flow: `points` ≥ 2 of them, evenly from 0 to `until` > 0. */
export interface FlowTimes {
  readonly until: number;
  readonly points: number;
}

/** Time of point k of a flow. */
export function timeOf({ until, points }: FlowTimes, k: number): number {
  return (until * k) / (points - 1);
}

/** A state of the flow as its distance from the limit, which keeps its relative accuracy however small it becomes. */
export interface FlowStep {
  readonly time: number;
  /** P_t†ρ − E†ρ, N×N Hermitian. */
  readonly deviation: ComplexMatrix;
  /** L†P_t†ρ, the same with units 1/time. */
  readonly velocity: ComplexMatrix;
  /** Error of the deviation in trace norm: a bound along eigenvectors, an estimate otherwise. */
  readonly error: number;
}
