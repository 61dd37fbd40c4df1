import { chmodSync, mkdtempSync, readFileSync, readdirSync, rmSync, statSync, writeFileSync } from 'node:fs';
import { tmpdir } from 'node:os';
import { join } from 'node:path';
import { afterEach, beforeEach, describe, expect, it } from 'vitest';
import { findToken, keepToken } from '../../src/registry/credentials.js';
import { registryAddress } from '../../src/registry/registry-address.js';

let folder: string;
beforeEach(() => (folder = mkdtempSync(join(tmpdir(), 'thalweg-credentials-'))));
afterEach(() => rmSync(folder, { recursive: true, force: true }));

const HERE = 'https://registry.example';

describe('tokens', () => {
  it('are kept for each registry in a file that only its owner reads', async () => {
    const env = { XDG_CONFIG_HOME: folder };
    await keepToken(HERE, 'first', env);
    await keepToken('https://other.example', 'second', env);
    expect(await findToken(HERE, env)).toBe('first');
    expect(statSync(join(folder, 'thalweg')).mode & 0o777).toBe(0o700);
    expect(statSync(join(folder, 'thalweg/tokens.json')).mode & 0o777).toBe(0o600);
    await keepToken(HERE, null, env);
    expect(await findToken(HERE, env)).toBeNull();
    expect(await findToken('https://other.example', env)).toBe('second');
    expect(readdirSync(join(folder, 'thalweg'))).toEqual(['tokens.json']);
  });

  it('are taken from THALWEG_TOKEN first', async () => {
    const env = { XDG_CONFIG_HOME: folder, THALWEG_TOKEN: 'given\n' };
    await keepToken(HERE, 'kept', env);
    expect(await findToken(HERE, env)).toBe('given');
  });

  it('in a file that was open to others are closed to them when it is written again', async () => {
    const env = { XDG_CONFIG_HOME: folder };
    const path = await keepToken(HERE, 'first', env);
    chmodSync(path, 0o644);
    await keepToken(HERE, 'second', env);
    expect(statSync(path).mode & 0o777).toBe(0o600);
  });

  it('in a file that is something else are an error, and the file stays', async () => {
    const env = { XDG_CONFIG_HOME: folder };
    const path = await keepToken(HERE, 'first', env);
    writeFileSync(path, 'no JSON');
    await expect(findToken(HERE, env)).rejects.toThrow('remove it and sign in again');
    expect(readFileSync(path, 'utf8')).toBe('no JSON');
  });
});

describe('the address of a registry', () => {
  it.each([
    [null, {}, 'http://127.0.0.1:8080'],
    [null, { THALWEG_REGISTRY: 'https://registry.example/' }, HERE],
    ['https://registry.example/base/', { THALWEG_REGISTRY: 'https://other.example' }, `${HERE}/base`],
  ])('%s', (option, env, address) => {
    expect(registryAddress(option, env)).toBe(address);
  });

  it.each(['registry.example', 'ftp://registry.example', 'https://token@registry.example', 'https://x.example/?a=1'])(
    'not %s',
    (text) => {
      expect(() => registryAddress(text, {})).toThrow(`got "${text}"`);
    },
  );
});
