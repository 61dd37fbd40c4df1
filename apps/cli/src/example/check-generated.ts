import { digestModel, parseModel, resolveModel, type ModelDocument } from '@thalweg/format';
import { createNodeSha256 } from '@thalweg/format/node';
import { inDocument } from '../input/in-document.js';
import type { DocumentSource } from '../input/read-source.js';

/** A generated model, checked against the schema, with its digest. Its generator is not built. */
export function checkGenerated({ name, bytes }: DocumentSource): {
  readonly document: ModelDocument;
  readonly digest: string;
} {
  return inDocument(name, () => {
    const document = parseModel(bytes);
    return { document, digest: digestModel(resolveModel(document), createNodeSha256) };
  });
}
