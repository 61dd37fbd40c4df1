import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import type { Database } from '../src/database/connect.js';
import { migrate, unmigrate } from '../src/database/migrate.js';
import { exampleArchive } from './support/example-archive.js';
import { type TestRegistry, testRegistry } from './support/test-registry.js';

let registry: TestRegistry;

beforeAll(async () => {
  registry = await testRegistry();
  const { token } = await registry.addMember('mira');
  const answer = await registry.http
    .post('/api/v1/examples/mira/two-point-chain/versions')
    .set('Authorization', `Bearer ${token}`)
    .set('Idempotency-Key', 'first')
    .field('listed', 'false')
    .attach('archive', Buffer.from(exampleArchive()), 'example.zip');
  expect(answer.status).toBe(201);
});
afterAll(() => registry.close());

const CHANGES = [
  ['update blobs set bytes = bytes', 'blobs'],
  ['delete from blobs', 'blobs'],
  ['truncate blobs cascade', ''],
  ["update versions set version = '1.0.1'", 'version'],
  ["update versions set document = '{}'", 'version'],
  ["update versions set archive = sha256('')", 'version'],
  ['delete from versions', 'versions'],
  ['truncate versions cascade', ''],
  ["update version_files set path = 'other'", 'version_files'],
  ['delete from version_files', 'version_files'],
  ["update records set action = 'nothing'", 'records'],
  ['delete from records', 'records'],
] as const;

describe('the database refuses to change what is published', () => {
  it.each(CHANGES)('asked by its owner: %s', async (statement) => {
    await expect(registry.owner.raw(statement)).rejects.toThrow(/never change/);
  });

  it.each(CHANGES)('asked by the server: %s', async (statement) => {
    await expect(registry.db.raw(statement)).rejects.toThrow(/permission denied|never change/);
  });

  it('to list a version and then hide it, or to change why it was withdrawn', async () => {
    await registry.db.raw('update versions set listed = true');
    await expect(registry.db.raw('update versions set listed = false')).rejects.toThrow(/never changes/);
    await registry.db.raw("update versions set withdrawn_at = now(), withdrawn_because = 'a sign was wrong'");
    await expect(registry.db.raw("update versions set withdrawn_because = 'no reason'")).rejects.toThrow(
      /never changes/,
    );
  });

  it('to keep bytes under another digest', async () => {
    const insert = registry.db('blobs').insert({ digest: Buffer.alloc(32), bytes: Buffer.from('text') });
    await expect(insert).rejects.toThrow(/blobs_digest_is_of_bytes/);
  });

  it('to give the server members, tokens or other rights', async () => {
    await expect(registry.db('members').insert({ name: 'eve', full_name: 'Eve' })).rejects.toThrow(/permission denied/);
    await expect(registry.db('members').update({ role: 'administrator' })).rejects.toThrow(/permission denied/);
    await expect(registry.db.raw('alter table blobs disable trigger all')).rejects.toThrow(/must be owner/);
  });
});

describe('migrations', () => {
  it('go up, down and up again', async () => {
    const other = await testRegistry();
    try {
      await unmigrate(other.owner);
      expect(await tables(other.owner)).toEqual(['knex_migrations', 'knex_migrations_lock']);
      expect(await migrate(other.owner)).toHaveLength(3);
      expect(await tables(other.owner)).toContain('versions');
      expect(await migrate(other.owner)).toEqual([]);
    } finally {
      await other.close();
    }
  });
});

async function tables(db: Database): Promise<string[]> {
  const { rows } = await db.raw<{ rows: { name: string }[] }>(
    `select table_name as name from information_schema.tables where table_schema = 'public' order by 1`,
  );
  return rows.map(({ name }) => name);
}
