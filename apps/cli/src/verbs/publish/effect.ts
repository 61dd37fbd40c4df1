import { packArchive, sha256Hex } from '@thalweg/format';
import { memberSchema, publicationSchema } from '@thalweg/format/api';
import { checkPackage } from '../../example/check-package.js';
import { EXIT_STATUS, type ExitStatus } from '../../exit-status.js';
import { readPackage } from '../../input/read-package.js';
import { openRegistry } from '../../registry/open-registry.js';
import type { Session } from '../../session.js';
import type { PublishPlan } from './plan.js';

/**
 * Checks an example as `seal` does, packs it and publishes it under the name of the token's owner. Sent again after a failure,
 * the same package gives the same answer and no second version.
 */
export async function publishEffect(plan: PublishPlan, session: Session): Promise<ExitStatus> {
  const { output } = session;
  const example = await readPackage(plan.example, session);
  await checkPackage(example, session);
  const archive = packArchive(example.files);
  const client = await openRegistry(plan.registry, session);
  const { name: owner } = await client.document(memberSchema, { path: '/api/v1/member' });
  const { name: slug } = example.document;
  const listed = String(plan.listed);
  const form = new FormData();
  form.set('listed', listed);
  form.set('archive', new Blob([new Uint8Array(archive)], { type: 'application/zip' }), 'example.zip');
  const published = await client.document(publicationSchema, {
    method: 'POST',
    path: `/api/v1/examples/${owner}/${slug}/versions`,
    headers: { 'Idempotency-Key': `${slug}-${listed}-${sha256Hex(archive)}` },
    body: form,
  });
  const name = `${published.example}@${published.version}`;
  if (output.json) output.document(published);
  else output.result(`  ${output.colours.bold(name)}\n  sha256  ${published.digest}\n`);
  output.note(
    published.listed
      ? `Published. Anyone finds it: thalweg read ${name}`
      : `Published, unlisted: it is shown to ${owner} alone. A published version never changes.`,
  );
  return EXIT_STATUS.yes;
}
