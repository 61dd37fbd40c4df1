import { stat } from 'node:fs/promises';
import { join, relative, resolve, sep } from 'node:path';
import { ThalwegError } from '@thalweg/core';
import { packArchive, sha256Hex, type ExamplePackage } from '@thalweg/format';
import { checkPackage } from '../../example/check-package.js';
import { EXIT_STATUS, type ExitStatus } from '../../exit-status.js';
import { readPackage } from '../../input/read-package.js';
import { requireTarget } from '../../output/require-target.js';
import { writeFileAtomically } from '../../output/write-file-atomically.js';
import { renderSeal } from '../../render/render-seal.js';
import type { Session } from '../../session.js';
import type { SealPlan } from './plan.js';

/** Checks an example package, every model and claim of its showcase with it, and writes its archive. */
export async function sealEffect(plan: SealPlan, session: Session): Promise<ExitStatus> {
  await requireOutside(plan);
  const example = await readPackage(plan.example, session);
  await checkPackage(example, session);
  const archive = packArchive(example.files);
  const digest = sha256Hex(archive);
  const path = join(plan.output, `${digest}.zip`);
  await requireTarget(path);
  await writeFileAtomically(path, archive);
  const seal = sealDocument(example, archive, digest, path);
  const { output } = session;
  if (output.json) output.document(seal);
  else output.result(renderSeal(seal, output));
  if (example.recorded === null) {
    output.note(`No sheets are recorded: thalweg reproduce ${plan.example} --record computes those of the showcase.`);
  }
  return EXIT_STATUS.yes;
}

/** What was sealed; the archive is named by its digest. */
export type SealDocument = ReturnType<typeof sealDocument>;

function sealDocument({ document, files }: ExamplePackage, archive: Uint8Array, digest: string, path: string) {
  const { name, version, title } = document;
  return {
    schema: 'thalweg.seal/1' as const,
    name,
    version,
    title,
    digest,
    bytes: archive.length,
    path,
    files: [...files].sort().map(([file, bytes]) => ({ name: file, bytes: bytes.length, digest: sha256Hex(bytes) })),
  };
}

/** An archive inside the folder would be part of the next one. */
async function requireOutside({ example, output }: SealPlan): Promise<void> {
  const folder = await stat(example)
    .then((status) => status.isDirectory())
    .catch(() => false);
  if (!folder) return;
  const path = relative(resolve(example), resolve(output));
  if (path === '..' || path.startsWith(`..${sep}`)) return;
  const message = `expected a folder outside of the example, got ${output}; give another one with -o, for example -o ..`;
  throw new ThalwegError('usage', message);
}
