import { createHash } from 'node:crypto';
import { readArchive, readExample, type ExamplePackage } from '@thalweg/format';
import type { PublicationDocument } from '@thalweg/format/api';
import type { Principal } from '../auth/principal.js';
import type { Database } from '../database/connect.js';
import { Problem } from '../http/problem.js';
import { insertRecord } from '../records/record-store.js';
import { findAnswer, insertAnswer, lockKey, type Answer } from './answer-store.js';
import { insertVersion, lockExample, versionsOf } from './publish-store.js';

export interface PublishRequest {
  readonly owner: string;
  readonly slug: string;
  /** The archive as it came. */
  readonly archive: Uint8Array;
  readonly listed: boolean;
  readonly idempotencyKey: string;
}

/** What a package is, found without keeping anything: the preflight. Throws the errors of archives and documents. */
export function examine(archive: Uint8Array, slug: string): ExamplePackage {
  const found = readExample(readArchive(archive));
  if (found.document.name === slug) return found;
  const message = `expected the name ${slug} as in the address, got ${found.document.name}; publish it under its own name`;
  throw new Problem(422, 'name-mismatch', message, {
    errors: [{ code: 'name-mismatch', detail: message, pointer: '/name', document: 'example.json' }],
  });
}

/**
 * Publishes a version in one transaction: all of it is there afterwards, or nothing. The same key with the same request gives
 * the same answer again, whatever happened in between; with another request it is refused.
 */
export async function publish(db: Database, principal: Principal, request: PublishRequest): Promise<Answer> {
  if (principal.name !== request.owner) {
    throw new Problem(403, 'not-owner', `Only ${request.owner} publishes under that name; you are ${principal.name}.`);
  }
  const digest = requestDigest(request);
  const known = await answerTo(db, principal, request.idempotencyKey, digest);
  if (known) return known;
  const found = examine(request.archive, request.slug);
  return db.transaction(async (trx) => {
    if (!(await lockKey(trx, principal.memberId, request.idempotencyKey))) throw stillRunning();
    const meanwhile = await answerTo(trx, principal, request.idempotencyKey, digest);
    if (meanwhile) return meanwhile;
    const exampleId = await lockExample(trx, principal.memberId, request.slug);
    requireNewVersion(await versionsOf(trx, exampleId), found.document.version);
    const { archive, listed } = request;
    const { document, files } = found;
    await insertVersion(trx, { exampleId, document, archive, files, listed, publishedBy: principal.memberId });
    const answer = answerFor(request, document.version);
    await insertAnswer(trx, { memberId: principal.memberId, key: request.idempotencyKey, request: digest, ...answer });
    await insertRecord(trx, {
      memberId: principal.memberId,
      action: 'publish',
      subject: `${request.owner}/${request.slug}@${document.version}`,
    });
    return answer;
  });
}

function answerFor({ owner, slug, archive, listed }: PublishRequest, version: string): Answer {
  const digest = createHash('sha256').update(archive).digest('hex');
  const path = `/api/v1/examples/${owner}/${slug}/versions/${version}`;
  const body: PublicationDocument = {
    schema: 'thalweg.publication/1',
    example: `${owner}/${slug}`,
    version,
    digest,
    listed,
    path,
  };
  return { status: 201, body };
}

/** Name and version are never used again, and versions that differ in build metadata alone do not exist. */
function requireNewVersion(versions: readonly string[], version: string): void {
  if (!versions.includes(version)) return;
  const message = `expected a version that is not published yet, got ${version}; raise it: a published version never changes`;
  throw new Problem(409, 'version-exists', message, {
    errors: [{ code: 'version-exists', detail: message, pointer: '/version', document: 'example.json' }],
  });
}

async function answerTo(db: Database, principal: Principal, key: string, digest: Buffer): Promise<Answer | null> {
  const known = await findAnswer(db, principal.memberId, key);
  if (!known) return null;
  if (known.request.equals(digest)) return { status: known.status, body: known.body };
  throw new Problem(422, 'key-reused', 'This Idempotency-Key was used for another request; choose a new one.');
}

function stillRunning(): Problem {
  return new Problem(409, 'still-running', 'A request with this Idempotency-Key is still being worked on; ask again.', {
    headers: { 'Retry-After': '1' },
  });
}

/** Of everything that the answer depends on. */
function requestDigest({ owner, slug, listed, archive }: PublishRequest): Buffer {
  return createHash('sha256')
    .update(JSON.stringify([owner, slug, listed]))
    .update(archive)
    .digest();
}
