import { randomBytes } from 'node:crypto';
import { open, realpath, rename, stat, unlink } from 'node:fs/promises';
import { basename, dirname, join } from 'node:path';
import { ThalwegError } from '@thalweg/core';

/**
 * Writes a whole file or leaves what was there: the content goes to a temporary file beside it, is flushed to the disk, and is
 * renamed into place. A link is followed and the mode of an existing file kept; devices and pipes are written directly.
 * Throws `cannot-write` naming the reason.
 */
export async function writeFileAtomically(path: string, content: string | Uint8Array): Promise<void> {
  try {
    const target = await realpath(path).catch(whenMissing(path));
    const existing = await stat(target).catch(whenMissing(null));
    if (existing?.isDirectory()) throw new ThalwegError('cannot-write', message(path, 'it is a folder'));
    if (existing !== null && !existing.isFile()) await writeAndSync(target, content, 'w');
    else await replace(target, content, existing === null ? 0o666 : existing.mode & 0o777);
  } catch (error) {
    if (error instanceof ThalwegError) throw error;
    throw new ThalwegError('cannot-write', message(path, reason(error)), { details: { path }, cause: error });
  }
}

async function replace(target: string, content: string | Uint8Array, mode: number): Promise<void> {
  const partial = join(dirname(target), `.${basename(target)}.${randomBytes(6).toString('hex')}.partial`);
  try {
    await writeAndSync(partial, content, 'wx', mode);
    await rename(partial, target);
  } catch (error) {
    await unlink(partial).catch(() => undefined);
    throw error;
  }
}

async function writeAndSync(path: string, content: string | Uint8Array, flags: string, mode?: number): Promise<void> {
  const file = await open(path, flags, mode);
  try {
    await file.writeFile(content);
    if (flags === 'wx') await file.sync();
  } finally {
    await file.close();
  }
}

function whenMissing<T>(value: T): (error: unknown) => T {
  return (error) => {
    if ((error as NodeJS.ErrnoException).code === 'ENOENT') return value;
    throw error;
  };
}

function message(path: string, why: string): string {
  return `cannot write ${path}: ${why}. Give a file in a folder that you may write to`;
}

function reason(error: unknown): string {
  const { code, message: text } = error as NodeJS.ErrnoException;
  const known: Record<string, string> = {
    ENOENT: 'its folder does not exist',
    ENOTDIR: 'a part of its path is not a folder',
    EACCES: 'permission denied',
    EPERM: 'permission denied',
    EROFS: 'the file system is read-only',
    ENOSPC: 'the disk is full',
    EDQUOT: 'the disk quota is used up',
  };
  return known[code ?? ''] ?? text;
}
