import { exp } from './interval-exp.js';
import { type EnclosedMeanName, enclosedMean } from './interval-mean.js';
import { type Interval, mul, neg, point } from './interval.js';

/** F_ab = F(e^{ω/2}λ_a, e^{−ω/2}λ_b) and its divided differences for one frequency, enclosed when first asked for. */
export interface MeanTableEnclosure {
  /** F_ab. */
  readonly value: (a: number, b: number) => Interval;
  /** (F_ab − F_cb)/(λ_a − λ_c), the derivative in λ_a where they meet. */
  readonly left: (a: number, c: number, b: number) => Interval;
  /** (F_ac − F_ab)/(λ_c − λ_b), the derivative in λ_b where they meet. */
  readonly right: (a: number, c: number, b: number) => Interval;
}

/**
 * Tables over eigenvalues λ > 0 and a frequency. Every mean is homogeneous, so that the exponentials
 * stand outside or in a single argument: F_ab = e^{ω/2}F(λ_a, e^{−ω}λ_b) = e^{−ω/2}F(e^{ω}λ_a, λ_b).
 */
export function meanTableEnclosure(
  name: EnclosedMeanName,
  lambda: readonly Interval[],
  frequency: Interval,
): MeanTableEnclosure {
  const mean = enclosedMean(name);
  const n = lambda.length;
  const half = exp(mul(HALF, frequency));
  const minusHalf = exp(neg(mul(HALF, frequency)));
  const raised = lambda.map((x) => mul(exp(frequency), x));
  const lowered = lambda.map((x) => mul(exp(neg(frequency)), x));
  const values = new Map<number, Interval>();
  const lefts = new Map<number, Interval>();
  const rights = new Map<number, Interval>();
  return {
    value: (a, b) => cached(values, a * n + b, () => mul(half, mean.value(lambda[a], lowered[b]))),
    left: (a, c, b) =>
      cached(lefts, (Math.min(a, c) * n + Math.max(a, c)) * n + b, () =>
        mul(half, mean.firstDifference(lambda[a], lambda[c], lowered[b])),
      ),
    right: (a, c, b) =>
      cached(rights, (a * n + Math.min(b, c)) * n + Math.max(b, c), () =>
        mul(minusHalf, mean.secondDifference(raised[a], lambda[c], lambda[b])),
      ),
  };
}

const HALF = point(0.5);

function cached(store: Map<number, Interval>, key: number, make: () => Interval): Interval {
  const known = store.get(key);
  if (known) return known;
  const value = make();
  store.set(key, value);
  return value;
}
