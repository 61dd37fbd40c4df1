import { ThalwegError } from '@thalweg/core';
import {
  completePoint,
  parseClaims,
  type ClaimDocument,
  type ExamplePackage,
  type ParameterPoint,
} from '@thalweg/format';
import { inDocument } from '../input/in-document.js';
import { generateModel, pointName } from '../input/read-model.js';
import type { Session } from '../session.js';
import { checkGenerated } from './check-generated.js';
import { recordedSheet, samePoint } from './recorded-sheet.js';

/** The points of an example's showcase, with defaults filled in. */
export function showcasePoints({ document }: ExamplePackage): ParameterPoint[] {
  const { parameters, showcase } = document;
  return showcase.map((values, k) => completePoint(parameters, values, `/showcase/${k}`));
}

/** What the generator claims of its model at a point; [] where it claims nothing. */
export async function claimsAt(
  { document, generator }: ExamplePackage,
  point: ParameterPoint,
  session: Session,
): Promise<ClaimDocument[]> {
  const name = `claims of ${pointName(document, point)}`;
  const json = await session.generate({ source: generator, parameters: point, want: 'claims' }, name);
  return inDocument(name, () => {
    const claims = parseClaims(json);
    const unknown = claims.find(({ along }) => along !== undefined && !(along in point));
    if (!unknown) return claims;
    const message = `expected "along" to name a parameter, got "${unknown.along ?? ''}"; correct it`;
    throw new ThalwegError('wrong-schema', message, { pointer: `/${claims.indexOf(unknown)}/along` });
  });
}

/**
 * Runs the generator at every point of the showcase: models and claims must follow their schemas, and models have the digests that
 * `evidence/showcase.json` gives them, if it is there.
 */
export async function checkPackage(example: ExamplePackage, session: Session): Promise<void> {
  const points = showcasePoints(example);
  for (const point of points) {
    const source = await generateModel(example, point, session);
    const { digest } = checkGenerated(source);
    await claimsAt(example, point, session);
    if (example.recorded === null) continue;
    const sheet = recordedSheet(example.recorded, point);
    if (sheet === null) throw stale(`no sheet of ${source.name}`);
    if (sheet.model.digest !== digest) {
      throw stale(`the model ${sheet.model.digest} for ${source.name}, which now is ${digest}`);
    }
  }
  const extra = example.recorded?.points.find(
    ({ parameters }) => !points.some((point) => samePoint(point, parameters)),
  );
  if (extra) throw stale(`a sheet of ${pointName(example.document, extra.parameters)}, which is not in the showcase`);
}

function stale(got: string): ThalwegError {
  return new ThalwegError(
    'digest-mismatch',
    `expected evidence/showcase.json to be of this generator, got ${got}; compute it again with thalweg reproduce --record`,
  );
}
