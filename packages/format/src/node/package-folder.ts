import { lstatSync, readFileSync, readdirSync } from 'node:fs';
import { join } from 'node:path';
import { ThalwegError } from '@thalweg/core';
import { requireSize, type PackageFiles } from '../archive/pack-archive.js';
import { findCountFault } from '../archive/file-names.js';
import { faultError } from '../fault.js';

/**
 * The files of an example package in a folder, by their names with forward slashes. What begins with a point is left out (.git,
 * .DS_Store); links and devices are refused; count and size are bounded before anything is read. Throws `not-found`, `bad-file` or
 * `too-large`.
 */
export function filesOfFolder(folder: string): PackageFiles {
  const names = [...listFiles(folder, '')].sort();
  const sizes = names.map((name) => requireRegularFile(join(folder, name), name));
  requireSize(sizes.reduce((sum, size) => sum + size, 0));
  return new Map(names.map((name) => [name, new Uint8Array(readFileSync(join(folder, name)))]));
}

function listFiles(folder: string, inside: string): string[] {
  const names: string[] = [];
  for (const entry of readFolder(join(folder, inside), inside === '' ? folder : inside)) {
    if (entry.name.startsWith('.')) continue;
    const name = inside === '' ? entry.name : `${inside}/${entry.name}`;
    if (entry.isDirectory()) names.push(...listFiles(folder, name));
    else names.push(name);
    const tooMany = findCountFault(names.length);
    if (tooMany) throw faultError(tooMany);
  }
  return names;
}

function readFolder(path: string, shown: string) {
  try {
    return readdirSync(path, { withFileTypes: true });
  } catch (cause) {
    const { code } = cause as NodeJS.ErrnoException;
    const message = `expected a folder that can be read, got ${shown} (${code ?? 'unknown reason'}); check its name and permissions`;
    throw new ThalwegError('not-found', message, { cause, details: { path: shown } });
  }
}

function requireRegularFile(path: string, shown: string): number {
  const status = lstatSync(path);
  if (status.isFile()) return status.size;
  const kind = status.isSymbolicLink() ? 'a link' : 'a device or pipe';
  throw new ThalwegError('bad-file', `expected files in an example package, got ${shown}, ${kind}; put a copy there`, {
    details: { path: shown },
  });
}
