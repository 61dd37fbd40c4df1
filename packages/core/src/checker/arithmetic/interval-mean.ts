import { type Interval, ONE, ZERO, add, div, mul, point, sqrt } from './interval.js';
import { logarithmicMean, logarithmicMeanDifference } from './interval-log-mean.js';

/** The operator means the checker knows (Kubo & Ando 1980). */
export type EnclosedMeanName = 'logarithmic' | 'arithmetic' | 'geometric' | 'harmonic' | 'left' | 'right';

/** Enclosures of a mean F and of its divided differences over positive arguments. */
export interface EnclosedMean {
  /** F(x,y). */
  readonly value: (x: Interval, y: Interval) => Interval;
  /** (F(x1,y) − F(x2,y))/(x1 − x2), the derivative in x where they meet. */
  readonly firstDifference: (x1: Interval, x2: Interval, y: Interval) => Interval;
  /** (F(x,y1) − F(x,y2))/(y1 − y2), the derivative in y where they meet. */
  readonly secondDifference: (x: Interval, y1: Interval, y2: Interval) => Interval;
}

/** The mean of the given name; all but left and right are symmetric, F(x,y) = F(y,x). */
export function enclosedMean(name: EnclosedMeanName): EnclosedMean {
  return MEANS[name];
}

const HALF = point(0.5);

const MEANS: Record<EnclosedMeanName, EnclosedMean> = {
  logarithmic: symmetricMean(logarithmicMean, logarithmicMeanDifference),
  arithmetic: symmetricMean(
    (x, y) => add(mul(HALF, x), mul(HALF, y)),
    () => HALF,
  ),
  geometric: symmetricMean(
    (x, y) => mul(sqrt(x), sqrt(y)),
    (x1, x2, y) => div(sqrt(y), add(sqrt(x1), sqrt(x2))),
  ),
  harmonic: symmetricMean(
    (x, y) => ({ lo: harmonicOfPoints(x.lo, y.lo).lo, hi: harmonicOfPoints(x.hi, y.hi).hi }),
    (x1, x2, y) => ({
      lo: harmonicDifferenceOfPoints(x1.hi, x2.hi, y.lo).lo,
      hi: harmonicDifferenceOfPoints(x1.lo, x2.lo, y.hi).hi,
    }),
  ),
  left: { value: (x) => x, firstDifference: () => ONE, secondDifference: () => ZERO },
  right: { value: (_x, y) => y, firstDifference: () => ZERO, secondDifference: () => ONE },
};

function symmetricMean(value: EnclosedMean['value'], firstDifference: EnclosedMean['firstDifference']): EnclosedMean {
  return { value, firstDifference, secondDifference: (x, y1, y2) => firstDifference(y1, y2, x) };
}

/** 2xy/(x+y), increasing in both; the smaller argument times a number between 1 and 2. */
function harmonicOfPoints(x: number, y: number): Interval {
  const small = Math.min(x, y);
  const large = Math.max(x, y);
  if (!(small > 0)) return ZERO;
  if (large === Infinity) return { lo: 0, hi: Infinity };
  return mul(point(small), div(point(large), add(mul(HALF, point(small)), mul(HALF, point(large)))));
}

/** 2y²/((x1+y)(x2+y)), decreasing in x1 and x2, increasing in y. */
function harmonicDifferenceOfPoints(x1: number, x2: number, y: number): Interval {
  if (!(y > 0) || x1 === Infinity || x2 === Infinity) return ZERO;
  if (y === Infinity) return { lo: 0, hi: 2 };
  return mul(point(2), mul(share(y, x1), share(y, x2)));
}

/** y/(x+y) for finite x ≥ 0, y > 0. */
function share(y: number, x: number): Interval {
  const half = mul(HALF, point(y));
  return div(half, add(half, mul(HALF, point(x))));
}
