import type { ConventionName, SheetRequest } from '@thalweg/core';
import type { EndDocument, SheetDocument } from '@thalweg/format';
import type { DocumentSource } from '../../input/read-source.js';
import type { TaskContext } from '../protocol.js';
import { sheetDocument, sheetProofs, sheetSearch } from './sheet-tasks.js';

/** The whole sheet of one point of a sweep on one thread, equal to what `constants` computes on many; witnesses are left out. */
export function pointSheet(
  {
    source,
    request,
    convention,
  }: { readonly source: DocumentSource; readonly request: SheetRequest; readonly convention: ConventionName },
  context: TaskContext,
): SheetDocument {
  const { findings, searches } = sheetProofs({ source, request, searchClosed: false }, context);
  const found = searches.map((task) => sheetSearch({ source, task }, context));
  const sheet = sheetDocument({ source, request, findings: [...findings, ...found], convention });
  return {
    ...sheet,
    constants: sheet.constants.map((row) => ({ ...row, lower: plain(row.lower), upper: plain(row.upper) })),
  };
}

function plain(end: EndDocument | null): EndDocument | null {
  if (end === null) return null;
  const { evidence: _evidence, ...rest } = end;
  return rest;
}
