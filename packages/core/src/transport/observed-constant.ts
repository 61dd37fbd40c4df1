/** A constant as one place shows it: an upper end that is observed, never a bound from below. */
export interface ObservedConstant {
  /** A rate. */
  readonly value: number;
  /** Estimated error of `value`: what halving the step changes, and rounding. */
  readonly error: number;
  /** Where it was seen: the time along a geodesic or a trajectory. */
  readonly time: number;
  /** State there, coordinates. */
  readonly state: Float64Array;
}

interface Estimate {
  readonly value: number;
  readonly error: number;
}

/** Whether the first bounds a constant better from above: with its error, so that a rough value does not pass for a low one. */
export function isLower(a: Estimate, b: Estimate): boolean {
  return a.value + a.error < b.value + b.error;
}
