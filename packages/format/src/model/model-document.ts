import type { JsonValue } from '../json/json-value.js';
import type { MatrixDocument } from '../matrix/matrix-document.js';

/** A model as its document holds it, schema `thalweg.model/1`. */
export type ModelDocument = Model<MatrixDocument> & { schema: 'thalweg.model/1' };

/** A model over matrices of type M: as written in the document, or decoded. */
export interface Model<M> {
  /** May be left out in a factor of `tensor`. */
  schema?: 'thalweg.model/1';
  title?: string;
  /** Sizes of the full matrix blocks; the forms `length`, `rates`, `schur` and `tensor` determine them and may leave them out. */
  algebra?: number[];
  generator: GeneratorForm<M>;
  /** A state declared to be invariant. */
  state?: M;
  provenance?: Provenance;
}

/** Where a model comes from; for people, never used in a computation. */
export interface Provenance {
  /** `owner/slug@version` of the example that generated it. */
  example?: string;
  parameters?: Record<string, JsonValue>;
  /** A publication, DOI or address. */
  source?: string;
  tool?: { name: string; version: string };
  note?: string;
}

export type GeneratorForm<M> =
  | LindbladForm<M>
  | BalancedForm<M>
  | RatesForm
  | ExpectationForm<M>
  | LengthForm
  | SchurForm
  | DaviesForm<M>
  | SuperoperatorForm<M>
  | SumForm<M>
  | TensorForm<M>;

/** L(A) = i[H,A] + Σ rate (R*AR − ½{R*R,A}); a rate left out is 1. */
export interface LindbladForm<M> {
  form: 'lindblad';
  hamiltonian?: M;
  jumps: { label?: string; rate?: number; matrix: M }[];
}

/** The canonical form under GNS symmetry: σ V σ^{-1} = e^{−frequency} V. */
export interface BalancedForm<M> {
  form: 'balanced';
  state: M;
  terms: { label?: string; matrix: M; frequency: number }[];
}

/** A Markov chain; row x, column y: rate x → y. Diagonal entries are 0 or minus the sum of the others in their row. */
export interface RatesForm {
  form: 'rates';
  rates: number[][];
}

/** rate (E − id) with E the trace-preserving conditional expectation; a rate left out is 1. */
export interface ExpectationForm<M> {
  form: 'expectation';
  onto: { scalars: true } | { diagonal: true } | { blocks: number[] } | { spannedBy: M[] };
  rate?: number;
}

export type GroupDocument = { cyclic: number } | { dihedral: number } | { symmetric: number } | { table: number[][] };

/** λ_g ↦ −ℓ(g) λ_g; elements of `symmetric` in lexicographic one-line order, `cyclic` 0…n−1, `dihedral` rotations then reflections. */
export interface LengthForm {
  form: 'length';
  group: GroupDocument;
  length: number[] | 'word';
}

/** A_ij ↦ −‖a_i − a_j‖² A_ij; one row of coordinates a point. */
export interface SchurForm {
  form: 'schur';
  points: number[][];
}

/** Weak coupling to a bath at inverse temperature beta. */
export interface DaviesForm<M> {
  form: 'davies';
  hamiltonian: M;
  couplings: M[];
  beta: number;
  spectrum: SpectrumDocument;
}

/**
 * The bath spectrum g(w), a rate, w the energy that the system loses; each satisfies g(−w) = e^{−beta w} g(w):
 * flat: strength/(1+e^{−beta w}); ohmic: strength·w e^{−|w|/cutoff}/(1−e^{−beta w}), without cutoff when it is left out;
 * metropolis: strength·min(1, e^{beta w}); table: [w, g(w)] for each Bohr frequency, one of ±w is enough.
 */
export type SpectrumDocument =
  | { kind: 'flat'; strength: number }
  | { kind: 'ohmic'; strength: number; cutoff?: number }
  | { kind: 'metropolis'; strength: number }
  | { kind: 'table'; values: [number, number][] };

/** The N²×N² matrix of L on stacked N×N matrices, of L itself (heisenberg) or of L† (schrodinger). */
export interface SuperoperatorForm<M> {
  form: 'superoperator';
  matrix: M;
  picture: 'heisenberg' | 'schrodinger';
  stacking: 'rows' | 'columns';
}

export interface SumForm<M> {
  form: 'sum';
  terms: { weight: number; generator: GeneratorForm<M> }[];
}

export interface TensorForm<M> {
  form: 'tensor';
  factors: Model<M>[];
}
