import {
  blochDisc,
  eigenvalueTriangle,
  evaluateRings,
  gradientEstimateAt,
  hasGradientMetric,
  isUnitarilyCovariant,
  lowestPoint,
  metricOf,
  placeOn,
  reliefGrid,
  stateOn,
  ThalwegError,
  usualPlane,
  type BlochAxis,
  type ComplexMatrix,
  type MeanName,
  type NamedState,
  type ReliefGrid,
  type StateSlice,
  type Structure,
} from '@thalweg/core';
import { encodeMatrix, type ReliefDocument } from '@thalweg/format';
import type { DocumentSource } from '../../input/read-source.js';
import { TOOL } from '../../version.js';
import { markovModel } from './model-cache.js';
import { modelSummary } from './model-summary.js';
import { readState } from './read-state.js';

/** What slice of state space is wanted. */
export interface SliceRequest {
  readonly source: DocumentSource;
  readonly axes: readonly [BlochAxis, BlochAxis] | null;
  readonly through: readonly DocumentSource[];
  /** Null for a number that suits the size. */
  readonly points: number | null;
  /** The state at which κ was lowest in a search; null before any. */
  readonly witness: ComplexMatrix | null;
}

/** A slice with its grid, or the answer that a plane needs a witness first. */
export type SliceAnswer =
  | { readonly needsWitness: true }
  | { readonly needsWitness: false; readonly slice: StateSlice; readonly grid: ReliefGrid };

/** The slice through the given states; else the Bloch disc, the triangle, or a plane through σ and the witness. */
export function reliefSlice({ source, axes, through, points, witness }: SliceRequest): SliceAnswer {
  const { structure } = markovModel(source);
  requireMetric(structure);
  const states = through.map((state) => ({ name: nameOf(state), rho: readState(structure, state) }));
  const slice = chosenSlice(structure, axes, states, witness);
  if (slice === null) return { needsWitness: true };
  const grid = reliefGrid(slice, points ?? usualPoints(structure.algebra.dimension));
  return { needsWitness: false, slice, grid };
}

function chosenSlice(
  structure: Structure,
  axes: SliceRequest['axes'],
  states: readonly NamedState[],
  witness: ComplexMatrix | null,
): StateSlice | null {
  const { algebra, state } = structure;
  if (axes !== null) return blochDisc(algebra, axes);
  if (states.length === 2) return usualPlane(structure, states);
  if (states.length === 0 && algebra.size === 2 && algebra.blocks.length === 1) return blochDisc(algebra, ['x', 'z']);
  if (states.length === 0 && algebra.size === 3 && state !== null) return eigenvalueTriangle(algebra, state);
  if (algebra.dimension < 3) {
    throw new ThalwegError(
      'not-supported',
      `expected an algebra with a plane of states, got dimension ${algebra.dimension}, whose states are a segment; thalweg witness M ge --at gives κ at a state`,
    );
  }
  if (witness === null) return null;
  return planeWithWitness(structure, states, witness);
}

/** Through the witness where that spans a plane with σ and the state given; without it otherwise. */
function planeWithWitness(structure: Structure, states: readonly NamedState[], witness: ComplexMatrix): StateSlice {
  const named = { name: 'witness', rho: witness };
  try {
    return usualPlane(structure, [...states, named]);
  } catch (error) {
    if (!(error instanceof ThalwegError) || error.code !== 'usage') throw error;
    return usualPlane(structure, states);
  }
}

/** The file's name, as short as it can be. */
function nameOf({ name }: DocumentSource): string {
  return (name.split(/[/\\]/).pop() ?? name).replace(/\.(json|npy|mtx)$/i, '');
}

function usualPoints(dimension: number): number {
  if (dimension <= 9) return 6000;
  return dimension <= 16 ? 3000 : dimension <= 36 ? 1200 : 480;
}

function requireMetric(structure: Structure): void {
  if (hasGradientMetric(structure)) return;
  throw new ThalwegError(
    'not-symmetric',
    'expected a GNS-symmetric generator for κ, got one that is not; thalweg flow follows states of any that has a faithful invariant state',
  );
}

/** Some rings of a relief. */
export interface RingsRequest {
  readonly source: DocumentSource;
  readonly mean: MeanName;
  readonly slice: StateSlice;
  readonly grid: ReliefGrid;
  readonly rings: readonly [number, number];
}

/** κ on some rings, so that threads share a relief. */
export function reliefRings({ source, mean, slice, grid, rings }: RingsRequest): Float64Array {
  return evaluateRings(metricOf(markovModel(source).structure), mean, slice, grid, rings);
}

/** All rings put together into a document, with the lowest point sought from there. */
export function reliefDocument({
  source,
  mean,
  slice,
  grid,
  values,
}: Omit<RingsRequest, 'rings'> & { readonly values: Float64Array }): ReliefDocument {
  const { structure, digest, document } = markovModel(source);
  const { kind, axes, origin, horizontal, vertical, marks } = slice;
  const { rings, rays, x, y, rimX, rimY } = grid;
  return {
    schema: 'thalweg.relief/1',
    model: modelSummary(structure, digest, document.title),
    mean,
    slice: {
      kind,
      axes: [...axes],
      origin: encodeMatrix(origin),
      horizontal: encodeMatrix(horizontal),
      vertical: encodeMatrix(vertical),
      marks: marks.map((mark) => ({ ...mark })),
    },
    grid: {
      rings,
      rays,
      x: [...x],
      y: [...y],
      kappa: Array.from(values, (value) => (Number.isNaN(value) ? null : value)),
      rimX: [...rimX],
      rimY: [...rimY],
    },
    lowest: lowestOf(structure, mean, slice, grid, values),
    reference: referenceOn(structure, slice),
    tool: TOOL,
  };
}

function lowestOf(
  structure: Structure,
  mean: MeanName,
  slice: StateSlice,
  grid: ReliefGrid,
  values: Float64Array,
): ReliefDocument['lowest'] {
  const model = metricOf(structure);
  const found = lowestPoint(model, mean, slice, grid, values);
  if (found === null) return null;
  const { x, y, atRim } = found;
  const covariant = isUnitarilyCovariant(structure.generator);
  const { value, error, state } = gradientEstimateAt({ model, mean, covariant }, stateOn(slice, x, y));
  return { x, y, kappa: value, margin: error, atRim, state: encodeMatrix(state) };
}

/** ‖σ − ρ(x,y)‖₂ within which σ is in the slice. */
const ON_SLICE = 1e-9;

function referenceOn({ state }: Structure, slice: StateSlice): ReliefDocument['reference'] {
  if (state === null) return null;
  const { x, y, distance } = placeOn(slice, state.sigma);
  return distance <= ON_SLICE ? { x, y } : null;
}
