import { stat } from 'node:fs/promises';
import { basename } from 'node:path';
import { ThalwegError } from '@thalweg/core';
import { isArchive, readArchive, readExample, type ExamplePackage, type PackageFiles } from '@thalweg/format';
import { filesOfFolder } from '@thalweg/format/node';
import { isExampleName, readExampleName } from '../registry/example-name.js';
import { obtainExample } from '../registry/obtain-example.js';
import type { Session } from '../session.js';
import { inDocument } from './in-document.js';
import { readSource, type DocumentSource } from './read-source.js';

/** What a path or a name leads to: a document, or an example package (a folder, an archive, or a version on a registry). */
export type Input =
  | { readonly kind: 'document'; readonly source: DocumentSource }
  | { readonly kind: 'example'; readonly name: string; readonly example: ExamplePackage };

/**
 * Reads whatever a path leads to, or `owner/slug[@version]` where there is no such path. Throws the errors of `readSource`,
 * `filesOfFolder`, `readArchive`, `readExample` and `obtainExample`.
 */
export async function readInput(path: string, session: Session): Promise<Input> {
  if (await isFolder(path)) return { kind: 'example', name: path, example: exampleOf(path, () => filesOfFolder(path)) };
  if (isExampleName(path) && !(await exists(path))) {
    const { name, files } = await obtainExample(readExampleName(path), null, session);
    return { kind: 'example', name, example: exampleOf(name, () => files) };
  }
  const source = await readSource(path, session.terminal.stdin);
  if (!isArchive(source.bytes)) return { kind: 'document', source };
  const digest = /^([0-9a-f]{64})\.zip$/.exec(basename(path))?.[1];
  return { kind: 'example', name: source.name, example: exampleOf(path, () => readArchive(source.bytes, digest)) };
}

/** Reads an example package; a document is refused. */
export async function readPackage(path: string, session: Session): Promise<ExamplePackage> {
  const input = await readInput(path, session);
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

async function exists(path: string): Promise<boolean> {
  return stat(path).then(
    () => true,
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
