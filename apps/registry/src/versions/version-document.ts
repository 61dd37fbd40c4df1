import type { VersionDocument, VersionSummary } from '@thalweg/format/api';
import type { VersionFile, VersionRow } from './version-store.js';

/** A version as lists show it. */
export function versionSummary(row: VersionRow): VersionSummary {
  const { owner, slug, version } = row;
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
    withdrawn: row.withdrawnAt ? { at: row.withdrawnAt.toISOString(), because: row.withdrawnBecause ?? '' } : null,
    archive: `/api/v1/examples/${owner}/${slug}/versions/${version}/archive`,
  };
}

/** A version with its description and files. */
export function versionDocument(row: VersionRow, files: readonly VersionFile[]): VersionDocument {
  return { ...versionSummary(row), document: row.document, files: [...files] };
}
