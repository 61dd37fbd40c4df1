import { createHash } from 'node:crypto';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { exampleArchive } from './support/example-archive.js';
import { type TestRegistry, testRegistry } from './support/test-registry.js';

let registry: TestRegistry;
let token: string;
let keys = 0;

beforeAll(async () => {
  registry = await testRegistry();
  ({ token } = await registry.addMember('mira'));
});
afterAll(() => registry.close());

const VERSIONS = '/api/v1/examples/mira/two-point-chain/versions';

function publish(archive: Uint8Array, key = `key-${(keys += 1)}`, as = token, to = VERSIONS, listed = 'true') {
  return registry.http
    .post(to)
    .set('Authorization', `Bearer ${as}`)
    .set('Idempotency-Key', key)
    .field('listed', listed)
    .attach('archive', Buffer.from(archive), 'example.zip');
}

describe('publishing', () => {
  it('keeps the bytes, and gives them back with their digest', async () => {
    const archive = exampleArchive();
    const digest = createHash('sha256').update(archive).digest('hex');
    const answer = await publish(archive);
    expect(answer.status).toBe(201);
    expect(answer.headers['location']).toBe(`${VERSIONS}/1.0.0`);
    expect(answer.body).toMatchObject({ example: 'mira/two-point-chain', version: '1.0.0', digest });

    const got = await registry.http.get(`${VERSIONS}/1.0.0/archive`).responseType('blob');
    expect(got.status).toBe(200);
    expect(Buffer.compare(got.body as Buffer, archive)).toBe(0);
    expect(got.headers['etag']).toBe(`"sha256-${digest}"`);
    expect(got.headers['repr-digest']).toBe(`sha-256=:${Buffer.from(digest, 'hex').toString('base64')}:`);
    expect(got.headers['cache-control']).toContain('immutable');
  });

  it('sends a part of an archive, nothing to who has it, and refuses a range outside', async () => {
    const archive = exampleArchive();
    const path = `${VERSIONS}/1.0.0/archive`;
    const part = await registry.http.get(path).set('Range', 'bytes=10-19').responseType('blob');
    expect(part.status).toBe(206);
    expect(part.headers['content-range']).toBe(`bytes 10-19/${archive.length}`);
    expect(Buffer.compare(part.body as Buffer, archive.subarray(10, 20))).toBe(0);
    const etag = String(part.headers['etag']);
    expect((await registry.http.get(path).set('If-None-Match', etag)).status).toBe(304);
    const stale = await registry.http.get(path).set('Range', 'bytes=10-19').set('If-Range', '"other"');
    expect(stale.status).toBe(200);
    const outside = await registry.http.get(path).set('Range', `bytes=${archive.length}-`);
    expect(outside.status).toBe(416);
    expect(outside.headers['content-range']).toBe(`bytes */${archive.length}`);
  });

  it('never takes a version twice', async () => {
    const again = await publish(exampleArchive({ title: 'Another text' }));
    expect(again.status).toBe(409);
    expect(again.body).toMatchObject({ code: 'version-exists', errors: [{ pointer: '/version' }] });
    expect(again.headers['content-type']).toContain('application/problem+json');
  });

  it('gives the same answer to the same key, and refuses the key for another request', async () => {
    const archive = exampleArchive({ version: '1.1.0' });
    const first = await publish(archive, 'same-key');
    const second = await publish(archive, 'same-key');
    expect([first.status, second.status]).toEqual([201, 201]);
    expect(second.text).toBe(first.text);
    const other = await publish(exampleArchive({ version: '1.1.1' }), 'same-key');
    expect(other.body).toMatchObject({ status: 422, code: 'key-reused' });
  });

  it('makes exactly one version of twenty requests at once with one key', async () => {
    const archive = exampleArchive({ version: '2.0.0' });
    const answers = await Promise.all(Array.from({ length: 20 }, () => publish(archive, 'crowd')));
    for (const { status } of answers) expect([201, 409]).toContain(status);
    expect(answers.filter(({ status }) => status === 201).length).toBeGreaterThan(0);
    for (const { status, body } of answers) if (status === 409) expect(body).toMatchObject({ code: 'still-running' });
    const rows = await registry.owner('versions').where({ version: '2.0.0' }).select('id');
    expect(rows).toHaveLength(1);
    const records = await registry.owner('records').where({ subject: 'mira/two-point-chain@2.0.0' });
    expect(records).toHaveLength(1);
  });

  it('shows an unlisted version to its owner alone', async () => {
    await publish(exampleArchive({ version: '3.0.0' }), 'unlisted', token, VERSIONS, 'false');
    expect((await registry.http.get(`${VERSIONS}/3.0.0`)).status).toBe(404);
    const { token: other } = await registry.addMember('other-reader');
    const asOther = await registry.http.get(`${VERSIONS}/3.0.0/archive`).set('Authorization', `Bearer ${other}`);
    expect(asOther.status).toBe(404);
    const asOwner = await registry.http.get(`${VERSIONS}/3.0.0`).set('Authorization', `Bearer ${token}`);
    expect(asOwner.body).toMatchObject({ version: '3.0.0', listed: false });
    const history = await registry.http.get('/api/v1/examples/mira/two-point-chain');
    expect(JSON.stringify(history.body)).not.toContain('3.0.0');
  });
});

describe('refusals', () => {
  it.each([
    ['no token', (archive: Uint8Array) => publish(archive, 'a').unset('Authorization'), 401, 'not-signed-in'],
    ['a mistyped token', (archive: Uint8Array) => publish(archive, 'b', 'thw_x'), 401, 'not-signed-in'],
    ['no key', (archive: Uint8Array) => publish(archive).unset('Idempotency-Key'), 400, 'key-missing'],
    [
      "another member's name",
      (archive: Uint8Array) => publish(archive, 'c', token, '/api/v1/examples/nobody/two-point-chain/versions'),
      403,
      'not-owner',
    ],
    [
      'another name than in the package',
      (archive: Uint8Array) => publish(archive, 'd', token, '/api/v1/examples/mira/other-chain/versions'),
      422,
      'name-mismatch',
    ],
    ['bytes that are no archive', () => publish(new TextEncoder().encode('no archive'), 'e'), 422, 'bad-file'],
  ])('%s', async (_, send, status, code) => {
    const answer = await send(exampleArchive({ version: '9.0.0' }));
    expect(answer.body).toMatchObject({ status, code });
    expect(answer.text).not.toContain(token);
  });

  it('a token without the scope', async () => {
    const { token: reader } = await registry.addMember('reader', ['read']);
    const answer = await publish(exampleArchive({ version: '9.0.0' }), 'f', reader);
    expect(answer.status).toBe(403);
    expect(answer.headers['www-authenticate']).toContain('insufficient_scope');
  });

  it('an expired and a revoked token', async () => {
    const { memberId, token: old } = await registry.addMember('late');
    await registry.owner('tokens').where({ member_id: memberId }).update({ revoked_at: new Date() });
    expect((await publish(exampleArchive(), 'g', old)).status).toBe(401);
  });

  it('a fault in the description, with its place', async () => {
    const answer = await publish(exampleArchive({ licence: 'my own' }), 'h');
    expect(answer.body).toMatchObject({ status: 422, errors: [{ pointer: '/licence', document: 'example.json' }] });
  });

  it('an upload that is too large', async () => {
    const answer = await publish(new Uint8Array(16 * 1024 * 1024 + 1), 'i');
    expect(answer.body).toMatchObject({ status: 413, code: 'too-large' });
  });
});
