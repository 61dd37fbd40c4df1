import {
  comparePair,
  comparisonStarts,
  inequalitiesAt,
  transportModel,
  type ComparisonStart,
  type InequalitySlack,
  type PairComparison,
  type TransportModel,
  type Witness,
} from '@thalweg/core';
import { type ComparisonDocument, type SheetDocument } from '@thalweg/format';
import { inDocument } from '../../input/in-document.js';
import type { DocumentSource } from '../../input/read-source.js';
import { TOOL } from '../../version.js';
import type { TaskContext } from '../protocol.js';
import { worstInequalities } from './comparison-inequalities.js';
import { comparedNotions } from './comparison-notions.js';
import { inequalityConstants, rateOf, rowOf } from './comparison-rows.js';
import { markovModel } from './model-cache.js';
import { modelSummary } from './model-summary.js';

/** What one pair of states shows. */
export interface ComparisonOutcome {
  readonly pair: PairComparison;
  readonly inequalities: readonly InequalitySlack[];
}

interface StartsRequest {
  readonly source: DocumentSource;
  /** The witness of `ge`; null where there is none. */
  readonly witness: Witness | null;
  readonly count: number;
  readonly seed: number;
}

/** The pairs of states on which notions are compared; refuses a model without a transport metric. */
export function pairsToCompare({ source, witness, count, seed }: StartsRequest): ComparisonStart[] {
  const { observable = null, state } = witness ?? {};
  const through = observable && state ? { state, observable } : null;
  return comparisonStarts(preparedModel(source), through, count, seed);
}

/** One pair of states: both notions on its geodesic and trajectory, and the inequalities. */
export function comparedPair(
  {
    source,
    start,
    sheet,
  }: { readonly source: DocumentSource; readonly start: ComparisonStart; readonly sheet: SheetDocument },
  { isOutOfTime }: TaskContext,
): ComparisonOutcome {
  const model = preparedModel(source);
  const rate = rateOf(model, sheet);
  const pair = comparePair(model, start, rate, isOutOfTime);
  const constants = inequalityConstants(sheet);
  const inequalities =
    start.kind === 'random' ? inequalitiesAt(model, start.from, start.to, constants, rate, isOutOfTime) : [];
  return { pair, inequalities };
}

interface DocumentRequest {
  readonly source: DocumentSource;
  readonly sheet: SheetDocument;
  readonly witness: Witness | null;
  readonly compared: readonly ComparisonOutcome[];
  readonly pairs: number;
  readonly seed: number;
}

/** All pairs put together. */
export function comparisonDocument({
  source,
  sheet,
  witness,
  compared,
  pairs,
  seed,
}: DocumentRequest): ComparisonDocument {
  const { structure, digest, document } = markovModel(source);
  const { lower, upper } = rowOf(sheet, 'ge') ?? { lower: null, upper: null };
  const { notions, agree } = comparedNotions(
    preparedModel(source),
    witness,
    compared.map(({ pair }) => pair),
    { lower, upper },
  );
  const notes = notesOf(witness, compared.length, pairs, lower !== null);
  return {
    schema: 'thalweg.comparison/1',
    model: modelSummary(structure, digest, document.title),
    curvature: { lower, upper },
    notions,
    agree,
    inequalities: worstInequalities(compared, sheet),
    pairs,
    ...(notes.length === 0 ? {} : { notes }),
    seed,
    tool: TOOL,
  };
}

function preparedModel(source: DocumentSource): TransportModel {
  const { structure } = markovModel(source);
  return inDocument(source.name, () => transportModel(structure));
}

function notesOf(witness: Witness | null, done: number, pairs: number, isProved: boolean): string[] {
  const notes: string[] = [];
  if (witness === null)
    notes.push('No witness of the gradient estimate was found: EVI and convexity are those of random states.');
  if (done < pairs) notes.push('The time limit ended the comparison early.');
  if (!isProved) notes.push('No lower end of ge is proved: contraction and HWI are left out.');
  return notes;
}
