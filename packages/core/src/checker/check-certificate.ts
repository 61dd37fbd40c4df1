import { ThalwegError } from '../errors.js';
import type { Generator } from '../generator/generator.js';
import type { Rational } from './arithmetic/rational.js';
import { subDown } from './arithmetic/rounding.js';
import {
  exactFormCondition,
  exactLiftCondition,
  exactModularCondition,
  exactPartnerCondition,
  exactStateCondition,
} from './exact-conditions.js';
import { frameCondition, frameOf } from './frame.js';
import type { CertificateGrade, Condition, LiftCertificate } from './lift-certificate.js';
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
  readonly grade: CertificateGrade | null;
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
 * Grade `exact`: all of it in rational arithmetic for the generator of the certificate's numbers (a double is a rational number
 * too); that the model's doubles are the rounding of that generator, turned into its frame if it has one, is checked to MODEL_ROUNDING. Grade `enclosed`: the same,
 * save that the forms are bounded with intervals and the bound is K less the loss that makes up for their rounding (see
 * rounded-form.ts, rigorous). Grade `certified`: no residual above RESIDUAL_LIMIT, and the bound is K less that loss and less
 * RESIDUAL_WEIGHT·(largest residual)·‖L‖. For `clsi` and `mlsi` the bound must be positive (§4). A certificate that claims a
 * grade and reaches only less fails.
 */
export function checkCertificate(g: Generator, certificate: LiftCertificate): CertificateVerdict {
  const shape = shapeCondition(g.algebra, certificate);
  if (!shape.holds) return refused([shape]);
  try {
    const verdict = VERDICTS[certificate.grade](g, certificate);
    return { ...verdict, conditions: [shape, ...verdict.conditions] };
  } catch (error) {
    if (!(error instanceof ThalwegError)) throw error;
    const note = `the arithmetic ended with: ${error.message}`;
    return refused([shape, { ...residual('finite arithmetic', 1, 0), note }]);
  }
}

type Judge = (g: Generator, certificate: LiftCertificate) => CertificateVerdict;

const VERDICTS: Record<CertificateGrade, Judge> = {
  exact: exactVerdict,
  enclosed: enclosedVerdict,
  certified: certifiedVerdict,
};

function exactVerdict(g: Generator, certificate: LiftCertificate): CertificateVerdict {
  const { model, conditions } = exactLift(g, certificate);
  // The forms are worth their cost only for a lift.
  if (!conditions.every(({ holds }) => holds)) return refused(conditions);
  conditions.push(exactFormCondition(model, 'left'), exactFormCondition(model, 'right'));
  return concluded(certificate, {
    grade: 'exact',
    bound: doubleOf(certificate.bound),
    exactBound: rationalOf(certificate.bound),
    allowance: 0,
    conditions,
  });
}

function enclosedVerdict(g: Generator, certificate: LiftCertificate): CertificateVerdict {
  const { conditions, norm } = exactLift(g, certificate);
  if (!conditions.every(({ holds }) => holds)) return refused(conditions);
  const forms = roundedForms(g, certificate, norm);
  conditions.push(...forms.conditions);
  const bound = subDown(doubleOf(certificate.bound), forms.loss);
  return concluded(certificate, { grade: 'enclosed', bound, exactBound: null, allowance: forms.loss, conditions });
}

/** Everything but the forms, in rational arithmetic; with max ‖L(e)‖_F over matrix units. */
function exactLift(g: Generator, certificate: LiftCertificate) {
  const model = ringModel(RATIONALS, g.algebra, certificate);
  const frame = frameOf(g.algebra, certificate);
  const { value, norm } = assemblyResidual(g, ringModel(DOUBLES, g.algebra, certificate), frame);
  const conditions = [
    ...(frame ? [frameCondition(g.algebra, frame, MODEL_ROUNDING)] : []),
    exactStateCondition(model),
    exactModularCondition(model),
    exactPartnerCondition(model),
    residual('L from the jumps, against the doubles of the model', value, MODEL_ROUNDING),
  ];
  if (conditions.every(({ holds }) => holds)) conditions.push(exactLiftCondition(model));
  return { model, conditions, norm };
}

function roundedForms(g: Generator, certificate: LiftCertificate, norm: number) {
  const enclosed = ringModel(INTERVALS, g.algebra, certificate);
  const left = roundedFormCondition(enclosed, 'left', norm);
  const right = roundedFormCondition(enclosed, 'right', norm);
  return { conditions: [left.condition, right.condition], loss: Math.max(left.loss, right.loss) };
}

function certifiedVerdict(g: Generator, certificate: LiftCertificate): CertificateVerdict {
  const model = ringModel(DOUBLES, g.algebra, certificate);
  const { list, smallest } = stateConditions(model);
  const frame = frameOf(g.algebra, certificate);
  const assembly = assemblyResidual(g, model, frame);
  const conditions = [
    ...(frame ? [frameCondition(g.algebra, frame, RESIDUAL_LIMIT)] : []),
    ...list,
    modularCondition(model, smallest),
    partnerCondition(model),
    residual('L from the jumps', assembly.value, RESIDUAL_LIMIT),
    liftCondition(model, assembly.norm),
  ];
  const bound = doubleOf(certificate.bound);
  if (!conditions.every(({ holds }) => holds)) return refused(conditions);
  const residuals = conditions.filter(({ kind }) => kind === 'residual').map(({ value }) => value);
  const { conditions: forms, loss } = roundedForms(g, certificate, assembly.norm);
  const allowance = RESIDUAL_WEIGHT * Math.max(...residuals) * assembly.norm + loss;
  conditions.push(...forms);
  const reached = { grade: 'certified', bound: bound - allowance, exactBound: null, allowance, conditions } as const;
  return concluded(certificate, reached);
}

function concluded(
  { constant }: LiftCertificate,
  { conditions, ...reached }: Omit<CertificateVerdict, 'holds' | 'conditions'> & { readonly conditions: Condition[] },
): CertificateVerdict {
  if (constant === 'clsi' || constant === 'mlsi') {
    const name = `bound positive, as cge ≤ ${constant} needs`;
    conditions.push({ name, kind: 'margin', value: reached.bound, limit: 0, holds: reached.bound > 0 });
  }
  return conditions.every(({ holds }) => holds) ? { holds: true, ...reached, conditions } : refused(conditions);
}

function refused(conditions: readonly Condition[]): CertificateVerdict {
  return { holds: false, grade: null, bound: -Infinity, exactBound: null, allowance: Infinity, conditions };
}
