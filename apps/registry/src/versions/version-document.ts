import { canonicalJson, type JsonValue } from '@thalweg/format';
import type { VersionFile, VersionRow } from './version-store.js';

/** A version as the interface shows it. */
export function versionDocument(row: VersionRow, files?: readonly VersionFile[]): Record<string, unknown> {
  const { owner, slug, version } = row;
  const path = `/api/v1/examples/${owner}/${slug}/versions/${version}`;
  return {
    schema: 'thalweg.version/1',
    example: `${owner}/${slug}`,
    version,
    title: row.document.title,
    summary: row.document.summary,
    digest: row.digest,
    size: row.size,
    listed: row.listed,
    publishedBy: row.publishedBy,
    publishedAt: row.publishedAt.toISOString(),
    withdrawn: row.withdrawnAt ? { at: row.withdrawnAt.toISOString(), because: row.withdrawnBecause } : null,
    archive: `${path}/archive`,
    ...(files ? { document: row.document, files } : {}),
  };
}

/** The text that is sent for a document: its canonical form, so that equal documents have equal tags. */
export function documentText(document: Record<string, unknown>): string {
  return canonicalJson(document as JsonValue);
}
