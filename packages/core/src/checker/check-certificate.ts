import { ThalwegError } from '../errors.js';
import type { Generator } from '../generator/generator.js';
import type { Rational } from './arithmetic/rational.js';
import {
  exactFormCondition,
  exactLiftCondition,
  exactModularCondition,
  exactPartnerCondition,
  exactStateCondition,
} from './exact-conditions.js';
import type { Condition, LiftCertificate } from './lift-certificate.js';
import { ringModel } from './ring-model.js';
import { DOUBLES, INTERVALS, RATIONALS } from './ring.js';
import {
  assemblyResidual,
  liftCondition,
  modularCondition,
  partnerCondition,
  residual,
  stateConditions,
} from './rounded-conditions.js';
import { roundedFormCondition } from './rounded-form.js';
import { doubleOf, rationalOf } from './scalar.js';
import { shapeCondition } from './shape-condition.js';
import { MODEL_ROUNDING, RESIDUAL_LIMIT, RESIDUAL_WEIGHT } from './tolerances.js';

/** What a certificate proves of a generator. */
export interface CertificateVerdict {
  readonly holds: boolean;
  /** The grade reached; null when a condition fails. */
  readonly grade: 'exact' | 'certified' | null;
  /** The bound that is proved: K, or K less the allowance. */
  readonly bound: number;
  /** K as a rational number, at the grade exact. */
  readonly exactBound: Rational | null;
  /** What residuals and rounding cost, in the units of K. */
  readonly allowance: number;
  readonly conditions: readonly Condition[];
}

/**
 * Check a certificate from the generator and the certificate alone: σ and the jumps are the canonical form of L, L̂ intertwines
 * the derivations, and both forms of §6 are positive. Which model the certificate names is the caller's to compare.
 *
 * Grade `exact`: all of it in rational arithmetic for the generator of the certificate's rational jumps; that the model's doubles
 * are the rounding of that generator is checked to MODEL_ROUNDING. Grade `certified`: no residual above RESIDUAL_LIMIT, and
 * the bound is K less RESIDUAL_WEIGHT·(largest residual)·‖L‖ and less the loss that makes up for rounding in the forms (see
 * rounded-form.ts, rigorous). For `clsi` and `mlsi` the bound must be positive (§4). A certificate that claims `exact` and
 * reaches only less fails.
 */
export function checkCertificate(g: Generator, certificate: LiftCertificate): CertificateVerdict {
  const shape = shapeCondition(g.algebra, certificate);
  if (!shape.holds) return refused([shape]);
  try {
    const verdict = certificate.grade === 'exact' ? exactVerdict(g, certificate) : certifiedVerdict(g, certificate);
    return { ...verdict, conditions: [shape, ...verdict.conditions] };
  } catch (error) {
    if (!(error instanceof ThalwegError)) throw error;
    const note = `the arithmetic ended with: ${error.message}`;
    return refused([shape, { ...residual('finite arithmetic', 1, 0), note }]);
  }
}

function exactVerdict(g: Generator, certificate: LiftCertificate): CertificateVerdict {
  const model = ringModel(RATIONALS, g.algebra, certificate);
  const { value } = assemblyResidual(g, ringModel(DOUBLES, g.algebra, certificate));
  const conditions = [
    exactStateCondition(model),
    exactModularCondition(model),
    exactPartnerCondition(model),
    residual('L from the jumps, against the doubles of the model', value, MODEL_ROUNDING),
  ];
  const exactBound = rationalOf(certificate.bound);
  // The forms are worth their cost only for a lift.
  if (conditions.every(({ holds }) => holds)) conditions.push(exactLiftCondition(model));
  if (conditions.every(({ holds }) => holds)) {
    conditions.push(exactFormCondition(model, 'left'), exactFormCondition(model, 'right'));
  }
  const bound = doubleOf(certificate.bound);
  return concluded(certificate, 'exact', bound, exactBound, 0, conditions);
}

function certifiedVerdict(g: Generator, certificate: LiftCertificate): CertificateVerdict {
  const model = ringModel(DOUBLES, g.algebra, certificate);
  const { list, smallest } = stateConditions(model);
  const assembly = assemblyResidual(g, model);
  const conditions = [
    ...list,
    modularCondition(model, smallest),
    partnerCondition(model),
    residual('L from the jumps', assembly.value, RESIDUAL_LIMIT),
    liftCondition(model, assembly.norm),
  ];
  const bound = doubleOf(certificate.bound);
  if (!conditions.every(({ holds }) => holds)) return refused(conditions);
  const residuals = conditions.filter(({ kind }) => kind === 'residual').map(({ value }) => value);
  const enclosed = ringModel(INTERVALS, g.algebra, certificate);
  const left = roundedFormCondition(enclosed, 'left', assembly.norm);
  const right = roundedFormCondition(enclosed, 'right', assembly.norm);
  const loss = Math.max(left.loss, right.loss);
  const allowance = RESIDUAL_WEIGHT * Math.max(...residuals) * assembly.norm + loss;
  conditions.push(left.condition, right.condition);
  return concluded(certificate, 'certified', bound - allowance, null, allowance, conditions);
}

function concluded(
  { constant }: LiftCertificate,
  grade: 'exact' | 'certified',
  bound: number,
  exactBound: Rational | null,
  allowance: number,
  conditions: Condition[],
): CertificateVerdict {
  if (constant === 'clsi' || constant === 'mlsi') {
    const name = `bound positive, as cge ≤ ${constant} needs`;
    conditions.push({ name, kind: 'margin', value: bound, limit: 0, holds: bound > 0 });
  }
  if (!conditions.every(({ holds }) => holds)) return refused(conditions);
  return { holds: true, grade, bound, exactBound, allowance, conditions };
}

function refused(conditions: readonly Condition[]): CertificateVerdict {
  return { holds: false, grade: null, bound: -Infinity, exactBound: null, allowance: Infinity, conditions };
}
