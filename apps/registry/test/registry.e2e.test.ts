import { mkdtempSync, rmSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { execa } from 'execa';
import { afterAll, beforeAll, expect, it } from 'vitest';
import { ensurePostgres } from '../../../packages/setup/lib/postgres.mjs';
import { isToken } from '../src/tokens/token-text.js';
import { exampleArchive } from './support/example-archive.js';

const root = new URL('../../../', import.meta.url).pathname;
const data = mkdtempSync(join(tmpdir(), 'thalweg-registry-'));
const env = { THALWEG_DATA: data, PORT: '0', LOG_LEVEL: 'silent' };

beforeAll(() => ensurePostgres());
afterAll(() => rmSync(data, { recursive: true, force: true }));

const registry = (...words: string[]) =>
  execa(process.execPath, ['packages/setup/registry.mjs', ...words], { cwd: root, env });

/** Starts the server, works against its address, and stops it as Ctrl-C does. */
async function whileServing(work: (address: string) => Promise<void>): Promise<void> {
  const server = registry();
  const address = await new Promise<string>((resolve, reject) => {
    let text = '';
    server.stdout.on('data', (chunk: Buffer) => {
      text += chunk.toString();
      const found = /answers at (\S+)/.exec(text);
      if (found?.[1]) resolve(found[1]);
    });
    server.catch(reject);
  });
  try {
    await work(address);
  } finally {
    server.kill('SIGINT');
    const { exitCode } = await server;
    expect(exitCode).toBe(0);
  }
}

it('keeps what is published over a stop and a start', { timeout: 180_000 }, async () => {
  expect((await registry('add-member', 'mira', '--full-name', 'Mira Tolland')).stdout).toContain('mira is a member.');
  const issued = await registry('issue-token', 'mira', '--label', 'laptop', '--scope', 'read', 'publish');
  // The token alone, so that it can be handed to sign-in.
  const token = issued.stdout;
  expect(isToken(token)).toBe(true);
  const taken = await registry('add-member', 'mira', '--full-name', 'Mira Tolland').catch((error: unknown) => error);
  expect(taken).toMatchObject({ exitCode: 1, stdout: '', stderr: expect.stringContaining('choose another') as string });
  const archive = exampleArchive();
  const path = '/api/v1/examples/mira/two-point-chain/versions';
  await whileServing(async (address) => {
    const form = new FormData();
    form.set('listed', 'true');
    form.set('archive', new Blob([archive as Uint8Array<ArrayBuffer>]), 'example.zip');
    const headers = { Authorization: `Bearer ${token}`, 'Idempotency-Key': 'once' };
    const answer = await fetch(`${address}${path}`, { method: 'POST', headers, body: form });
    expect(answer.status).toBe(201);
  });
  await whileServing(async (address) => {
    const answer = await fetch(`${address}${path}/1.0.0/archive`);
    expect(Buffer.compare(Buffer.from(await answer.arrayBuffer()), archive)).toBe(0);
  });
});

it('says what is wrong with a command', async () => {
  const result = await execa(process.execPath, ['apps/registry/dist/registry.js', 'serve'], {
    cwd: root,
    env: { DATABASE_URL: 'mysql://nothing' },
    reject: false,
  });
  expect(result.exitCode).toBe(1);
  expect(result.stderr).toContain('DATABASE_URL');
  expect(result.stderr).not.toContain('    at ');
});
