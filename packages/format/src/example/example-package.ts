import { ThalwegError } from '@thalweg/core';
import type { PackageFiles } from '../archive/pack-archive.js';
import { findNamesFault } from '../archive/file-names.js';
import { faultError } from '../fault.js';
import { parseExample, parseShowcase } from '../schema/parse-document.js';
import type { ExampleDocument } from './example-schema.js';
import type { ShowcaseDocument } from './showcase-schema.js';

/** An example package, read from its files. */
export interface ExamplePackage {
  readonly document: ExampleDocument;
  /** Text of `generate.js`. */
  readonly generator: string;
  /** Text of `NOTES.md`: Markdown with TeX. */
  readonly notes: string;
  /** The sheets recorded in `evidence/showcase.json`; null where there are none. */
  readonly recorded: ShowcaseDocument | null;
  readonly files: PackageFiles;
}

/** The files that every example package has. */
export const EXAMPLE_FILES = ['example.json', 'generate.js', 'NOTES.md', 'LICENSE'] as const;

/** Where the sheets of the showcase are recorded. */
export const SHOWCASE_FILE = 'evidence/showcase.json';

/**
 * Reads an example package from its files: `example.json`, `generate.js`, `NOTES.md`, `LICENSE`, and whatever lies in `evidence/`.
 * Throws `bad-file` for a file that is missing, empty, out of place or not UTF-8, and the errors of reading documents; an error
 * names its file in `details.document`.
 */
export function readExample(files: PackageFiles): ExamplePackage {
  const found = findNamesFault([...files.keys()]);
  if (found) throw faultError(found);
  requirePlaces(files);
  const textOf = (name: string): string => inFile(name, () => fileText(files, name));
  const recorded = files.get(SHOWCASE_FILE);
  return {
    document: inFile('example.json', () => parseExample(fileBytes(files, 'example.json'))),
    generator: textOf('generate.js'),
    notes: textOf('NOTES.md'),
    recorded: recorded ? inFile(SHOWCASE_FILE, () => parseShowcase(recorded)) : null,
    files,
  };
}

function requirePlaces(files: PackageFiles): void {
  for (const name of EXAMPLE_FILES) {
    if (fileBytes(files, name).length === 0) {
      throw new ThalwegError('bad-file', `expected a text in ${name}, got an empty file; write it`);
    }
  }
  const known: readonly string[] = EXAMPLE_FILES;
  const stray = [...files.keys()].find((name) => !known.includes(name) && !name.startsWith('evidence/'));
  if (stray === undefined) return;
  const message = `expected ${EXAMPLE_FILES.join(', ')} and the folder evidence in an example package, got ${stray}; move it into evidence or out of the folder`;
  throw new ThalwegError('bad-file', message, { details: { path: stray } });
}

function fileBytes(files: PackageFiles, name: string): Uint8Array {
  const bytes = files.get(name);
  if (bytes) return bytes;
  throw new ThalwegError('bad-file', `expected the file ${name} in an example package, got none; add it`, {
    details: { path: name },
  });
}

function fileText(files: PackageFiles, name: string): string {
  try {
    return new TextDecoder('utf-8', { fatal: true }).decode(fileBytes(files, name));
  } catch (cause) {
    if (cause instanceof ThalwegError) throw cause;
    throw new ThalwegError('bad-file', `expected UTF-8 text in ${name}, got other bytes; save it in UTF-8`, { cause });
  }
}

function inFile<Result>(name: string, read: () => Result): Result {
  try {
    return read();
  } catch (error) {
    if (!(error instanceof ThalwegError)) throw error;
    const { code, message, pointer, details } = error;
    throw new ThalwegError(code, message, {
      ...(pointer === undefined ? {} : { pointer }),
      details: { ...details, document: name },
      cause: error,
    });
  }
}
