import { logarithmicMean, logarithmicMeanDifference } from './logarithmic-mean.js';

export const MEAN_NAMES = ['logarithmic', 'arithmetic', 'geometric', 'harmonic', 'left', 'right'] as const;

export type MeanName = (typeof MEAN_NAMES)[number];

/** An operator mean through its function of two positive numbers (Kubo & Ando 1980). */
export interface OperatorMean {
  readonly name: MeanName;
  /** F(x,y) = F(y,x): then self-adjoint observables suffice. */
  readonly symmetric: boolean;
  /** F(x,y) for x, y > 0. */
  readonly value: (x: number, y: number) => number;
  /** (F(x1,y) − F(x2,y))/(x1 − x2), the derivative in x when they meet; the two values may be given where they are known. */
  readonly firstDifference: (x1: number, x2: number, y: number, value1?: number, value2?: number) => number;
  /** (F(x,y1) − F(x,y2))/(y1 − y2), the derivative in y when they meet. */
  readonly secondDifference: (x: number, y1: number, y2: number, value1?: number, value2?: number) => number;
}

/** The operator mean of the given name. */
export function operatorMean(name: MeanName): OperatorMean {
  return MEANS[name];
}

const MEANS: Record<MeanName, OperatorMean> = {
  logarithmic: symmetricMean('logarithmic', logarithmicMean, logarithmicMeanDifference),
  arithmetic: symmetricMean(
    'arithmetic',
    (x, y) => (x + y) / 2,
    () => 0.5,
  ),
  geometric: symmetricMean(
    'geometric',
    (x, y) => Math.sqrt(x) * Math.sqrt(y),
    (x1, x2, y) => Math.sqrt(y) / (Math.sqrt(x1) + Math.sqrt(x2)),
  ),
  harmonic: symmetricMean(
    'harmonic',
    (x, y) => (2 * x * y) / (x + y),
    (x1, x2, y) => (2 * (y / (x1 + y)) * y) / (x2 + y),
  ),
  left: {
    name: 'left',
    symmetric: false,
    value: (x) => x,
    firstDifference: () => 1,
    secondDifference: () => 0,
  },
  right: {
    name: 'right',
    symmetric: false,
    value: (_x, y) => y,
    firstDifference: () => 0,
    secondDifference: () => 1,
  },
};

function symmetricMean(
  name: MeanName,
  value: OperatorMean['value'],
  firstDifference: OperatorMean['firstDifference'],
): OperatorMean {
  return {
    name,
    symmetric: true,
    value,
    firstDifference,
    secondDifference: (x, y1, y2, value1, value2) => firstDifference(y1, y2, x, value1, value2),
  };
}
