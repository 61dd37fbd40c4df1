import { readFile, stat } from 'node:fs/promises';
import { dirname, resolve } from 'node:path';
import type { Readable } from 'node:stream';
import { ThalwegError } from '@thalweg/core';
import { FILE_BYTES_LIMIT } from '@thalweg/format';

/** A document as it was given: plain data that can be handed to another thread. */
export interface DocumentSource {
  /** The name for messages: the path as typed, or `standard input`. */
  readonly name: string;
  readonly bytes: Uint8Array;
  /** Folder in which the files that the document names are looked for; null where it may name none. */
  readonly folder: string | null;
}

/** Reads a file, or standard input for `-`, which can be read once. Throws `not-found`, `bad-file`, `too-large` and `usage`. */
export async function readSource(path: string, stdin: Readable): Promise<DocumentSource> {
  if (path === '-') return { name: 'standard input', bytes: await readStream(stdin), folder: process.cwd() };
  try {
    const status = await stat(path);
    if (status.isDirectory())
      throw new ThalwegError('bad-file', `expected a document, got the folder ${path}; name a file in it`);
    if (status.isFile() && status.size > FILE_BYTES_LIMIT) throw tooLarge(path, status.size);
    return { name: path, bytes: await readFile(path), folder: dirname(resolve(path)) };
  } catch (error) {
    if (error instanceof ThalwegError) throw error;
    const { code } = error as NodeJS.ErrnoException;
    const reason = code === 'EACCES' ? 'permission denied' : 'there is no such file';
    throw new ThalwegError('not-found', `expected a readable file, got ${path}: ${reason}; check its name`, {
      cause: error,
    });
  }
}

async function readStream(stream: Readable): Promise<Uint8Array> {
  if (stream.readableEnded || stream.destroyed) {
    throw new ThalwegError(
      'usage',
      'expected "-" for one document at most, got it for two: standard input can be read once; name a file for the other',
    );
  }
  const chunks: Buffer[] = [];
  let size = 0;
  for await (const chunk of stream) {
    const bytes = Buffer.isBuffer(chunk) ? chunk : Buffer.from(String(chunk));
    size += bytes.length;
    if (size > FILE_BYTES_LIMIT) throw tooLarge('standard input', size);
    chunks.push(bytes);
  }
  return Buffer.concat(chunks);
}

function tooLarge(name: string, size: number): ThalwegError {
  return new ThalwegError(
    'too-large',
    `expected at most ${FILE_BYTES_LIMIT} bytes, got ${size} in ${name}; reduce the model`,
  );
}
