import { lsiAt } from '../constants/lsi-quotient.js';
import { mlsiAt } from '../constants/mlsi-quotient.js';
import { ThalwegError } from '../errors.js';
import { operatorMean } from '../metric/operator-mean.js';
import { quotientAt, quotientError } from '../metric/quotient.js';
import { blockEigen } from '../algebra/block-eigen.js';
import { densityMatrix } from '../generator/declared-state.js';
import type { Witness } from '../sheet/bracket.js';
import { hasGradientMetric } from '../sheet/hypotheses.js';
import { metricOf } from '../sheet/run-sheet-task.js';
import type { Structure } from '../structure/structure.js';
import { WITNESS_TOLERANCE } from '../tolerances.js';
import { encloseWitness } from './enclose-witness.js';

/** What a witness gives when it is evaluated afresh. */
export interface WitnessCheck {
  /** The quotient at the witness. */
  readonly value: number;
  /** Bound on its floating-point error. */
  readonly margin: number;
  /** |value − stated value|. */
  readonly error: number;
  /** How the bound that the witness gives is known: `enclosed` when the stated value is above, or refuted below, an enclosure. */
  readonly grade: 'enclosed' | 'certified';
  /** The bound that it gives at this grade. */
  readonly upper: number;
  readonly holds: boolean;
}

/**
 * Evaluate a witness from its state and observable alone. It proves `constant ≤ value` when the quotient is at most the stated
 * value: at the grade enclosed when the upper end of its enclosure (see `encloseWitness`) is, certified when the value lies in the
 * enclosure, or where there is none, is not below the quotient by more than the margin and a relative WITNESS_TOLERANCE. A
 * value below the enclosure is refuted. Throws `dimension-mismatch`, `state-not-positive`, `not-symmetric`, `usage`.
 */
export function verifyWitness(structure: Structure, witness: Witness): WitnessCheck {
  const { value, margin } = evaluate(structure, witness);
  const found = { value, margin, error: Math.abs(value - witness.value) };
  const enclosure = encloseWitness(structure, witness);
  if (enclosure && !(enclosure.lo <= witness.value && witness.value < enclosure.hi)) {
    return { ...found, grade: 'enclosed', upper: enclosure.hi, holds: witness.value >= enclosure.hi };
  }
  const slack = margin + WITNESS_TOLERANCE * Math.max(Math.abs(value), Math.abs(witness.value));
  const holds = enclosure !== null || value <= witness.value + slack;
  return { ...found, grade: 'certified', upper: value + margin, holds };
}

function evaluate(structure: Structure, witness: Witness): { value: number; margin: number } {
  const { constant, mean, state, observable, amplification } = witness;
  const side = structure.algebra.size * amplification;
  requireSide(state.rows, side, 'state');
  switch (constant) {
    case 'ge':
      return gradientQuotient(structure, witness, mean ?? 'logarithmic');
    case 'mlsi':
    case 'clsi':
      return mlsiAt(structure, state, amplification);
    case 'lsi':
      return lsiAt(structure, state);
    default:
      throw new ThalwegError(
        'usage',
        `expected a witness for ge, mlsi, clsi or lsi, got one for ${constant}${observable ? '' : ' without an observable'}`,
        { pointer: '/constant' },
      );
  }
}

function gradientQuotient(structure: Structure, { state, observable }: Witness, mean: NonNullable<Witness['mean']>) {
  if (!hasGradientMetric(structure)) {
    throw new ThalwegError(
      'not-symmetric',
      'expected a GNS-symmetric generator for a witness of ge, got one that is not',
    );
  }
  if (!observable) {
    throw new ThalwegError('wrong-schema', 'expected an observable in a witness of ge, got none', {
      pointer: '/observable',
    });
  }
  requireSide(observable.rows, structure.algebra.size, 'observable');
  const model = metricOf(structure);
  const { values, vectors } = blockEigen(structure.algebra, densityMatrix(structure.algebra, state, '/state'));
  const q = quotientAt(
    model,
    operatorMean(mean),
    { lambda: values, u: model.commutative ? null : vectors },
    observable,
  );
  if (!(q.metric > 0)) {
    throw new ThalwegError('wrong-schema', 'expected an observable outside the fixed points, got one with ‖A‖²_ρ = 0', {
      pointer: '/observable',
    });
  }
  return { value: q.curvature / q.metric, margin: quotientError(model, q) };
}

function requireSide(got: number, expected: number, what: string): void {
  if (got === expected) return;
  throw new ThalwegError('dimension-mismatch', `expected a ${expected}×${expected} ${what}, got ${got}×${got}`, {
    pointer: `/${what}`,
  });
}
