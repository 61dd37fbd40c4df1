import { unzipSync } from 'fflate';
import { ThalwegError } from '@thalweg/core';
import { sha256Hex } from '../digest/sha256.js';
import { faultError } from '../fault.js';
import { findCountFault, findNameFault, findNamesFault } from './file-names.js';
import { packArchive, requireSize, type PackageFiles } from './pack-archive.js';

/**
 * The files of an archive that `packArchive` made, and of no other: what comes out is packed again and must give the same bytes.
 * So there are no links, no second copy of a name, no bytes before, between or behind the files, no other modes and no
 * compression, and what is unpacked is never larger than the archive. Counts, sizes and names are bounded before a byte is copied.
 * With `digest` the archive is hashed first. Throws `bad-file`, `outside-folder`, `too-large` or `digest-mismatch`.
 */
export function readArchive(bytes: Uint8Array, digest?: string): PackageFiles {
  requireSize(bytes.length);
  if (digest !== undefined) requireDigest(bytes, digest);
  const files = unpack(bytes);
  const found = findNamesFault([...files.keys()]);
  if (found) throw faultError(found);
  if (!sameBytes(packArchive(files), bytes)) throw notSealed('it is packed differently from what its files give');
  return files;
}

/** Whether bytes begin like a zip file. */
export function isArchive(bytes: Uint8Array): boolean {
  return LOCAL_HEADER.every((byte, k) => bytes[k] === byte);
}

const LOCAL_HEADER = [0x50, 0x4b, 0x03, 0x04];
/** Bytes of an empty zip file, the shortest there is. */
const SHORTEST = 22;

function requireDigest(bytes: Uint8Array, digest: string): void {
  const found = sha256Hex(bytes);
  if (found === digest) return;
  const message = `expected an archive with the SHA-256 ${digest}, got ${found}; it was changed on the way: fetch it again`;
  throw new ThalwegError('digest-mismatch', message, { details: { expected: digest, found } });
}

function unpack(bytes: Uint8Array): Map<string, Uint8Array> {
  if (bytes.length < SHORTEST || !isArchive(bytes)) throw notSealed('it is no zip file with files in it');
  const names: string[] = [];
  let total = 0;
  const admit = ({ name, size, originalSize, compression }: Entry): boolean => {
    if (compression !== 0 || size !== originalSize) throw notSealed('its files are compressed');
    const found = findNameFault(name);
    if (found) throw faultError(found);
    names.push(name);
    total += size;
    const tooMany = findCountFault(names.length);
    if (tooMany) throw faultError(tooMany);
    if (total > bytes.length) throw notSealed('its files overlap or are cut off');
    return true;
  };
  return new Map(Object.entries(unzipped(bytes, admit)));
}

interface Entry {
  readonly name: string;
  readonly size: number;
  readonly originalSize: number;
  readonly compression: number;
}

function unzipped(bytes: Uint8Array, filter: (entry: Entry) => boolean): Record<string, Uint8Array> {
  try {
    return unzipSync(bytes, { filter });
  } catch (error) {
    if (error instanceof ThalwegError) throw error;
    throw notSealed(error instanceof Error ? error.message : String(error));
  }
}

function sameBytes(a: Uint8Array, b: Uint8Array): boolean {
  return a.length === b.length && a.every((byte, k) => byte === b[k]);
}

function notSealed(why: string): ThalwegError {
  return new ThalwegError(
    'bad-file',
    `expected an archive that thalweg seal wrote, got another: ${why}; seal its folder`,
  );
}
