import { EXIT_STATUS, type ExitStatus } from '../../exit-status.js';
import { readExampleName, resolveVersion } from '../../registry/example-name.js';
import { openRegistry } from '../../registry/open-registry.js';
import { renderVersion } from '../../render/render-version.js';
import type { Session } from '../../session.js';
import type { ReadPlan } from './plan.js';

/** Shows what a published version says of itself. */
export async function readEffect(plan: ReadPlan, session: Session): Promise<ExitStatus> {
  const { output } = session;
  const name = readExampleName(plan.name);
  const version = await resolveVersion(await openRegistry(plan.registry, session), name);
  if (output.json) output.document(version);
  else output.result(renderVersion(version, output));
  output.note('What a version says of itself is checked by thalweg reproduce.');
  return EXIT_STATUS.yes;
}
