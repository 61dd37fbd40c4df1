import {
  geodesicTable,
  speedRange,
  transportDistance,
  transportModel,
  type TransportDistance,
  type TransportModel,
} from '@thalweg/core';
import { encodeEnd, encodeMatrix, type DistanceDocument } from '@thalweg/format';
import { inDocument } from '../../input/in-document.js';
import type { DocumentSource } from '../../input/read-source.js';
import { TOOL } from '../../version.js';
import type { TaskContext } from '../protocol.js';
import { markovModel } from './model-cache.js';
import { modelSummary } from './model-summary.js';
import { readState } from './read-state.js';

export interface DistanceRequest {
  readonly source: DocumentSource;
  readonly from: DocumentSource;
  readonly to: DocumentSource;
  /** (upper − lower)/upper at which refinement ends. */
  readonly relativeWidth: number;
  /** Rows of the geodesic's table. */
  readonly points: number;
}

/** The transport distance of two states as a document. */
export function distanceDocument(
  { source, from, to, relativeWidth, points }: DistanceRequest,
  context: TaskContext,
): DistanceDocument {
  const { structure, digest, document } = markovModel(source);
  const model = inDocument(source.name, () => transportModel(structure));
  const [start, end] = [readState(structure, from), readState(structure, to)];
  const found = transportDistance(model, start, end, {
    relativeWidth,
    stop: context.isOutOfTime,
    onRefined: ({ pieces, lower, upper }) =>
      context.progress(`path of ${pieces} pieces: ${lower.toPrecision(6)} to ${upper.toPrecision(6)}`),
  });
  const notes = notesOf(model, found);
  return {
    schema: 'thalweg.distance/1',
    model: modelSummary(structure, digest, document.title),
    from: encodeMatrix(start),
    to: encodeMatrix(end),
    distance: { lower: encodeEnd(found.lower), upper: encodeEnd(found.upper) },
    relativeWidth,
    reached: found.reached,
    geodesic: geodesicOf(model, found, points),
    ...(notes.length === 0 ? {} : { notes }),
    tool: TOOL,
  };
}

function geodesicOf(model: TransportModel, found: TransportDistance, points: number): DistanceDocument['geodesic'] {
  const { path } = found;
  if (!path) return null;
  return {
    pieces: path.states.length - 1,
    speed: { ...speedRange(path) },
    points: geodesicTable(model, found, points).map(({ time, state, entropy, speed }) => ({
      time,
      state: encodeMatrix(state),
      entropy,
      speed,
    })),
  };
}

function notesOf({ structure }: TransportModel, { endpoints, reached, upper }: TransportDistance): string[] {
  const notes: string[] = [];
  const { onBoundary, relation, moved } = endpoints;
  if (moved > 0) {
    notes.push(
      `The matrices given were moved by ${moved.toPrecision(2)} (Hilbert–Schmidt norm) to be states with one E†ρ; the distance is theirs.`,
    );
  }
  if (relation === 'apart' && (onBoundary[0] || onBoundary[1])) {
    const which =
      onBoundary[0] && onBoundary[1] ? 'Both states lie' : `The ${onBoundary[0] ? 'first' : 'second'} state lies`;
    notes.push(
      `${which} on the boundary of state space, where the metric is singular: the last bit of the path is bounded by its straight line.`,
    );
  }
  if (structure.fixedPoints?.primitive === false) {
    notes.push('The model is not primitive: distances are finite between states with the same E†ρ only.');
  }
  if (!reached && Number.isFinite(upper.value)) notes.push('The bracket is wider than was asked for.');
  return notes;
}
