import { access, constants, stat } from 'node:fs/promises';
import { dirname, resolve } from 'node:path';
import { ThalwegError } from '@thalweg/core';

/** Throws `cannot-write` before anything is computed when a file could not be written afterwards. */
export async function requireTarget(path: string): Promise<void> {
  const folder = dirname(resolve(path));
  const status = await stat(folder).catch(() => null);
  if (status === null) throw cannotWrite(path, `the folder ${dirname(path)} does not exist`);
  if (!status.isDirectory()) throw cannotWrite(path, `${dirname(path)} is not a folder`);
  const target = await stat(path).catch(() => null);
  if (target?.isDirectory() === true) throw cannotWrite(path, 'it is a folder');
  await access(target === null ? folder : path, constants.W_OK).catch(() => {
    throw cannotWrite(path, 'permission denied');
  });
}

function cannotWrite(path: string, why: string): ThalwegError {
  return new ThalwegError(
    'cannot-write',
    `expected a file that can be written, got ${path}: ${why}; nothing was computed`,
    { details: { path } },
  );
}
