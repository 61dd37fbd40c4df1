import { mkdir, mkdtemp, rename, rm, stat, writeFile } from 'node:fs/promises';
import { dirname, join, resolve } from 'node:path';
import { ThalwegError } from '@thalweg/core';
import { readExample, type PackageFiles } from '@thalweg/format';
import { EXIT_STATUS, type ExitStatus } from '../../exit-status.js';
import { readExampleName } from '../../registry/example-name.js';
import { obtainExample } from '../../registry/obtain-example.js';
import type { Session } from '../../session.js';
import type { DownloadPlan } from './plan.js';

/** Fetches a published version, checks its digest, and unpacks it into a new folder: all of it or nothing. */
export async function downloadEffect(plan: DownloadPlan, session: Session): Promise<ExitStatus> {
  const { output } = session;
  const wanted = readExampleName(plan.name);
  const folder = plan.output ?? wanted.slug;
  await requireNew(folder);
  const { name, digest, files } = await obtainExample(wanted, plan.registry, session);
  readExample(files);
  await unpack(files, folder);
  if (output.json) output.document({ schema: 'thalweg.download/1', name, digest, folder });
  else output.result(`  ${output.colours.bold(name)}\n  sha256  ${digest}\n  folder  ${folder}\n`);
  output.note(`Next: thalweg reproduce ${folder}`);
  return EXIT_STATUS.yes;
}

async function requireNew(folder: string): Promise<void> {
  const found = await stat(folder).catch(() => null);
  if (found === null) return;
  throw new ThalwegError(
    'cannot-write',
    `expected a folder that is not there yet, got ${folder}; give another with -o`,
  );
}

/** Into a folder beside the target, which then gets the target's name. */
async function unpack(files: PackageFiles, folder: string): Promise<void> {
  try {
    const parent = dirname(resolve(folder));
    await mkdir(parent, { recursive: true });
    const partial = await mkdtemp(join(parent, '.thalweg-'));
    try {
      for (const [path, bytes] of files) {
        const target = join(partial, path);
        await mkdir(dirname(target), { recursive: true });
        await writeFile(target, bytes, { mode: 0o644 });
      }
      await rename(partial, folder);
    } catch (error) {
      await rm(partial, { recursive: true, force: true });
      throw error;
    }
  } catch (cause) {
    throw new ThalwegError(
      'cannot-write',
      `cannot write ${folder}: ${(cause as Error).message}. Give another with -o`,
      {
        cause,
      },
    );
  }
}
