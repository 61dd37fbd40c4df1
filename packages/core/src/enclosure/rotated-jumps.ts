import type { ComplexIntervalMatrix } from '../checker/arithmetic/interval-matrix.js';
import { exp } from '../checker/arithmetic/interval-exp.js';
import { type Interval, mul, point } from '../checker/arithmetic/interval.js';
import { rotated, unitaryFrame } from '../checker/arithmetic/unitary-frame.js';
import { widenCorners } from '../checker/arithmetic/widen-corners.js';
import type { ModelBox } from './model-box.js';

/** A jump of the box as L = Σ w (V*AV − ½{V*V,A}) has it. */
export interface WeightedJump {
  readonly matrix: ComplexIntervalMatrix;
  /** w = 2e^{−ω/2}. */
  readonly weight: Interval;
}

/** The jumps in the eigenbasis of σ: widening by a bound on the Frobenius norm may come after an exact rotation. */
export function jumpsInFrame({ jumps, frame, algebra }: ModelBox): WeightedJump[] {
  const rotation = unitaryFrame(frame);
  return jumps.map(({ matrix, radius, frequency }) => ({
    matrix: widenCorners(rotated(rotation, matrix), matrix, algebra.blocks, radius),
    weight: weightOf(frequency),
  }));
}

/** 2e^{−ω/2}. */
export function weightOf(frequency: Interval): Interval {
  return mul(point(2), exp(mul(point(-0.5), frequency)));
}
