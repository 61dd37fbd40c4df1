import { type ComplexInterval, scaleComplex } from './arithmetic/complex-interval.js';
import { complexIntervalZeros, setEntry } from './arithmetic/interval-matrix.js';
import { magnitude } from './arithmetic/interval.js';
import { smallestEigenvalueBound } from './arithmetic/smallest-eigenvalue-bound.js';
import { connectedRows } from './form-blocks.js';
import type { Condition } from './lift-certificate.js';
import { type LiftForm, type Side, liftForm } from './lift-form.js';
import type { RingModel } from './ring-model.js';
import { FORM_LOSS_GROWTH, FORM_LOSS_LIMIT } from './tolerances.js';

/**
 * A form with interval entries, scaled to s = ‖L‖ on the pairs and to rates on the components, so that K − δ adds 2δ to the
 * latter. If it is only ⪰ −μ, then [[s, B],[B*, P]] ⪰ −μ gives B*B ≤ (s+μ)(P+μ), hence P + 2δ ⪰ B*B/s for
 * δ = ½μ(1 + (‖P‖+μ)/s): the loss in K that makes up for it. μ comes from Rump's criterion and is rigorous.
 */
export function roundedFormCondition(
  model: RingModel<ComplexInterval>,
  side: Side,
  norm: number,
): { condition: Condition; loss: number } {
  const form = liftForm(model, side);
  const scales = form.weights.map((weight, i) => Math.sqrt((form.isComponent[i] ? 1 : norm) / weight.re.hi));
  let smallest = Infinity;
  let loss = 0;
  let largestBlock = 1;
  for (const block of connectedRows(form.rows)) {
    const { eigenvalue, size } = blockBound(form, block, scales);
    smallest = Math.min(smallest, eigenvalue);
    largestBlock = Math.max(largestBlock, block.length);
    const mu = Math.max(0, -eigenvalue);
    loss = Math.max(loss, 0.5 * mu * (1 + (size + mu) / norm) * INFLATION);
  }
  const scale = Math.max(norm, magnitude(model.bound.re));
  const limit = scale * Math.max(FORM_LOSS_LIMIT, FORM_LOSS_GROWTH * largestBlock ** 2 * 2 ** -53);
  const holds = loss <= limit;
  const note = `costs ${loss.toPrecision(2)} of K, at most ${limit.toPrecision(2)} is allowed`;
  const condition: Condition = {
    name: `${side} form`,
    holds,
    kind: 'margin',
    value: smallest,
    limit: 0,
    ...(loss > 0 ? { note } : {}),
  };
  return { condition, loss };
}

/** Covers the rounding of the scales and of the formula for δ. */
const INFLATION = 1 + 1e-9;

/** Lower bound of the smallest eigenvalue of one block, and an upper bound of the norm of its components' part. */
function blockBound(
  { rows, isComponent }: LiftForm<ComplexInterval>,
  block: readonly number[],
  scales: readonly number[],
): { eigenvalue: number; size: number } {
  const matrix = complexIntervalZeros(block.length);
  const place = new Map(block.map((row, k) => [row, k]));
  let squares = 0;
  block.forEach((row, i) => {
    for (const [column, x] of rows[row]) {
      const scaled = scaleComplex(scaleComplex(x, pointOf(scales[row])), pointOf(scales[column]));
      setEntry(matrix, i, place.get(column) as number, scaled);
      if (isComponent[row] && isComponent[column]) squares += magnitude(scaled.re) ** 2 + magnitude(scaled.im) ** 2;
    }
  });
  return { eigenvalue: smallestEigenvalueBound(matrix), size: Math.sqrt(squares) };
}

function pointOf(x: number): { lo: number; hi: number } {
  return { lo: x, hi: x };
}
