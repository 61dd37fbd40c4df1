import type { ClaimDocument, ExamplePackage, ParameterPoint, PointDocument } from '@thalweg/format';
import { claimsAt } from '../example/check-package.js';
import { pointKey } from '../example/recorded-sheet.js';
import type { Session } from '../session.js';

/** A limit that the author claims along a parameter, for one choice of the others. */
export interface SweepLimit {
  readonly claim: ClaimDocument;
  /** `pointKey` of the point without the parameter. */
  readonly others: string;
}

/** The limits claimed along a parameter, at the last of the points for every choice of the other parameters. */
export async function limitsOf(
  example: ExamplePackage,
  points: readonly PointDocument[],
  along: string,
  session: Session,
): Promise<SweepLimit[]> {
  const last = new Map(points.map(({ parameters }) => [pointKey(without(parameters, along)), parameters]));
  const limits: SweepLimit[] = [];
  for (const [others, point] of last) {
    const claims = await claimsAt(example, point, session);
    for (const claim of claims) {
      if (claim.relation === 'tends-to' && claim.along === along) limits.push({ claim, others });
    }
  }
  return limits;
}

/** A point without one of its parameters. */
export function without(point: ParameterPoint, name: string): ParameterPoint {
  return Object.fromEntries(Object.entries(point).filter(([other]) => other !== name));
}
