import { exp, expm1, phi2 } from '../checker/arithmetic/interval-exp.js';
import { log, logRatio } from '../checker/arithmetic/interval-log.js';
import { type Interval, ONE, abs, add, mul, neg, point, sqr, sub, width } from '../checker/arithmetic/interval.js';

/** (x − y)(log x − log y) for x = e^{ω/2}λ, y = e^{−ω/2}μ: with t = log x − log y, y(e^t − 1)t without cancellation. */
export function productionEnclosure(lambda: number, mu: number, omega: Interval): Interval {
  const { smaller, gap } = ordered(lambda, mu, omega);
  return nonNegative(mul(smaller, mul(expm1(gap), gap)));
}

/** (√x − √y)² for the same x and y. */
export function rootDifferenceEnclosure(lambda: number, mu: number, omega: Interval): Interval {
  const { smaller, gap } = ordered(lambda, mu, omega);
  return nonNegative(mul(smaller, sqr(expm1(mul(point(0.5), gap)))));
}

/** λ log(λ/μ) − λ + μ = λd²φ₂(−d), d = log(λ/μ): a summand of the relative entropy. */
export function divergenceEnclosure(lambda: number, mu: Interval): Interval {
  const d = sub(log(point(lambda)), log(mu));
  const near = mu.lo === mu.hi ? logRatio(lambda, mu.lo) : d;
  return nonNegative(mul(point(lambda), mul(sqr(near), phi2(neg(near)))));
}

/** The smaller of x and y, and the modulus of t, taken from the side that does not overflow. */
function ordered(lambda: number, mu: number, omega: Interval): { smaller: Interval; gap: Interval } {
  const t = add(logRatio(lambda, mu), omega);
  const half = mul(point(0.5), omega);
  const smaller = t.lo + t.hi > 0 ? mul(exp(neg(half)), point(mu)) : mul(exp(half), point(lambda));
  // Where t may have either sign, both functions are those of |t| times the smaller argument to the width of t.
  const either = t.lo < 0 && t.hi > 0 ? exp({ lo: -width(t), hi: width(t) }) : ONE;
  return { smaller: mul(smaller, either), gap: abs(t) };
}

function nonNegative(x: Interval): Interval {
  return { lo: Math.max(0, x.lo), hi: x.hi };
}
