import { readArchive, type PackageFiles } from '@thalweg/format';
import type { Session } from '../session.js';
import { type ExampleName, resolveVersion } from './example-name.js';
import { cachedArchive, fetchArchive } from './fetch-archive.js';
import { knownDigest, rememberDigest } from './name-index.js';
import { openRegistry } from './open-registry.js';

export interface ObtainedExample {
  /** `owner/slug@version`. */
  readonly name: string;
  readonly digest: string;
  readonly archive: Uint8Array;
  readonly files: PackageFiles;
}

/** A published example: from the cache where its version was named and met before, else from the registry. */
export async function obtainExample(
  name: ExampleName,
  registry: string | null,
  session: Session,
): Promise<ObtainedExample> {
  const { env } = session.terminal;
  const client = await openRegistry(registry, session);
  if (name.version !== null) {
    const full = `${name.owner}/${name.slug}@${name.version}`;
    const digest = await knownDigest(client.address, full, env);
    const archive = digest === null ? null : await cachedArchive(digest, env);
    if (digest !== null && archive) return { name: full, digest, archive, files: readArchive(archive, digest) };
  }
  const version = await resolveVersion(client, name);
  const { digest } = version;
  const full = `${version.example}@${version.version}`;
  if (version.withdrawn) session.output.note(`${full} is withdrawn: ${version.withdrawn.because}`);
  const archive = await fetchArchive(client, version, env);
  const files = readArchive(archive, digest);
  await rememberDigest(client.address, full, digest, env);
  return { name: full, digest, archive, files };
}
