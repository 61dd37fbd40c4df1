import {
  assembleSheet,
  boundAt,
  descend,
  DESCENT_CONSTANTS,
  generatorNormBound,
  type Descent,
  type DescentBound,
  type DescentEnds,
  type SheetFinding,
  type SheetRequest,
  type Structure,
} from '@thalweg/core';
import { encodeMatrix, type FlowDocument } from '@thalweg/format';
import type { DocumentSource } from '../../input/read-source.js';
import { TOOL } from '../../version.js';
import { markovModel } from './model-cache.js';
import { modelSummary } from './model-summary.js';
import { readState } from './read-state.js';

/** What a flow is computed from: the model, the state at time 0, and what was proved of the constants. */
export interface FlowRequest {
  readonly source: DocumentSource;
  readonly from: DocumentSource;
  /** Null for a time at which entropies have fallen by about ENTROPY_FALL. */
  readonly until: number | null;
  readonly points: number;
  readonly request: SheetRequest;
  readonly findings: readonly SheetFinding[];
}

const ENTROPY_FALL = 1e4;

/** The flow of a state as a document. */
export function flowDocument({ source, from, until, points, request, findings }: FlowRequest): FlowDocument {
  const { structure, digest, document } = markovModel(source);
  const rho = readState(structure, from);
  const ends = provedEnds(structure, request, findings);
  const times = { until: until ?? usualTime(structure, ends), points };
  const descent = descend(structure, rho, times, ends);
  const notes = notesOf(structure, descent);
  return {
    schema: 'thalweg.flow/1',
    model: modelSummary(structure, digest, document.title),
    limit: encodeMatrix(descent.limit),
    method: descent.method,
    points: descent.points.map(({ time, state, stateError, entropy, production, distance, errors }) => ({
      time,
      state: encodeMatrix(state),
      stateError,
      entropy,
      production: Number.isFinite(production) ? production : null,
      distance,
      errors: { ...errors },
    })),
    bounds: descent.bounds.flatMap((bound) => encodeBound(bound, descent)),
    ...(notes.length === 0 ? {} : { notes }),
    tool: TOOL,
  };
}

function provedEnds(structure: Structure, request: SheetRequest, findings: readonly SheetFinding[]): DescentEnds {
  const rows = assembleSheet(structure, request, findings);
  const lower = (id: string) => rows.find(({ key }) => key.id === id)?.lower ?? null;
  return Object.fromEntries(DESCENT_CONSTANTS.map((id) => [id, lower(id)]));
}

function encodeBound(bound: DescentBound, { points }: Descent): FlowDocument['bounds'] {
  const { constant, quantity, rate, grade, by, formula, from, prefactor } = bound;
  // An observed end is no bound, and none becomes one; this tells the compiler.
  if (grade === 'observed') return [];
  const values = points.map(({ time }) => (time < from ? null : boundAt(bound, time)));
  return [{ constant, quantity, rate, grade, by, formula, from, prefactor, values }];
}

/** log(10⁴)/2λ for the gap λ, rounded up to 1, 2 or 5 times a power of ten; the time scale of the generator without one. */
function usualTime({ generator }: Structure, { gap }: DescentEnds): number {
  const norm = generatorNormBound(generator);
  const finite = gap && gap.value > 0 && Number.isFinite(gap.value);
  const time = finite ? Math.log(ENTROPY_FALL) / (2 * gap.value) : norm > 0 ? 10 / norm : 1;
  const unit = Number(`1e${Math.floor(Math.log10(time))}`);
  return unit * ([1, 2, 5].find((step) => step * unit >= time) ?? 10);
}

function notesOf({ symmetry }: Structure, { points, primitive, bounds }: Descent): string[] {
  const notes: string[] = [];
  if (!primitive) notes.push('The model is not primitive: entropies and distances are to E†ρ, where this state goes.');
  if (points.some(({ production }) => production === Infinity)) {
    notes.push('The entropy production is infinite where the flow leaves the boundary of state space.');
  }
  if (symmetry.kind === 'none' || symmetry.kind === 'KMS') {
    notes.push('The generator is not GNS-symmetric: ge, cge and the constants that rest on them bound nothing here.');
  }
  if (bounds.length === 0) notes.push('No positive lower end of a constant is proved: nothing bounds this flow.');
  return notes;
}
