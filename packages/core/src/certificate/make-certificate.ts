import { type CertificateVerdict, checkCertificate } from '../checker/check-certificate.js';
import type { CertifiedConstant, LiftCertificate } from '../checker/lift-certificate.js';
import { carreDuChamp } from '../constants/carre-du-champ.js';
import { completeBakryEmery } from '../constants/bakry-emery.js';
import { unboundedDirection } from '../constants/unbounded-direction.js';
import { ThalwegError } from '../errors.js';
import { type LiftAnsatz, type LadderResult, climbLadder, transferLift } from '../lift/index.js';
import type { ProgrammeIterate } from '../programme/programme-options.js';
import { hasGradientMetric } from '../sheet/hypotheses.js';
import type { Structure } from '../structure/structure.js';
import { CERTIFY_LIFT_SIDE, CERTIFY_LIFT_UNKNOWNS, CLOSED_TOLERANCE, LIFT_CLOSED } from '../tolerances.js';
import type { Generator } from '../generator/generator.js';
import { draftCertificate, draftInFrame } from './draft-certificate.js';
import { exactCertificate } from './exact-certificate.js';
import { rationalDraft } from './rational-draft.js';

/** A certificate that passed the checker, and how it was found. */
export interface MadeCertificate {
  readonly certificate: LiftCertificate;
  readonly verdict: CertificateVerdict;
  readonly rung: LadderResult['rung'];
  readonly solver: {
    readonly optimum: number;
    readonly iterations: number;
    readonly unknowns: number;
    readonly side: number;
  };
}

export interface CertificateResult {
  /** Null when no lift was found, or none that the checker passes. */
  readonly made: MadeCertificate | null;
  /** `cbe`, above which no certificate can reach. */
  readonly ceiling: number;
  /** `closed`: the bound reaches `cbe`; `exhausted`: every ansatz was tried; `stopped`: the time ended. */
  readonly reason: LadderResult['reason'];
  /** Why there is none, or what stands in the way of a better one. */
  readonly note: string | null;
}

export interface CertifyOptions {
  /** Only the rungs of the ladder with this ansatz. */
  readonly ansatz?: LiftAnsatz;
  readonly stop?: () => boolean;
  readonly onIterate?: (record: ProgrammeIterate) => void;
}

/**
 * Find a lift on the ladder of ansätze, up to `cbe`, write it down as a certificate and check that. Throws `not-symmetric` for a
 * generator without the metric that cge is about.
 */
export function makeCertificate(
  structure: Structure,
  constant: CertifiedConstant,
  options: CertifyOptions = {},
): CertificateResult {
  const { generator, canonical } = structure;
  if (!canonical || !hasGradientMetric(structure)) {
    throw new ThalwegError(
      'not-symmetric',
      `expected a GNS-symmetric generator for a certificate of ${constant}, got one that is not`,
    );
  }
  const forms = carreDuChamp(generator);
  const cbe = completeBakryEmery(forms);
  const ceiling = cbe.value;
  const none = { made: null, ceiling, reason: 'exhausted' } as const;
  if (canonical.jumps.length === 0) return { ...none, note: 'L is 0: every constant is infinite' };
  const direction = unboundedDirection(forms, cbe);
  if (direction !== null) return { ...none, note: `cbe is −∞, so that no lift exists: ${direction}` };
  const found = climbLadder(canonical, {
    target: ceiling,
    maxSide: { diagonal: CERTIFY_LIFT_SIDE, full: CERTIFY_LIFT_SIDE },
    maxUnknowns: CERTIFY_LIFT_UNKNOWNS,
    ...options,
  });
  if (!found) {
    const stopped = options.stop?.() === true;
    return { ...none, reason: stopped ? 'stopped' : 'exhausted', note: 'no ansatz has a lift within the limits' };
  }
  const { lift, rung, reason } = found;
  const { certificate, verdict } = certificateOf(generator, found, constant, options);
  if (!verdict.holds) {
    const failed = verdict.conditions.find(({ holds }) => !holds);
    return { ...none, reason, note: `a lift for K = ${lift.curvature} was found, but fails: ${failed?.name}` };
  }
  const { optimum, iterations, unknowns, side } = lift;
  const open = ceiling - verdict.bound > 2 * LIFT_CLOSED * Math.max(1, Math.abs(ceiling));
  return {
    made: { certificate, verdict, rung, solver: { optimum, iterations, unknowns, side } },
    ceiling,
    reason,
    note: open ? `the lift stays below cbe = ${ceiling}` : null,
  };
}

/**
 * A lift written down as a certificate and what the checker says of it: over the rationals where possible, save that with
 * `prefer: 'largest'` a rounded one is kept when it proves clearly more than the rational one.
 */
export function certificateOf(
  generator: Generator,
  found: Pick<LadderResult, 'canonical' | 'given' | 'lift'>,
  constant: CertifiedConstant,
  options: Pick<CertifyOptions, 'stop'> & { readonly prefer?: 'exact' | 'largest' } = {},
): CheckedCertificate {
  const checked = (certificate: LiftCertificate): CheckedCertificate => ({
    certificate,
    verdict: checkCertificate(generator, certificate),
  });
  const { canonical, lift } = found;
  const draft = { ...draftCertificate(canonical, lift), constant };
  const rational = rationalCertificate(generator, draftsOf(found, constant), lift.optimum, options);
  if (!rational) return checked(draft);
  const best = checked(rational);
  if (options.prefer !== 'largest' || best.verdict.bound >= lift.curvature) return best;
  const rounded = checked(draft);
  const gain = rounded.verdict.bound - best.verdict.bound;
  return rounded.verdict.holds && gain > CLOSED_TOLERANCE ? rounded : best;
}

interface CheckedCertificate {
  readonly certificate: LiftCertificate;
  readonly verdict: CertificateVerdict;
}

/** The lift over the jumps it was found with, in the eigenbasis of σ, and over the jumps given: one of them may be rational. */
function draftsOf(
  { canonical, given, lift }: Pick<LadderResult, 'canonical' | 'given' | 'lift'>,
  constant: CertifiedConstant,
): LiftCertificate[] {
  const drafts: (LiftCertificate | null)[] = [draftCertificate(canonical, lift), draftInFrame(canonical, lift)];
  if (canonical !== given) {
    const coefficients = transferLift(lift.coefficients, canonical, given);
    drafts.push(draftCertificate(given, { ...lift, coefficients }));
  }
  return drafts.filter((draft) => draft !== null).map((draft) => ({ ...draft, constant }));
}

/** Over the rationals, when the model is rational and the lift passes; else over the doubles as rational numbers; else null. */
function rationalCertificate(
  generator: Generator,
  drafts: readonly LiftCertificate[],
  optimum: number,
  options: Pick<CertifyOptions, 'stop'>,
): LiftCertificate | null {
  for (const [grade, fallback] of [
    ['exact', 'none'],
    ['enclosed', 'double'],
  ] as const) {
    for (const each of drafts) {
      const draft = rationalDraft(each, fallback);
      if (!draft) continue;
      const found = exactCertificate({
        algebra: generator.algebra,
        draft,
        grade,
        optimum,
        accepts: (candidate) => checkCertificate(generator, candidate).holds,
        stop: options.stop ?? (() => false),
      });
      if (found) return found;
    }
  }
  return null;
}
