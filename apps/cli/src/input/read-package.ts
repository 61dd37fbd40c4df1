import { stat } from 'node:fs/promises';
import { basename } from 'node:path';
import type { Readable } from 'node:stream';
import { ThalwegError } from '@thalweg/core';
import { isArchive, readArchive, readExample, type ExamplePackage, type PackageFiles } from '@thalweg/format';
import { filesOfFolder } from '@thalweg/format/node';
import { inDocument } from './in-document.js';
import { readSource, type DocumentSource } from './read-source.js';

/** What a path leads to: a document, or an example package (a folder or an archive). */
export type Input =
  | { readonly kind: 'document'; readonly source: DocumentSource }
  | { readonly kind: 'example'; readonly name: string; readonly example: ExamplePackage };

/** Reads whatever a path leads to. Throws the errors of `readSource`, `filesOfFolder`, `readArchive` and `readExample`. */
export async function readInput(path: string, stdin: Readable): Promise<Input> {
  if (await isFolder(path)) return { kind: 'example', name: path, example: exampleOf(path, () => filesOfFolder(path)) };
  const source = await readSource(path, stdin);
  if (!isArchive(source.bytes)) return { kind: 'document', source };
  const digest = /^([0-9a-f]{64})\.zip$/.exec(basename(path))?.[1];
  return { kind: 'example', name: source.name, example: exampleOf(path, () => readArchive(source.bytes, digest)) };
}

/** Reads an example package; a document is refused. */
export async function readPackage(path: string, stdin: Readable): Promise<ExamplePackage> {
  const input = await readInput(path, stdin);
  if (input.kind === 'example') return input.example;
  throw new ThalwegError(
    'usage',
    `expected an example (a folder with example.json, or an archive), got the document ${path}; thalweg draft DIR --from ${path} makes one of it`,
  );
}

async function isFolder(path: string): Promise<boolean> {
  if (path === '-') return false;
  return stat(path).then(
    (status) => status.isDirectory(),
    () => false,
  );
}

/** Errors inside a package name the file and the package it is in. */
function exampleOf(path: string, files: () => PackageFiles): ExamplePackage {
  return inDocument(path, () => {
    try {
      return readExample(files());
    } catch (error) {
      if (!(error instanceof ThalwegError) || error.details?.document === undefined) throw error;
      const { code, message, pointer, details } = error;
      throw new ThalwegError(code, message, {
        ...(pointer === undefined ? {} : { pointer }),
        details: { ...details, document: `${path}/${String(details?.document)}` },
        cause: error,
      });
    }
  });
}
