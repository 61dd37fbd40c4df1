import type { ConventionName, RowKey } from '@thalweg/core';
import { sha256Hex, type ExamplePackage, type SweepDocument } from '@thalweg/format';
import { TOOL } from '../version.js';

/** What decides the results of a sweep, whichever points it has. */
export function sweepDocument(
  { document, generator }: ExamplePackage,
  rows: readonly RowKey[],
  { convention, seed }: { readonly convention: ConventionName; readonly seed: number },
): SweepDocument {
  return {
    schema: 'thalweg.sweep/1',
    example: { name: document.name, version: document.version, generator: sha256Hex(generator) },
    constants: rows.map(({ id, mean }) => ({ id, ...(mean === undefined ? {} : { mean }) })),
    convention,
    seed,
    tool: TOOL,
  };
}
