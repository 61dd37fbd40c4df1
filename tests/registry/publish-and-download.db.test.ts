import { existsSync, mkdtempSync, readFileSync, rmSync, writeFileSync } from 'node:fs';
import { createServer, type Server } from 'node:http';
import type { AddressInfo } from 'node:net';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { execa } from 'execa';
import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { type TestRegistry, testRegistry } from '../../apps/registry/test/support/test-registry.js';

const root = new URL('../../', import.meta.url).pathname;
const home = mkdtempSync(join(tmpdir(), 'thalweg-story-'));
const elsewhere = mkdtempSync(join(tmpdir(), 'thalweg-story-'));

let registry: TestRegistry;
let server: Server;
let address: string;

beforeAll(async () => {
  registry = await testRegistry();
  server = createServer(registry.app);
  await new Promise<void>((resolve) => server.listen(0, '127.0.0.1', resolve));
  address = `http://127.0.0.1:${(server.address() as AddressInfo).port}`;
});
afterAll(async () => {
  server.closeAllConnections();
  server.close();
  await registry.close();
  for (const folder of [home, elsewhere]) rmSync(folder, { recursive: true, force: true });
});

/** Stops the server, and starts it again at the same address. */
async function whileOffline(work: () => Promise<void>): Promise<void> {
  await new Promise((resolve) => {
    server.close(resolve);
    server.closeAllConnections();
  });
  try {
    await work();
  } finally {
    server = createServer(registry.app);
    await new Promise<void>((resolve) => server.listen(Number(new URL(address).port), '127.0.0.1', resolve));
  }
}

/** Many commands one after another. */
const SLOW = { timeout: 240_000 };

/** The command line, in the home directory of somebody. */
function thalweg(at: string, words: readonly string[], more: { input?: string; registry?: string } = {}) {
  return execa(process.execPath, [join(root, 'apps/cli/bin/thalweg.js'), ...words], {
    cwd: at,
    env: { HOME: at, XDG_CONFIG_HOME: '', XDG_CACHE_HOME: '', THALWEG_REGISTRY: more.registry ?? address },
    reject: false,
    ...(more.input === undefined ? {} : { input: more.input }),
  });
}

describe('a session with the registry', () => {
  it('publishes with a token; another home finds, downloads and computes, offline too', SLOW, async () => {
    const { token } = await registry.addMember('mira');
    const signedIn = await thalweg(home, ['sign-in'], { input: `${token}\n` });
    expect(signedIn.stdout).toContain('mira at http://127.0.0.1');
    expect(signedIn.stdout + signedIn.stderr).not.toContain(token);

    const example = join(root, 'examples/depolarising');
    const published = await thalweg(home, ['publish', example, '--listed', '--json']);
    expect(published.exitCode).toBe(0);
    const { digest } = JSON.parse(published.stdout) as { digest: string };
    const again = await thalweg(home, ['publish', example, '--listed', '--json']);
    expect(again.stdout).toBe(published.stdout);

    const found = await thalweg(elsewhere, ['browse', 'depolarising']);
    expect(found.stdout).toContain('mira/depolarising@1.0.0');
    const shown = await thalweg(elsewhere, ['read', 'mira/depolarising']);
    expect(shown.stdout).toContain(digest);
    const got = await thalweg(elsewhere, ['download', 'mira/depolarising@1.0.0', '--json']);
    expect(JSON.parse(got.stdout)).toMatchObject({ name: 'mira/depolarising@1.0.0', digest, folder: 'depolarising' });
    for (const file of ['example.json', 'generate.js', 'evidence/showcase.json']) {
      expect(readFileSync(join(elsewhere, 'depolarising', file))).toEqual(readFileSync(join(example, file)));
    }
    const sealed = await thalweg(elsewhere, ['seal', 'depolarising', '--json']);
    expect(JSON.parse(sealed.stdout)).toMatchObject({ digest });

    await whileOffline(async () => {
      const offline = await thalweg(elsewhere, ['model', 'mira/depolarising@1.0.0', '--set', 'n=2']);
      expect(offline.exitCode).toBe(0);
      const local = await thalweg(elsewhere, ['model', 'depolarising', '--set', 'n=2']);
      expect(offline.stdout).toBe(local.stdout);
      const asked = await thalweg(elsewhere, ['read', 'mira/depolarising']);
      expect(asked.exitCode).toBe(69);
    });
  });

  it.each([
    ['an example that is not there', ['download', 'mira/nothing'], 66, 'There is no example mira/nothing'],
    ['a version that is not there', ['read', 'mira/depolarising@9.0.0'], 66, '9.0.0'],
    ['a folder that is there', ['download', 'mira/depolarising'], 73, 'not there yet'],
    ['no token', ['withdraw', 'mira/depolarising@1.0.0', '--because', 'why not'], 77, 'sign-in'],
    ['no version', ['withdraw', 'mira/depolarising', '--because', 'why not'], 64, 'expected a version'],
    ['no reason', ['withdraw', 'mira/depolarising@1.0.0'], 64, '--because'],
    ['a path for a name', ['read', './depolarising'], 64, 'expected an example such as'],
  ])('is refused %s', async (_, words, status, text) => {
    const result = await thalweg(elsewhere, words);
    expect(result.exitCode).toBe(status);
    expect(result.stderr).toContain(text);
    expect(result.stdout).toBe('');
    expect(result.stderr).not.toMatch(/^\s+at /m);
  });

  it('unpacks nothing whose digest is wrong', async () => {
    const impostor = createServer((request, response) => {
      const version = {
        schema: 'thalweg.version/1',
        example: 'mira/depolarising',
        version: '1.0.0',
        title: 'A title with \u001b[31mcolours',
        summary: 'A summary.',
        digest: 'ab'.repeat(32),
        size: 10,
        listed: true,
        publishedBy: 'mira',
        publishedAt: '2026-01-01T00:00:00.000Z',
        withdrawn: null,
        archive: '/archive',
        document: JSON.parse(readFileSync(join(root, 'examples/depolarising/example.json'), 'utf8')) as unknown,
        files: [],
      };
      response.end(request.url === '/archive' ? 'other bytes' : JSON.stringify(version));
    });
    await new Promise<void>((resolve) => impostor.listen(0, '127.0.0.1', resolve));
    const there = `http://127.0.0.1:${(impostor.address() as AddressInfo).port}`;
    try {
      const result = await thalweg(home, ['download', 'mira/depolarising@1.0.0'], { registry: there });
      expect(result.exitCode).toBe(65);
      expect(result.stderr).toContain('nothing was unpacked');
      expect(existsSync(join(home, 'depolarising'))).toBe(false);
      const shown = await thalweg(home, ['read', 'mira/depolarising@1.0.0'], { registry: there });
      expect(shown.stdout).not.toContain('\u001b[31m');
    } finally {
      impostor.closeAllConnections();
      impostor.close();
    }
  });

  it('is told what is wrong with a package', async () => {
    const draft = join(home, 'broken');
    await thalweg(elsewhere, ['download', 'mira/depolarising', '-o', draft]);
    const path = join(draft, 'example.json');
    writeFileSync(path, readFileSync(path, 'utf8').replace('"licence": "MIT"', '"licence": "my own"'));
    const result = await thalweg(home, ['publish', draft]);
    expect(result.exitCode).toBe(65);
    expect(result.stderr).toContain('licence');
  });
});
