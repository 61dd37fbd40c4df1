import type { Generator } from '../generator/generator.js';
import { complexIntervalZeros, setEntry } from './arithmetic/interval-matrix.js';
import { smallestEigenvalueBound } from './arithmetic/smallest-eigenvalue-bound.js';
import { type Frame, imageInFrame } from './frame.js';
import { imageOfUnit, liftDefect, unitsOf } from './lift-defects.js';
import type { Condition } from './lift-certificate.js';
import type { RingModel } from './ring-model.js';
import type { Complex } from './ring.js';
import { type SparseOperator, addProduct, addScaled, emptyOperator } from './sparse-operator.js';
import { RESIDUAL_LIMIT } from './tolerances.js';

/** A residual that must stay below its limit; NaN fails. */
export function residual(name: string, value: number, limit: number, note?: string): Condition {
  return { name, kind: 'residual', value, limit, holds: value <= limit, ...(note === undefined ? {} : { note }) };
}

/** σ is Hermitian, of trace one (residuals), and its smallest eigenvalue has a positive lower bound (rigorous). */
export function stateConditions({ ring, algebra, sigma }: RingModel<Complex>): { list: Condition[]; smallest: number } {
  const n = algebra.size;
  const matrix = complexIntervalZeros(n);
  let skew = 0;
  let outside = 0;
  let trace = ring.zero;
  sigma.forEach((row, i) => {
    for (const [j, x] of row) {
      const mirror = sigma[j].get(i) ?? ring.zero;
      skew = Math.max(skew, Math.hypot(x.re - mirror.re, x.im + mirror.im));
      if (algebra.blockOf[i] !== algebra.blockOf[j]) outside = Math.max(outside, Math.hypot(x.re, x.im));
      if (i === j) trace = ring.add(trace, x);
      // The Hermitian part, from the lower triangle: `skew` bounds what is dropped.
      const [re, im] = [x.re, i === j ? 0 : x.im];
      if (i < j) continue;
      setEntry(matrix, i, j, { re: { lo: re, hi: re }, im: { lo: im, hi: im } });
      setEntry(matrix, j, i, { re: { lo: re, hi: re }, im: { lo: -im, hi: -im } });
    }
  });
  const defect = Math.max(skew, outside, Math.hypot(trace.re - 1, trace.im));
  const smallest = smallestEigenvalueBound(matrix) - n * skew;
  const positive: Condition = {
    name: 'state faithful, smallest eigenvalue',
    kind: 'margin',
    value: smallest,
    limit: 0,
    holds: smallest > 0,
  };
  return { list: [residual('state Hermitian, in the algebra, trace 1', defect, RESIDUAL_LIMIT), positive], smallest };
}

/** σW = Wσ/ratio, relative to the smallest eigenvalue of σ. */
export function modularCondition({ ring, sigma, jumps }: RingModel<Complex>, smallest: number): Condition {
  let worst = 0;
  for (const { w, ratio } of jumps) {
    const defect = emptyOperator<Complex>(w.length);
    const inverse = 1 / ratio.re;
    addProduct(ring, defect, { re: 1, im: 0 }, sigma, w);
    addProduct(ring, defect, { re: -inverse, im: 0 }, w, sigma);
    worst = larger(worst, norm(defect) / (norm(w) * smallest * Math.max(1, inverse)));
  }
  return residual('σWσ⁻¹ = W/ratio for every jump', worst, RESIDUAL_LIMIT);
}

/** The partner is W*, its rate is rate·ratio and its ratio 1/ratio. */
export function partnerCondition({ ring, jumps }: RingModel<Complex>): Condition {
  let worst = 0;
  jumps.forEach(({ adjoint, rate, ratio, partner }, j) => {
    const other = jumps[partner];
    if (other.partner !== j) worst = Infinity;
    const defect = emptyOperator<Complex>(adjoint.length);
    addScaled(ring, defect, { re: 1, im: 0 }, other.w);
    addScaled(ring, defect, { re: -1, im: 0 }, adjoint);
    worst = larger(worst, norm(defect) / norm(adjoint));
    worst = larger(worst, Math.abs(other.rate.re / (rate.re * ratio.re) - 1));
    worst = larger(worst, Math.abs(other.ratio.re * ratio.re - 1));
  });
  return residual('partners are adjoints', worst, RESIDUAL_LIMIT);
}

/** L on every matrix unit: from the model, in the frame of the certificate, and from the jumps; with max ‖L(e)‖_F. */
export function assemblyResidual(
  g: Generator,
  model: RingModel<Complex>,
  frame: Frame | null,
): { value: number; norm: number } {
  const { ring } = model;
  let worst = 0;
  let size = 0;
  for (const [a, b] of unitsOf(model)) {
    const image = imageInFrame(g, frame, a, b);
    const defect = imageOfUnit(model, a, b);
    addScaled(ring, defect, { re: -1, im: 0 }, image);
    size = larger(size, norm(image));
    worst = larger(worst, norm(defect));
  }
  return { value: size > 0 ? worst / size : Infinity, norm: size };
}

/** ∂L = L̂∂ on every matrix unit, relative to ‖L‖ and the jump. */
export function liftCondition(model: RingModel<Complex>, size: number): Condition {
  let worst = 0;
  const norms = model.jumps.map(({ w }) => norm(w));
  for (const [a, b] of unitsOf(model)) {
    liftDefect(model, a, b).forEach((defect, k) => {
      worst = larger(worst, norm(defect) / (size * norms[k]));
    });
  }
  return residual('∂L = L̂∂ on every matrix unit', worst, RESIDUAL_LIMIT);
}

/** The larger number; NaN counts as infinite. */
function larger(x: number, y: number): number {
  return y <= x ? x : y > x ? y : Infinity;
}

function norm(a: SparseOperator<Complex>): number {
  let sum = 0;
  for (const row of a) for (const { re, im } of row.values()) sum += re * re + im * im;
  return Math.sqrt(sum);
}
