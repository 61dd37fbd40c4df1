import { zipSync, type Zippable } from 'fflate';
import { ThalwegError } from '@thalweg/core';
import { faultError } from '../fault.js';
import { ARCHIVE_LIMITS } from '../limits.js';
import { findNamesFault } from './file-names.js';

/** Files by their names, paths with forward slashes from the top of the package. */
export type PackageFiles = ReadonlyMap<string, Uint8Array>;

/**
 * The one archive of these files: a zip file with the names sorted, contents stored as they are, mode 0644, owner none, dates of
 * 1980. Its bytes depend on names and contents alone, and so does its SHA-256, by which it is named. Nothing is compressed: then
 * no later version of a compressor can give the same files another digest, and reading needs no decompressor.
 * Throws `bad-file`, `outside-folder` or `too-large`.
 */
export function packArchive(files: PackageFiles): Uint8Array {
  const names = [...files.keys()].sort();
  const found = findNamesFault(names);
  if (found) throw faultError(found);
  const contents: Zippable = Object.fromEntries(names.map((name) => [name, files.get(name) ?? new Uint8Array()]));
  requireSize(names.reduce((sum, name) => sum + (files.get(name)?.length ?? 0), 0));
  const archive = zipSync(contents, { level: 0, mtime: FIRST_DAY, os: UNIX, attrs: REGULAR_FILE });
  requireSize(archive.length);
  return archive;
}

/** Throws `too-large` when an archive of this many bytes is not taken. */
export function requireSize(bytes: number): void {
  if (bytes <= ARCHIVE_LIMITS.bytes) return;
  const message = `expected a package of at most ${ARCHIVE_LIMITS.bytes} bytes, got ${bytes}; leave out evidence that can be computed again`;
  throw new ThalwegError('too-large', message, { details: { limit: ARCHIVE_LIMITS.bytes, size: bytes } });
}

/** A zip file holds local time: this reads the same in every time zone. */
const FIRST_DAY = new Date(1980, 0, 1, 0, 0, 0);

const UNIX = 3;
/** The upper half of a zip file's external attributes is the mode under UNIX. */
const REGULAR_FILE = (0o100644 << 16) >>> 0;
