import { certificateOf } from '../../src/certificate/make-certificate.js';
import type { CertificateGrade } from '../../src/checker/lift-certificate.js';
import { completeBakryEmery } from '../../src/constants/bakry-emery.js';
import { carreDuChamp } from '../../src/constants/carre-du-champ.js';
import type { Generator } from '../../src/generator/generator.js';
import { climbLadder } from '../../src/lift/lift-ladder.js';
import type { CanonicalForm } from '../../src/structure/canonical-form.js';
import { analyse } from '../../src/structure/structure.js';

/** What the ladder of lifts reaches beside cbe. */
export interface BestCertificate {
  readonly cbe: number;
  /** The optimum of the best lift, and how it ended; null when no rung has one. */
  readonly optimum: number | null;
  readonly closed: boolean;
  /** What the checker says of it. */
  readonly bound: number;
  readonly grade: CertificateGrade | null;
}

/** Climb to cbe, write the lift down, check it. Forms of side above 400, or with more than 400 unknowns, are left out. */
export function bestCertificate(g: Generator): BestCertificate {
  const cbe = completeBakryEmery(carreDuChamp(g)).value;
  const canonical = analyse(g).canonical as CanonicalForm;
  const limits = { maxSide: { diagonal: 400, full: 400 }, maxUnknowns: 400 };
  const found = climbLadder(canonical, { target: cbe, ...limits });
  if (!found) return { cbe, optimum: null, closed: false, bound: -Infinity, grade: null };
  const { verdict } = certificateOf(g, found, 'cge');
  const { bound, grade } = verdict;
  return { cbe, optimum: found.lift.optimum, closed: found.reason === 'closed', bound, grade };
}
