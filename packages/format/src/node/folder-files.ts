import { closeSync, constants, fstatSync, openSync, readFileSync, realpathSync } from 'node:fs';
import { dirname, join, relative, isAbsolute, sep } from 'node:path';
import { ThalwegError } from '@thalweg/core';
import { faultError } from '../fault.js';
import { FILE_BYTES_LIMIT } from '../limits.js';
import { findPathFault, type ReadFile } from '../matrix/file-form.js';

/** Reads files beside or below a document on disk; see `filesInFolder`. */
export function filesBeside(documentPath: string): ReadFile {
  return filesInFolder(dirname(documentPath));
}

/**
 * Reads files inside a folder by relative path. Links are followed to their end, which must lie in the folder, and only regular
 * files are opened. Throws `outside-folder`, `not-found`, `bad-file` or `too-large`.
 */
export function filesInFolder(folder: string): ReadFile {
  return (path) => {
    const found = findPathFault(path);
    if (found) throw faultError(found);
    const root = realPath(folder, folder);
    const target = realPath(join(root, ...path.split('/')), path);
    const inside = relative(root, target);
    if (inside === '..' || inside.startsWith(`..${sep}`) || isAbsolute(inside)) {
      throw new ThalwegError(
        'outside-folder',
        `expected a file inside the folder of the document, got ${JSON.stringify(path)}, a link that leaves it; copy the file there`,
        {
          details: { path },
        },
      );
    }
    return readRegularFile(target, path);
  };
}

function realPath(path: string, shown: string): string {
  try {
    return realpathSync(path);
  } catch (cause) {
    throw unreadable(shown, cause);
  }
}

/** O_NOFOLLOW: the path has no links left, so one that appears now was put there on purpose. O_NONBLOCK: a pipe cannot hang us. */
function readRegularFile(target: string, shown: string): Uint8Array {
  let descriptor: number;
  try {
    descriptor = openSync(target, constants.O_RDONLY | (constants.O_NOFOLLOW ?? 0) | (constants.O_NONBLOCK ?? 0));
  } catch (cause) {
    throw unreadable(shown, cause);
  }
  try {
    const status = fstatSync(descriptor);
    if (!status.isFile()) {
      throw new ThalwegError(
        'bad-file',
        `expected a file, got ${JSON.stringify(shown)}, which is a folder or a device; correct the path`,
      );
    }
    if (status.size > FILE_BYTES_LIMIT) {
      throw new ThalwegError(
        'too-large',
        `expected a file of at most ${FILE_BYTES_LIMIT} bytes, got ${status.size} in ${JSON.stringify(shown)}; reduce the model`,
        {
          details: { size: status.size, limit: FILE_BYTES_LIMIT },
        },
      );
    }
    return readFileSync(descriptor);
  } finally {
    closeSync(descriptor);
  }
}

function unreadable(shown: string, cause: unknown): ThalwegError {
  const code = (cause as NodeJS.ErrnoException).code ?? 'unknown reason';
  const reason = REASONS[code] ?? code;
  const message = `expected a readable file ${JSON.stringify(shown)}, got none: ${reason}; check its name and permissions`;
  return new ThalwegError('not-found', message, { cause, details: { path: shown, reason: code } });
}

const REASONS: Readonly<Record<string, string>> = {
  ENOENT: 'there is no such file',
  ENOTDIR: 'a part of its path is not a folder',
  EACCES: 'permission denied',
  ELOOP: 'its links go round in a circle',
};
