import { createHash } from 'node:crypto';
import { type ExampleDocument, type PackageFiles, versionParts } from '@thalweg/format';
import type { Database } from '../database/connect.js';

/** The example of an owner, made where it is new. No other transaction publishes under it until this one ends. */
export async function lockExample(trx: Database, ownerId: string, slug: string): Promise<string> {
  await trx.raw('select pg_advisory_xact_lock(hashtextextended(?, 1))', [`${ownerId} ${slug}`]);
  await trx('examples').insert({ owner_id: ownerId, slug }).onConflict(['owner_id', 'slug']).ignore();
  const row = await trx('examples').where({ owner_id: ownerId, slug }).first<{ id: string } | undefined>('id');
  if (!row) throw new Error('expected the example that was just made, found none');
  return row.id;
}

/** The versions of an example, listed or not. */
export async function versionsOf(trx: Database, exampleId: string): Promise<string[]> {
  const rows = await trx('versions').where({ example_id: exampleId }).select<{ version: string }[]>('version');
  return rows.map(({ version }) => version);
}

export interface NewVersion {
  readonly exampleId: string;
  readonly document: ExampleDocument;
  readonly archive: Uint8Array;
  readonly files: PackageFiles;
  readonly listed: boolean;
  readonly publishedBy: string;
}

/** Writes a version with its bytes. */
export async function insertVersion(trx: Database, version: NewVersion): Promise<void> {
  const archive = await insertBlob(trx, version.archive);
  const { major, minor, patch, prerelease } = versionParts(version.document.version);
  const { title, summary, keywords, name } = version.document;
  const { rows } = await trx.raw<{ rows: { id: string }[] }>(
    `insert into versions
       (example_id, version, major, minor, patch, prerelease, archive, size, document, words, listed, published_by)
     values (?, ?, ?, ?, ?, ?, ?, ?, ?,
       setweight(to_tsvector('english', ?), 'A') || setweight(to_tsvector('english', ?), 'B'), ?, ?)
     returning id`,
    [
      version.exampleId,
      version.document.version,
      major,
      minor,
      patch,
      prerelease,
      archive,
      version.archive.length,
      JSON.stringify(version.document),
      [name.replaceAll('-', ' '), title, ...keywords].join(' '),
      summary,
      version.listed,
      version.publishedBy,
    ],
  );
  const id = rows[0]?.id;
  for (const [path, bytes] of version.files) {
    await trx('version_files').insert({
      version_id: id,
      path,
      digest: await insertBlob(trx, bytes),
      size: bytes.length,
    });
  }
}

/** Keeps bytes under their SHA-256; the same bytes are kept once. */
async function insertBlob(trx: Database, bytes: Uint8Array): Promise<Buffer> {
  const digest = createHash('sha256').update(bytes).digest();
  await trx('blobs')
    .insert({ digest, bytes: Buffer.from(bytes) })
    .onConflict('digest')
    .ignore();
  return digest;
}
