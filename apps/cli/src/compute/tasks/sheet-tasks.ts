import {
  assembleSheet,
  definitionOf,
  convert,
  proveSheet,
  runSheetTask,
  type ConventionName,
  type End,
  type ProvedPart,
  type SheetFinding,
  type SheetRequest,
  type SheetRow,
  type SheetTask,
} from '@thalweg/core';
import { encodeBracket, type ConstantDocument, type SheetDocument } from '@thalweg/format';
import type { DocumentSource } from '../../input/read-source.js';
import { TOOL } from '../../version.js';
import type { TaskContext } from '../protocol.js';
import { markovModel } from './model-cache.js';
import { modelSummary } from './model-summary.js';

interface SheetInput {
  readonly source: DocumentSource;
  readonly request: SheetRequest;
}

/** What is proved of a sheet before any search, and the searches that are still worth making. */
export function sheetProofs(
  { source, request, searchClosed }: SheetInput & { readonly searchClosed: boolean },
  context: TaskContext,
): ProvedPart {
  return proveSheet(markovModel(source).structure, request, { stop: context.isOutOfTime, searchClosed });
}

/** One search of a sheet. */
export function sheetSearch(
  { source, task }: { readonly source: DocumentSource; readonly task: SheetTask },
  context: TaskContext,
): SheetFinding {
  return runSheetTask(markovModel(source).structure, task, context.isOutOfTime);
}

/** All findings put together into a sheet document. */
export function sheetDocument({
  source,
  request,
  findings,
  convention,
}: SheetInput & {
  readonly findings: readonly (SheetFinding | null)[];
  readonly convention: ConventionName;
}): SheetDocument {
  const { structure, digest, document } = markovModel(source);
  const rows = assembleSheet(structure, request, findings);
  return {
    schema: 'thalweg.sheet/1',
    model: modelSummary(structure, digest, document.title),
    convention,
    constants: rows.map((row) => encodeRow(row, convention)),
    seed: request.seed,
    tool: TOOL,
  };
}

function encodeRow(row: SheetRow, convention: ConventionName): ConstantDocument {
  const { id, mean } = row.key;
  const converted = (end: End | null): End | null =>
    end && {
      ...end,
      value: convert(end.value, id, convention),
      ...(end.margin === undefined ? {} : { margin: convert(end.margin, id, convention) }),
    };
  const other = mean !== undefined && mean !== 'logarithmic' ? `, ‖·‖_ρ with the ${mean} mean` : '';
  return {
    id,
    ...(mean === undefined ? {} : { mean }),
    ...(row.epsilon === undefined ? {} : { epsilon: row.epsilon }),
    ...encodeBracket({ lower: converted(row.lower), upper: converted(row.upper) }),
    closed: row.closed,
    definition: definitionOf(id, convention) + other,
    ...(row.notes.length === 0 ? {} : { note: row.notes.join('; ') }),
  };
}
