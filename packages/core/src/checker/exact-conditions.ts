import { GAUSSIAN_ONE, GAUSSIAN_ZERO, type GaussianRational } from './arithmetic/gaussian-rational.js';
import { type GaussianMatrix, gaussianFromEntries } from './arithmetic/gaussian-matrix.js';
import { type SemidefiniteVerdict, decideSemidefinite } from './arithmetic/exact-semidefinite.js';
import { connectedRows } from './form-blocks.js';
import type { Condition } from './lift-certificate.js';
import { liftDefect, unitsOf } from './lift-defects.js';
import { type Side, liftForm } from './lift-form.js';
import type { RingModel } from './ring-model.js';
import { type SparseOperator, addProduct, addScaled, emptyOperator, isEmpty } from './sparse-operator.js';

type Exact = RingModel<GaussianRational>;

/** σ is Hermitian, in the algebra, of trace one and positive definite, exactly. */
export function exactStateCondition({ ring, algebra, sigma }: Exact): Condition {
  const trace = sigma.reduce((sum, row, i) => ring.add(sum, row.get(i) ?? ring.zero), ring.zero);
  const inside = sigma.every((row, i) => [...row.keys()].every((j) => algebra.blockOf[i] === algebra.blockOf[j]));
  const holds =
    inside &&
    ring.isZero(ring.add(trace, ring.negate(GAUSSIAN_ONE))) &&
    rankIfPositive(sigma, allRows(sigma)) === algebra.size;
  return decided('state faithful, trace 1', holds);
}

/** σW = Wσ/ratio exactly, cleared of denominators. */
export function exactModularCondition({ ring, sigma, jumps }: Exact): Condition {
  const bad = jumps.findIndex(({ w, ratio }) => {
    const defect = emptyOperator<GaussianRational>(w.length);
    addProduct(ring, defect, ratio, sigma, w);
    addProduct(ring, defect, ring.negate(GAUSSIAN_ONE), w, sigma);
    return !isEmpty(defect);
  });
  return decided('σWσ⁻¹ = W/ratio for every jump', bad < 0, bad < 0 ? undefined : `not for jump ${bad}`);
}

/** The partner is W*, its rate is rate·ratio and its ratio 1/ratio, exactly. */
export function exactPartnerCondition({ ring, jumps }: Exact): Condition {
  const equal = (x: GaussianRational, y: GaussianRational): boolean => ring.isZero(ring.add(x, ring.negate(y)));
  const bad = jumps.findIndex(({ adjoint, rate, ratio, partner }, j) => {
    const other = jumps[partner];
    const defect = emptyOperator<GaussianRational>(adjoint.length);
    addScaled(ring, defect, GAUSSIAN_ONE, other.w);
    addScaled(ring, defect, ring.negate(GAUSSIAN_ONE), adjoint);
    const numbers =
      equal(other.rate, ring.multiply(rate, ratio)) && equal(ring.multiply(other.ratio, ratio), GAUSSIAN_ONE);
    return other.partner !== j || !isEmpty(defect) || !numbers;
  });
  return decided('partners are adjoints', bad < 0, bad < 0 ? undefined : `not for jump ${bad}`);
}

/** ∂L = L̂∂ on every matrix unit, exactly, for the L of the certificate's jumps. */
export function exactLiftCondition(model: Exact): Condition {
  const bad = unitsOf(model).find(([a, b]) => !liftDefect(model, a, b).every(isEmpty));
  return decided('∂L = L̂∂ on every matrix unit', !bad, bad && `not on e_${bad[0]},${bad[1]}`);
}

/** A form is positive semidefinite, by exact LDL*. */
export function exactFormCondition(model: Exact, side: Side): Condition {
  const { rows } = liftForm(model, side);
  const bad = connectedRows(rows).find((block) => rankIfPositive(rows, block) === null);
  return decided(`${side} form`, !bad, bad && `not positive on the rows ${bad.slice(0, 8).join(', ')}`);
}

function decided(name: string, holds: boolean, note?: string): Condition {
  return { name, kind: 'residual', value: holds ? 0 : 1, limit: 0, holds, ...(note === undefined ? {} : { note }) };
}

/** The rank of a principal block, null when it is not positive semidefinite. */
function rankIfPositive(rows: SparseOperator<GaussianRational>, block: readonly number[]): number | null {
  const verdict: SemidefiniteVerdict = decideSemidefinite(principal(rows, block));
  return verdict.semidefinite ? verdict.pivots.length : null;
}

function principal(rows: SparseOperator<GaussianRational>, block: readonly number[]): GaussianMatrix {
  return gaussianFromEntries(block.length, block.length, (i, j) => rows[block[i]].get(block[j]) ?? GAUSSIAN_ZERO);
}

function allRows(a: SparseOperator<unknown>): number[] {
  return a.map((_, i) => i);
}
