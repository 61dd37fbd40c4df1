import type { ExamplesDocument, HistoryDocument } from '@thalweg/format/api';
import { Router } from 'express';
import { z } from 'zod';
import { type Guards, readerOf } from '../auth/authenticate.js';
import type { Principal } from '../auth/principal.js';
import type { Database } from '../database/connect.js';
import { readCursor, writeCursor } from '../http/cursor.js';
import { documentText } from '../http/document-text.js';
import { Problem } from '../http/problem.js';
import { readQuery } from '../http/read-input.js';
import { sendBytes } from '../http/send-bytes.js';
import { versionDocument, versionSummary } from './version-document.js';
import { nameText, pathOf, versionName, type VersionName } from './version-name.js';
import { browseVersions, findBlob, findVersion, listFiles, listVersions, type VersionRow } from './version-store.js';

const PAGE = { default: 20, most: 100 };

const browseQuery = z.strictObject({
  words: z.string().min(1).max(200).optional(),
  owner: z.string().min(1).max(39).optional(),
  cursor: z.string().min(1).max(300).optional(),
  count: z.coerce.number().int().min(1).max(PAGE.most).default(PAGE.default),
});

/** Routes that read: browse, one example, one version, its archive and files. */
export function readRoutes(db: Database, guards: Guards): Router {
  const router = Router();

  router.get('/examples', async (request, response) => {
    const query = readQuery(browseQuery, request.query);
    const after = query.cursor === undefined ? null : readCursor(query.cursor);
    const rows = await browseVersions(db, query, after, query.count + 1);
    const page = rows.slice(0, query.count);
    const last = page.at(-1);
    const next = rows.length > query.count && last ? writeCursor(last) : null;
    if (next !== null) response.set('Link', `<${nextAddress(request.originalUrl, next)}>; rel="next"`);
    const examples = page.map(versionSummary);
    const document: ExamplesDocument = { schema: 'thalweg.examples/1', examples, next };
    response.type('json').send(documentText(document));
  });

  router.get('/examples/:owner/:slug', async (request, response) => {
    const { owner, slug } = request.params;
    const rows = await listVersions(db, owner, slug);
    if (rows.length === 0) throw new Problem(404, 'not-found', `There is no example ${owner}/${slug}.`);
    const versions = rows.map(versionSummary);
    const document: HistoryDocument = { schema: 'thalweg.history/1', example: `${owner}/${slug}`, versions };
    response.type('json').send(documentText(document));
  });

  const at = '/examples/:owner/:slug/versions/:version';
  router.get(at, guards.welcomes, async (request, response) => {
    const row = await visibleVersion(db, versionName(request.params), readerOf(response.locals));
    response.type('json').send(documentText(versionDocument(row, await listFiles(db, row.id))));
  });

  router.get(`${at}/archive`, guards.welcomes, async (request, response) => {
    const row = await visibleVersion(db, versionName(request.params), readerOf(response.locals));
    const { digest, size, slug, version } = row;
    if (!row.listed) response.set('Vary', 'Authorization');
    await sendBytes(request, response, {
      digest,
      size,
      type: 'application/zip',
      name: `${slug}-${version}.zip`,
      bytes: () => requiredBlob(db, digest),
    });
  });

  router.get(`${at}/files/*path`, guards.welcomes, async (request, response) => {
    const row = await visibleVersion(db, versionName(request.params), readerOf(response.locals));
    const path = pathOf(request.params);
    const file = (await listFiles(db, row.id)).find((candidate) => candidate.path === path);
    if (!file) throw new Problem(404, 'not-found', `This version has no file ${path}.`);
    const { digest, size } = file;
    const name = path.split('/').at(-1) ?? path;
    const bytes = (): Promise<Buffer> => requiredBlob(db, digest);
    await sendBytes(request, response, { digest, size, type: 'application/octet-stream', name, bytes });
  });

  return router;
}

/** A version that the reader may see: listed, or their own. Others are said not to exist. */
async function visibleVersion(db: Database, name: VersionName, reader: Principal | null): Promise<VersionRow> {
  const row = await findVersion(db, name);
  if (row && (row.listed || reader?.name === row.owner)) return row;
  throw new Problem(404, 'not-found', `There is no version ${nameText(name)}.`);
}

async function requiredBlob(db: Database, digest: string): Promise<Buffer> {
  const bytes = await findBlob(db, digest);
  if (!bytes) throw new Error(`expected the bytes of ${digest}, found none`);
  return bytes;
}

function nextAddress(address: string, cursor: string): string {
  const [path = '', query = ''] = address.split('?');
  const parameters = new URLSearchParams(query);
  parameters.set('cursor', cursor);
  return `${path}?${parameters.toString()}`;
}
