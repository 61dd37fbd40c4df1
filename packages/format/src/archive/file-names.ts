import { describeValue } from '../describe-value.js';
import { fault, type Fault } from '../fault.js';
import { ARCHIVE_LIMITS } from '../limits.js';

/**
 * The first fault of the names of an archive's files, or null: too many, one that is no plain relative path, or two that a file
 * system may take for the same (they differ only in case or in Unicode composition, or one is a folder of the other).
 */
export function findNamesFault(names: readonly string[]): Fault | null {
  const tooMany = findCountFault(names.length);
  if (tooMany) return tooMany;
  for (const name of names) {
    const found = findNameFault(name);
    if (found) return found;
  }
  return findCollision(names);
}

/** A fault where there are more files than a package may have. */
export function findCountFault(files: number): Fault | null {
  if (files <= ARCHIVE_LIMITS.files) return null;
  return fault('too-large', `expected at most ${ARCHIVE_LIMITS.files} files, got ${files} or more; leave some out`);
}

/** The first fault of one name: parts between single slashes, none of them empty, `.` or `..`, in Unicode form NFC. */
export function findNameFault(name: string): Fault | null {
  const got = describeValue(name);
  if (new TextEncoder().encode(name).length > ARCHIVE_LIMITS.nameBytes) {
    return fault(
      'too-large',
      `expected file names of at most ${ARCHIVE_LIMITS.nameBytes} bytes, got ${got}; shorten it`,
    );
  }
  if (name.startsWith('/') || /^[A-Za-z]:/.test(name) || name.split('/').includes('..')) {
    return fault(
      'outside-folder',
      `expected the name of a file inside the package, got ${got}; name it without / or .. in front`,
    );
  }
  const plain = name
    .split('/')
    .every((part) => part !== '' && part !== '.' && part !== '__proto__' && !/[. ]$/.test(part));
  if (plain && !/[\\:*?"<>|\p{Cc}\p{Cf}\p{Cs}]/u.test(name) && name === name.normalize('NFC')) return null;
  const message = `expected a file name that every system takes, got ${got}; use letters, digits, hyphens, points and / between folders`;
  return fault('bad-file', message);
}

function findCollision(names: readonly string[]): Fault | null {
  const seen = new Map<string, string>();
  for (const name of [...names].sort()) {
    const key = name.normalize('NFC').toUpperCase().toLowerCase();
    const other =
      seen.get(key) ??
      parents(key)
        .map((parent) => seen.get(parent))
        .find((found) => found !== undefined);
    if (other !== undefined) {
      const message = `expected names that differ on every system, got ${describeValue(other)} and ${describeValue(name)}; rename one`;
      return fault('bad-file', message);
    }
    seen.set(key, name);
  }
  return null;
}

/** The folders of a path, outermost first. */
function parents(path: string): string[] {
  const parts = path.split('/');
  return parts.slice(1).map((_, k) => parts.slice(0, k + 1).join('/'));
}
