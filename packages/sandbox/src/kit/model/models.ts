import type { Group } from '../discrete/groups.js';
import type { Rates } from '../discrete/graphs.js';
import { matrix, type MatrixLike } from '../matrix/matrix.js';
import { requireList } from '../require.js';

/** What every model may say beside its generator; blocks are taken from the matrices where `algebra` is left out. */
export interface ModelFields {
  readonly title?: string;
  /** Sizes of the full matrix blocks, [n] for n × n matrices. */
  readonly algebra?: readonly number[];
  /** A state declared to be invariant. */
  readonly state?: MatrixLike;
}

/** A `thalweg.model/1` document. */
export interface Model {
  readonly schema: 'thalweg.model/1';
  readonly title?: string;
  readonly algebra?: readonly number[];
  readonly generator: object;
  readonly state?: object;
}

interface Jump {
  readonly label?: string;
  readonly rate?: number;
  readonly matrix: MatrixLike;
}

/** L(A) = i[H,A] + Σ rate (R*AR − ½{R*R,A}); a jump is a matrix or {label, rate, matrix}. */
export function lindbladModel(
  options: ModelFields & { readonly hamiltonian?: MatrixLike; readonly jumps: readonly (Jump | MatrixLike)[] },
): Model {
  const { hamiltonian } = options;
  requireList(options.jumps, 'the jumps');
  const jumps = options.jumps.map((jump) => {
    if (!isJump(jump)) return { matrix: matrix(jump) };
    return { ...named(jump), ...given('rate', jump.rate), matrix: matrix(jump.matrix) };
  });
  const h = hamiltonian === undefined ? undefined : matrix(hamiltonian);
  return model(options, [h, jumps[0]?.matrix], { form: 'lindblad', ...given('hamiltonian', h), jumps });
}

/** The canonical form under GNS symmetry: terms {label, matrix, frequency} with σ V σ^{-1} = e^{−frequency} V for the state σ. */
export function balancedModel(
  options: ModelFields & {
    readonly state: MatrixLike;
    readonly terms: readonly { readonly label?: string; readonly matrix: MatrixLike; readonly frequency: number }[];
  },
): Model {
  requireList(options.terms, 'the terms');
  const state = matrix(options.state);
  const terms = options.terms.map((term) => ({
    ...named(term),
    matrix: matrix(term.matrix),
    frequency: term.frequency,
  }));
  return model({ ...options, state: undefined }, [state], { form: 'balanced', state, terms });
}

/** A Markov chain; row x, column y: rate x → y. */
export function ratesModel(rates: Rates, options: ModelFields = {}): Model {
  return model(options, null, { form: 'rates', rates });
}

/** rate (E − id), E the trace-preserving conditional expectation onto 'scalars', 'diagonal', {blocks} or {spannedBy}. */
export function expectationModel(
  options: ModelFields & {
    readonly algebra: readonly number[];
    readonly onto:
      'scalars' | 'diagonal' | { readonly blocks: readonly number[] } | { readonly spannedBy: readonly MatrixLike[] };
    readonly rate?: number;
  },
): Model {
  const { onto, rate } = options;
  const target =
    typeof onto === 'string'
      ? { [onto]: true }
      : 'spannedBy' in onto
        ? { spannedBy: onto.spannedBy.map(matrix) }
        : onto;
  return model(options, null, { form: 'expectation', onto: target, ...given('rate', rate) });
}

/** λ_g ↦ −ℓ(g) λ_g for a group of the kit or one as a document names it, and its length: a value for each element, or 'word'. */
export function lengthModel(
  group: Group | Group['form'] | { readonly table: readonly (readonly number[])[] },
  length: readonly number[] | 'word',
  options: ModelFields = {},
): Model {
  return model(options, null, { form: 'length', group: 'form' in group ? group.form : group, length });
}

/** A_ij ↦ −‖a_i − a_j‖² A_ij; one row of coordinates a point. */
export function schurModel(points: readonly (readonly number[])[], options: ModelFields = {}): Model {
  return model(options, null, { form: 'schur', points });
}

/** Weak coupling of H to a bath at inverse temperature beta with a spectrum {kind: 'flat' | 'ohmic' | 'metropolis' | 'table', …}. */
export function daviesModel(
  options: ModelFields & {
    readonly hamiltonian: MatrixLike;
    readonly couplings: readonly MatrixLike[];
    readonly beta: number;
    readonly spectrum: object;
  },
): Model {
  const { beta, spectrum } = options;
  requireList(options.couplings, 'the couplings');
  const hamiltonian = matrix(options.hamiltonian);
  const couplings = options.couplings.map(matrix);
  return model(options, [hamiltonian], { form: 'davies', hamiltonian, couplings, beta, spectrum });
}

/** The N² × N² matrix of L on stacked N × N matrices. */
export function superoperatorModel(
  options: ModelFields & {
    readonly algebra: readonly number[];
    readonly matrix: MatrixLike;
    readonly picture?: 'heisenberg' | 'schrodinger';
    readonly stacking?: 'rows' | 'columns';
  },
): Model {
  const { picture = 'heisenberg', stacking = 'rows' } = options;
  return model(options, null, { form: 'superoperator', matrix: matrix(options.matrix), picture, stacking });
}

/** Σ weight · L for terms {weight, model}; a weight left out is 1. The algebra is that of the first model which names one. */
export function sumModel(
  options: ModelFields & { readonly terms: readonly { readonly weight?: number; readonly model: Model }[] },
): Model {
  requireList(options.terms, 'the terms');
  const algebra = options.algebra ?? options.terms.find((term) => term.model.algebra !== undefined)?.model.algebra;
  const terms = options.terms.map(({ weight = 1, model: term }) => ({ weight, generator: term.generator }));
  return model({ ...options, ...given('algebra', algebra) }, null, { form: 'sum', terms });
}

/** L ⊗ id + id ⊗ L' + … of these models. */
export function tensorModel(factors: readonly Model[], options: ModelFields = {}): Model {
  requireList(factors, 'the factors');
  return model(options, null, { form: 'tensor', factors });
}

function model(
  { title, algebra, state }: ModelFields & { state?: MatrixLike | undefined },
  square: readonly ({ readonly shape: readonly [number, number] } | undefined)[] | null,
  generator: object,
): Model {
  const size = square?.find((a) => a !== undefined)?.shape[0];
  const blocks = algebra ?? (size === undefined ? undefined : [size]);
  return {
    schema: 'thalweg.model/1',
    ...given('title', title),
    ...given('algebra', blocks),
    generator,
    ...(state !== undefined && { state: matrix(state) }),
  };
}

function isJump(jump: Jump | MatrixLike): jump is Jump {
  return typeof jump === 'object' && jump !== null && 'matrix' in jump;
}

function named({ label }: { readonly label?: string }): { label?: string } {
  return label === undefined ? {} : { label };
}

function given<K extends string, V>(name: K, value: V | undefined): Partial<Record<K, V>> {
  return value === undefined ? {} : ({ [name]: value } as Partial<Record<K, V>>);
}
