import { mkdir, readFile } from 'node:fs/promises';
import { join } from 'node:path';
import { z } from 'zod';
import { writeFileAtomically } from '../output/write-file-atomically.js';
import { cacheFolder, type Environment } from './user-folders.js';

const entrySchema = z.object({ digest: z.string().regex(/^[0-9a-f]{64}$/) });

/** Which digest a version has, as a registry said once: a published version never changes, so that it need not be asked again. */
export async function knownDigest(registry: string, name: string, env: Environment): Promise<string | null> {
  const text = await readFile(placeOf(registry, name, env), 'utf8').catch(() => null);
  if (text === null) return null;
  try {
    return entrySchema.parse(JSON.parse(text)).digest;
  } catch {
    return null;
  }
}

/** Remembers the digest of `owner/slug@version`. */
export async function rememberDigest(registry: string, name: string, digest: string, env: Environment): Promise<void> {
  const path = placeOf(registry, name, env);
  await mkdir(join(path, '..'), { recursive: true })
    .then(() => writeFileAtomically(path, `${JSON.stringify({ registry, name, digest })}\n`))
    .catch(() => undefined); // A cache that cannot be written is no reason to fail.
}

function placeOf(registry: string, name: string, env: Environment): string {
  return join(cacheFolder(env), 'names', encodeURIComponent(registry), `${encodeURIComponent(name)}.json`);
}
