import type { ExampleDocument } from '@thalweg/format';
import type { Database } from '../database/connect.js';
import type { Place } from '../http/cursor.js';
import type { VersionName } from './version-name.js';

/** A version as it is kept, without its bytes. */
export interface VersionRow {
  readonly id: string;
  readonly owner: string;
  readonly slug: string;
  readonly version: string;
  /** SHA-256 of the archive, hexadecimal. */
  readonly digest: string;
  /** Bytes of the archive. */
  readonly size: number;
  readonly document: ExampleDocument;
  readonly listed: boolean;
  readonly publishedBy: string;
  readonly publishedAt: Date;
  readonly withdrawnAt: Date | null;
  readonly withdrawnBecause: string | null;
}

export interface VersionFile {
  readonly path: string;
  readonly digest: string;
  readonly size: number;
}

const COLUMNS = `
  versions.id, owner.name as owner, examples.slug, versions.version, encode(versions.archive, 'hex') as digest, versions.size,
  versions.document, versions.listed, publisher.name as "publishedBy", versions.published_at as "publishedAt",
  versions.withdrawn_at as "withdrawnAt", versions.withdrawn_because as "withdrawnBecause"
  from versions
  join examples on examples.id = versions.example_id
  join members as owner on owner.id = examples.owner_id
  join members as publisher on publisher.id = versions.published_by`;

/** One version, listed or not; null when there is none. */
export async function findVersion(db: Database, { owner, slug, version }: VersionName): Promise<VersionRow | null> {
  const { rows } = await db.raw<{ rows: VersionRow[] }>(
    `select ${COLUMNS} where owner.name = ? and examples.slug = ? and versions.version = ?`,
    [owner, slug, version],
  );
  return rows[0] ?? null;
}

/** The listed versions of an example, withdrawn ones included, newest precedence first. */
export async function listVersions(db: Database, owner: string, slug: string): Promise<VersionRow[]> {
  const { rows } = await db.raw<{ rows: VersionRow[] }>(
    `select ${COLUMNS} where owner.name = ? and examples.slug = ? and versions.listed
     order by major desc, minor desc, patch desc, (prerelease = '') desc, published_at desc`,
    [owner, slug],
  );
  return rows;
}

export interface VersionFilter {
  /** Words that must occur in name, title, summary or keywords. */
  readonly words?: string | undefined;
  readonly owner?: string | undefined;
}

/** The newest listed version of each example that passes a filter, newest first, those after a place. */
export async function browseVersions(
  db: Database,
  { words, owner }: VersionFilter,
  after: Place | null,
  count: number,
): Promise<VersionRow[]> {
  const conditions = [
    'versions.listed and versions.withdrawn_at is null',
    `not exists (
       select from versions as newer where newer.example_id = versions.example_id and newer.listed
       and newer.withdrawn_at is null and (newer.published_at, newer.id) > (versions.published_at, versions.id))`,
  ];
  const values: (string | number | Date)[] = [];
  if (words !== undefined) {
    conditions.push(`versions.words @@ websearch_to_tsquery('english', ?)`);
    values.push(words);
  }
  if (owner !== undefined) {
    conditions.push('owner.name = ?');
    values.push(owner);
  }
  if (after) {
    conditions.push('(versions.published_at, versions.id) < (?, ?)');
    values.push(after.publishedAt, after.id);
  }
  const { rows } = await db.raw<{ rows: VersionRow[] }>(
    `select ${COLUMNS} where ${conditions.join(' and ')} order by versions.published_at desc, versions.id desc limit ?`,
    [...values, count],
  );
  return rows;
}

/** The files of a version, by path. */
export async function listFiles(db: Database, versionId: string): Promise<VersionFile[]> {
  const { rows } = await db.raw<{ rows: VersionFile[] }>(
    `select path, encode(digest, 'hex') as digest, size from version_files where version_id = ? order by path collate "C"`,
    [versionId],
  );
  return rows;
}

/** Bytes by their SHA-256 (hexadecimal); null when there are none. */
export async function findBlob(db: Database, digest: string): Promise<Buffer | null> {
  const row = await db('blobs')
    .where({ digest: Buffer.from(digest, 'hex') })
    .first<{ bytes: Buffer } | undefined>('bytes');
  return row?.bytes ?? null;
}
