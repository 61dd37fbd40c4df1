import { examplesSchema } from '@thalweg/format/api';
import { EXIT_STATUS, type ExitStatus } from '../../exit-status.js';
import { openRegistry } from '../../registry/open-registry.js';
import { renderExamples } from '../../render/render-examples.js';
import type { Session } from '../../session.js';
import type { BrowsePlan } from './plan.js';

/** Lists examples of a registry by their newest versions, newest first. */
export async function browseEffect(plan: BrowsePlan, session: Session): Promise<ExitStatus> {
  const { output } = session;
  const client = await openRegistry(plan.registry, session);
  const query = new URLSearchParams({ count: String(plan.count) });
  if (plan.words !== null) query.set('words', plan.words);
  if (plan.owner !== null) query.set('owner', plan.owner);
  if (plan.cursor !== null) query.set('cursor', plan.cursor);
  const page = await client.document(examplesSchema, { path: `/api/v1/examples?${query.toString()}` });
  if (output.json) output.document(page);
  else output.result(renderExamples(page.examples, output));
  if (page.examples.length === 0) output.note(`No example at ${client.address} fits.`);
  if (page.next !== null) output.note(`There are more: add --cursor ${page.next}`);
  return EXIT_STATUS.yes;
}
