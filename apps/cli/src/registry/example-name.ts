import { ThalwegError } from '@thalweg/core';
import { isVersion } from '@thalweg/format';
import { historySchema, versionSchema, type VersionDocument } from '@thalweg/format/api';
import type { RegistryClient } from './registry-client.js';

/** An example on a registry: `owner/slug`, with a version or without. */
export interface ExampleName {
  readonly owner: string;
  readonly slug: string;
  /** Null for the newest. */
  readonly version: string | null;
}

/** Whether a text names an example on a registry rather than a path. */
export function isExampleName(text: string): boolean {
  const match = /^[a-z0-9-]+\/[a-z0-9-]+(?:@(.+))?$/.exec(text);
  return match !== null && (match[1] === undefined || isVersion(match[1]));
}

/** `owner/slug[@version]`; throws `usage` for another text. */
export function readExampleName(text: string): ExampleName {
  if (!isExampleName(text)) {
    throw new ThalwegError(
      'usage',
      `expected an example such as mira/depolarising or mira/depolarising@1.0.0, got "${text}"`,
    );
  }
  const [path = '', version = null] = text.split('@');
  const [owner = '', slug = ''] = path.split('/');
  return { owner, slug, version };
}

/** The version that a name means: itself, or the newest release that is not withdrawn. */
export async function resolveVersion(client: RegistryClient, name: ExampleName): Promise<VersionDocument> {
  const version = name.version ?? (await newestVersion(client, name));
  return client.document(versionSchema, { path: versionPath({ ...name, version }) });
}

/** Path of a version on a registry. */
export function versionPath({ owner, slug, version }: ExampleName & { readonly version: string }): string {
  return `/api/v1/examples/${owner}/${slug}/versions/${encodeURIComponent(version)}`;
}

async function newestVersion(client: RegistryClient, { owner, slug }: ExampleName): Promise<string> {
  const { versions } = await client.document(historySchema, { path: `/api/v1/examples/${owner}/${slug}` });
  const usable = versions.filter(({ withdrawn }) => withdrawn === null);
  const newest = usable.find(({ version }) => !version.includes('-')) ?? usable[0] ?? versions[0];
  if (newest) return newest.version;
  throw new ThalwegError('not-found', `expected a version of ${owner}/${slug}, got none`);
}
