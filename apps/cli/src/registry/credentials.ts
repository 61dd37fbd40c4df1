import { mkdir, open, readFile, rename, unlink } from 'node:fs/promises';
import { join } from 'node:path';
import { ThalwegError } from '@thalweg/core';
import { z } from 'zod';
import { configFolder, type Environment } from './user-folders.js';

const fileSchema = z.object({ tokens: z.record(z.string(), z.string()) });

/** The token for a registry: THALWEG_TOKEN, else what `sign-in` kept; null for none. */
export async function findToken(registry: string, env: Environment): Promise<string | null> {
  const given = env['THALWEG_TOKEN'];
  if (given !== undefined && given !== '') return given.trim();
  return (await readTokens(env))[registry] ?? null;
}

/** Keeps a token for a registry, or forgets it for null, in a file that its owner alone may read (0600 in 0700). */
export async function keepToken(registry: string, token: string | null, env: Environment): Promise<string> {
  const { folder, path } = placeOf(env);
  const tokens = new Map(Object.entries(await readTokens(env)));
  if (token === null) tokens.delete(registry);
  else tokens.set(registry, token);
  const partial = `${path}.${process.pid}.partial`;
  try {
    await mkdir(folder, { recursive: true, mode: 0o700 });
    const file = await open(partial, 'w', 0o600);
    try {
      await file.chmod(0o600);
      await file.writeFile(`${JSON.stringify({ tokens: Object.fromEntries(tokens) }, null, 2)}\n`);
    } finally {
      await file.close();
    }
    await rename(partial, path);
  } catch (cause) {
    await unlink(partial).catch(() => undefined);
    throw new ThalwegError('cannot-write', `cannot write ${path}: ${(cause as Error).message}. Set XDG_CONFIG_HOME`, {
      cause,
    });
  }
  return path;
}

async function readTokens(env: Environment): Promise<Record<string, string>> {
  const { path } = placeOf(env);
  const text = await readFile(path, 'utf8').catch((error: NodeJS.ErrnoException) => {
    if (error.code === 'ENOENT') return null;
    throw new ThalwegError('bad-file', `cannot read ${path}: ${error.message}`, { cause: error });
  });
  if (text === null) return {};
  try {
    return fileSchema.parse(JSON.parse(text)).tokens;
  } catch (cause) {
    throw new ThalwegError('bad-file', `expected tokens in ${path}, got something else; remove it and sign in again`, {
      cause,
    });
  }
}

function placeOf(env: Environment): { readonly folder: string; readonly path: string } {
  const folder = configFolder(env);
  return { folder, path: join(folder, 'tokens.json') };
}
