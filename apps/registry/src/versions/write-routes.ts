import express, { Router, type Request } from 'express';
import multer from 'multer';
import { ARCHIVE_LIMITS } from '@thalweg/format';
import { z } from 'zod';
import { type Guards, principalOf } from '../auth/authenticate.js';
import type { Database } from '../database/connect.js';
import { documentText } from '../http/document-text.js';
import { Problem } from '../http/problem.js';
import { readBody } from '../http/read-input.js';
import { examine, publish } from './publish-service.js';
import { versionSummary } from './version-document.js';
import { versionName } from './version-name.js';
import { withdraw } from './withdraw-service.js';

const publishForm = z.strictObject({ listed: z.enum(['true', 'false']).default('false') });

const withdrawalBody = z.strictObject({ because: z.string().trim().min(3).max(1000) });

/** Routes that change something: publish, preflight, withdraw. */
export function writeRoutes(db: Database, guards: Guards): Router {
  const router = Router();
  const upload = multer({
    storage: multer.memoryStorage(),
    limits: { files: 1, fields: 4, parts: 6, fieldSize: 1024, fileSize: ARCHIVE_LIMITS.bytes },
  }).single('archive');

  router.post('/examples/:owner/:slug/preflight', guards.requires('publish'), upload, (request, response) => {
    const { slug } = versionName(request.params);
    const { document, files } = examine(archiveOf(request), slug);
    const names = [...files].map(([path, bytes]) => ({ path, size: bytes.length }));
    response.type('json').send(documentText({ schema: 'thalweg.preflight/1', document, files: names }));
  });

  router.post('/examples/:owner/:slug/versions', guards.requires('publish'), upload, async (request, response) => {
    const { owner, slug } = versionName(request.params);
    const idempotencyKey = keyOf(request);
    const { listed } = readBody(publishForm, request.body ?? {});
    const answer = await publish(db, principalOf(response.locals), {
      owner,
      slug,
      archive: archiveOf(request),
      listed: listed === 'true',
      idempotencyKey,
    });
    response.status(answer.status).location(String(answer.body['path'])).type('json');
    response.send(documentText(answer.body));
  });

  router.post(
    '/examples/:owner/:slug/versions/:version/withdrawal',
    guards.requires('withdraw'),
    express.json({ limit: '16kb', strict: true }),
    async (request, response) => {
      const { because } = readBody(withdrawalBody, request.body);
      const name = versionName(request.params);
      const row = await withdraw(db, principalOf(response.locals), name, because);
      response.type('json').send(documentText(versionSummary(row)));
    },
  );

  return router;
}

function archiveOf(request: Request): Uint8Array {
  if (request.file) return request.file.buffer;
  const detail = 'Send the archive that thalweg seal writes as the part "archive" of multipart/form-data.';
  throw new Problem(400, 'archive-missing', detail);
}

function keyOf(request: Request): string {
  const key = request.get('Idempotency-Key');
  if (key !== undefined && /^[\x21-\x7e]{1,255}$/.test(key)) return key;
  const detail = 'Send an Idempotency-Key of 1 to 255 visible characters, a new one for each version.';
  throw new Problem(400, 'key-missing', detail);
}
