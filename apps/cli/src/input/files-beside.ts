import type { ReadFile } from '@thalweg/format';
import { filesInFolder } from '@thalweg/format/node';
import type { DocumentSource } from './read-source.js';

/** How files that a document names are read; no way at all where it may name none. */
export function filesBesideSource({ folder }: DocumentSource): { readonly readFile?: ReadFile } {
  return folder === null ? {} : { readFile: filesInFolder(folder) };
}
