import { mkdir, readFile } from 'node:fs/promises';
import { join } from 'node:path';
import { ThalwegError } from '@thalweg/core';
import { sha256Hex } from '@thalweg/format';
import { writeFileAtomically } from '../output/write-file-atomically.js';
import type { RegistryClient } from './registry-client.js';
import { cacheFolder, type Environment } from './user-folders.js';

/** The archive with a digest: from the cache, or from the registry and then kept. Its SHA-256 is checked either way. */
export async function fetchArchive(
  client: RegistryClient,
  { archive, digest }: { readonly archive: string; readonly digest: string },
  env: Environment,
): Promise<Uint8Array> {
  const kept = await cachedArchive(digest, env);
  if (kept) return kept;
  const bytes = await client.bytes({ path: archive });
  const found = sha256Hex(bytes);
  if (found !== digest) {
    const message = `expected an archive with the SHA-256 ${digest} from ${client.address}, got ${found}; nothing was unpacked`;
    throw new ThalwegError('digest-mismatch', message, { details: { expected: digest, found } });
  }
  const path = placeOf(digest, env);
  await mkdir(join(path, '..'), { recursive: true })
    .then(() => writeFileAtomically(path, bytes))
    .catch(() => undefined); // A cache that cannot be written is no reason to fail.
  return bytes;
}

/** The archive with a digest from the cache; null when it is not there or was changed. */
export async function cachedArchive(digest: string, env: Environment): Promise<Uint8Array | null> {
  const bytes = await readFile(placeOf(digest, env)).catch(() => null);
  return bytes && sha256Hex(bytes) === digest ? new Uint8Array(bytes) : null;
}

function placeOf(digest: string, env: Environment): string {
  return join(cacheFolder(env), 'archives', `${digest}.zip`);
}
