import { zipSync, type Zippable } from 'fflate';
import fc from 'fast-check';
import { expect, test } from 'vitest';
import { packArchive } from '../../src/archive/pack-archive.js';
import { isArchive, readArchive } from '../../src/archive/read-archive.js';
import { sha256Hex } from '../../src/digest/sha256.js';
import { ARCHIVE_LIMITS } from '../../src/limits.js';
import { caughtError, refusal } from '../support/caught-error.js';
import { exampleFiles, utf8 } from '../support/example-files.js';

/** How `packArchive` packs: every deviation from it has to be refused. */
const SEALED = { level: 0, mtime: new Date(1980, 0, 1), os: 3, attrs: (0o100644 << 16) >>> 0 } as const;
const files = exampleFiles();
const zip = (content: Zippable, options: object = {}) => zipSync(content, { ...SEALED, ...options });
const oneFile = { a: utf8('text') };

test('what was packed is read back, whatever the order of the files', () => {
  const archive = packArchive(files);
  expect(readArchive(archive, sha256Hex(archive))).toEqual(new Map([...files].sort()));
  expect(packArchive(new Map([...files].reverse()))).toEqual(archive);
  expect(isArchive(archive)).toBe(true);
});

/** The digest is that of the archive which Python's zipfile writes with the same names, contents, dates and modes. */
test('bytes of an archive never change', () => {
  const archive = packArchive(
    new Map([
      ['b/é.txt', utf8('2')],
      ['a.txt', utf8('1')],
    ]),
  );
  expect(archive.length).toBe(202);
  expect(sha256Hex(archive)).toBe('9c5489b1eb559bb78ce8be1a0caf2428a52939c166f4f51946cf9a088d0e0b28');
});

test('any files survive packing', () => {
  const name = fc.stringMatching(/^[a-z0-9]{1,8}(\/[a-z0-9]{1,8})?$/);
  fc.assert(
    fc.property(
      fc.uniqueArray(fc.tuple(name, fc.uint8Array({ maxLength: 40 })), {
        selector: ([key]) => key.split('/')[0],
        minLength: 1,
        maxLength: 8,
      }),
      (entries) => {
        const found = readArchive(packArchive(new Map(entries)));
        expect(found).toEqual(new Map([...entries].sort(([a], [b]) => (a < b ? -1 : 1))));
      },
    ),
    { numRuns: 50 },
  );
});

test('no changed byte is accepted', () => {
  const archive = packArchive(
    new Map([
      ['a.txt', utf8('1')],
      ['b.txt', utf8('22')],
    ]),
  );
  for (let k = 0; k < archive.length; k += 1) {
    const changed = archive.slice();
    changed[k] = (changed[k] ?? 0) ^ 1;
    expect(() => readArchive(changed), `byte ${k}`).toThrow(expect.objectContaining({ name: 'ThalwegError' }));
  }
});

test.each<[string, Uint8Array, string, string]>([
  ['nothing', new Uint8Array(), 'bad-file', 'it is no zip file'],
  ['an empty zip file', zip({}), 'bad-file', 'it is no zip file with files in it'],
  ['text', utf8('PK is how a zip file begins, not this'), 'bad-file', 'it is no zip file'],
  ['a compressed file', zip({ a: utf8('a'.repeat(100)) }, { level: 9 }), 'bad-file', 'its files are compressed'],
  ['a bomb', zip({ a: new Uint8Array(2 ** 24) }, { level: 9 }), 'bad-file', 'its files are compressed'],
  ['a link', zip(oneFile, { attrs: (0o120777 << 16) >>> 0 }), 'bad-file', 'packed differently'],
  ['another mode', zip(oneFile, { attrs: (0o100755 << 16) >>> 0 }), 'bad-file', 'packed differently'],
  ['another date', zip(oneFile, { mtime: new Date(2026, 0, 1) }), 'bad-file', 'packed differently'],
  ['a comment', zip(oneFile, { comment: 'hello' }), 'bad-file', 'packed differently'],
  ['an extra field', zip(oneFile, { extra: { 0x7875: utf8('x') } }), 'bad-file', 'packed differently'],
  ['unsorted names', zip({ b: utf8('1'), a: utf8('2') }), 'bad-file', 'packed differently'],
  ['bytes behind the end', new Uint8Array([...zip(oneFile), 0]), 'bad-file', 'packed differently'],
  ['an absolute path', zip({ '/etc/passwd': utf8('x') }), 'outside-folder', '"/etc/passwd"'],
  ['a path that leaves', zip({ 'a/../../b': utf8('x') }), 'outside-folder', '"a/../../b"'],
  ['a drive', zip({ 'C:x': utf8('x') }), 'outside-folder', '"C:x"'],
  ['a backslash', zip({ 'a\\b': utf8('x') }), 'bad-file', 'every system takes'],
  ['a control character', zip({ 'a\u0007': utf8('x') }), 'bad-file', 'every system takes'],
  ['a right-to-left mark', zip({ 'a\u202Ecod.exe': utf8('x') }), 'bad-file', 'every system takes'],
  ['a decomposed letter', zip({ 'e\u0301': utf8('x') }), 'bad-file', 'every system takes'],
  ['a folder entry', zip({ 'a/': new Uint8Array() }), 'bad-file', 'every system takes'],
  ['a long name', zip({ ['a'.repeat(ARCHIVE_LIMITS.nameBytes + 1)]: utf8('x') }), 'too-large', 'at most 200 bytes'],
  ['names that differ in case', zip({ A: utf8('x'), a: utf8('y') }), 'bad-file', 'differ on every system'],
  ['a file that is also a folder', zip({ a: utf8('x'), 'a/b': utf8('y') }), 'bad-file', 'differ on every system'],
  ['a prototype', zip(Object.fromEntries([['evidence/__proto__', utf8('x')]])), 'bad-file', 'every system takes'],
  [
    'too many files',
    zip(Object.fromEntries(Array.from({ length: ARCHIVE_LIMITS.files + 1 }, (_, k) => [`f${k}`, utf8('x')]))),
    'too-large',
    'at most 200 files',
  ],
  ['too many bytes', new Uint8Array(ARCHIVE_LIMITS.bytes + 1), 'too-large', 'at most 16777216 bytes, got 16777217'],
])('refuses %s', (_title, bytes, code, says) => {
  const [foundCode, , message] = refusal(() => readArchive(bytes));
  expect(foundCode, message).toBe(code);
  expect(message).toContain(says);
  expect(message).toMatch(/^expected .*, got .*; /s);
});

test('refuses an archive whose central directory names one file many times', () => {
  const archive = zip({ a: new Uint8Array(2 ** 20) });
  const directory = new DataView(archive.buffer).getUint32(archive.length - 6, true);
  const entry = archive.slice(directory, archive.length - 22);
  const repeated = new Uint8Array(directory + 100 * entry.length + 22);
  repeated.set(archive.slice(0, directory));
  for (let k = 0; k < 100; k += 1) repeated.set(entry, directory + k * entry.length);
  repeated.set(archive.slice(-22), repeated.length - 22);
  new DataView(repeated.buffer).setUint16(repeated.length - 14, 100, true);
  new DataView(repeated.buffer).setUint16(repeated.length - 12, 100, true);
  expect(refusal(() => readArchive(repeated))).toEqual([
    'bad-file',
    undefined,
    expect.stringContaining('overlap or are cut off'),
  ]);
});

test('the digest is checked before anything is unpacked', () => {
  const wrong = '0'.repeat(64);
  const error = caughtError(() => readArchive(utf8('PK\u0003\u0004 and so on'), wrong));
  expect(error).toMatchObject({ code: 'digest-mismatch', details: { expected: wrong } });
});

test('packing refuses what reading refuses', () => {
  expect(refusal(() => packArchive(new Map([['../a', utf8('x')]])))[0]).toBe('outside-folder');
  expect(refusal(() => packArchive(new Map([['a', new Uint8Array(ARCHIVE_LIMITS.bytes)]])))[0]).toBe('too-large');
});
