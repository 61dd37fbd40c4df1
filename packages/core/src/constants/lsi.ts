import { entropyForms, pullBackToLogarithm } from '../entropy/entropy-gradient.js';
import { entropyModel } from '../entropy/entropy-model.js';
import { type LogState, logStateOf } from '../entropy/log-state.js';
import { meanOfLogs } from '../entropy/log-terms.js';
import { relativeEntropyOfStates } from '../entropy/relative-entropy.js';
import { ThalwegError } from '../errors.js';
import { applyGenerator, applyGeneratorAdjoint } from '../generator/apply-generator.js';
import {
  type ComplexMatrix,
  addScaledInto,
  frobeniusNorm,
  innerProduct,
  multiply,
  multiplyAdjointFirst,
  multiplyAdjointSecond,
  scale,
  zeros,
} from '../linalg/complex-matrix.js';
import { matrixFunction } from '../linalg/matrix-function.js';
import { fromFrame } from '../metric/state-frame.js';
import type { BfgsOptions } from '../search/bfgs.js';
import type { Structure } from '../structure/structure.js';
import { EPSILON, QUOTIENT_ROUNDING } from '../tolerances.js';
import {
  type EntropyQuotientProblem,
  type EntropyResult,
  type EntropyStart,
  runEntropyStart,
} from './entropy-search.js';
import { type EntropySearchOptions, entropyStarts } from './entropy-starts.js';
import { type EntropyQuotient, requireResolved } from './mlsi-quotient.js';
import { everythingFixed, stateOf } from './mlsi.js';

/**
 * Independent starts of the search for `lsi`, the largest α with 2 E₂(X) ≥ α D(ρ‖σ), X = σ^{-1/4} ρ^{1/2} σ^{-1/4},
 * E₂(X) = −Tr σ^{1/2} X σ^{1/2} L(X) (Olkiewicz & Zegarlinski 1999, normalised so that lsi ≤ gap). Throws
 * `not-supported` unless the generator is primitive with a faithful state: otherwise the constant is zero.
 */
export function lsiTasks(structure: Structure, options: EntropySearchOptions): EntropyStart[] {
  requirePrimitive(structure);
  if (everythingFixed(structure)) return [];
  return entropyStarts(structure, entropyModel(structure), stateOf(structure), 'lsi', options);
}

/** Run one start of `lsiTasks`; null when its state is too near σ. */
export function runLsiStart(
  structure: Structure,
  start: EntropyStart,
  options: BfgsOptions = {},
): EntropyResult | null {
  return runEntropyStart(lsiProblem(structure), start, options);
}

/**
 * 2 E₂/D at a faithful density matrix, an upper bound on `lsi`. Throws `not-supported` as `lsiTasks`,
 * `state-not-positive` when ρ is not faithful, `usage` when ρ is too near σ.
 */
export function lsiAt(structure: Structure, rho: ComplexMatrix): EntropyQuotient {
  requirePrimitive(structure);
  const model = entropyModel(structure);
  const state = logStateOf(model.algebra, rho);
  const entropy = relativeEntropyOfStates(state, model.reference(state));
  requireResolved(entropy, model.entropyFloor);
  const picture = rootPicture(structure);
  const { energy, image } = energyAt(picture, state);
  const value = (2 * energy) / entropy;
  const smallestEigenvalue = Math.min(...state.lambda);
  // d√ρ has norm at most ‖dρ‖/(2√λ_min).
  const derivative =
    (2 * frobeniusNorm(image)) / Math.sqrt(smallestEigenvalue) / entropy +
    (value / entropy) * frobeniusNorm(entropyForms(model, state).difference);
  const margin =
    QUOTIENT_ROUNDING * state.logs.length * EPSILON * (derivative + value + picture.norm / Math.sqrt(entropy));
  return { value, margin, entropy, smallestEigenvalue };
}

/** The quotient with its derivative in log ρ. */
export function lsiProblem(structure: Structure): EntropyQuotientProblem {
  const model = entropyModel(structure);
  const picture = rootPicture(structure);
  return {
    model,
    evaluate(state: LogState): { value: number; gradient: ComplexMatrix } | null {
      const forms = entropyForms(model, state);
      if (!(forms.entropy >= model.entropyFloor)) return null;
      const { energy, image } = energyAt(picture, state);
      const value = (2 * energy) / forms.entropy;
      const gradient = pullBackToLogarithm(state, forms, 0, -value / forms.entropy);
      addScaledInto(gradient, energyGradient(state, energy, image), 2 / forms.entropy);
      return { value, gradient };
    },
    at: (rho) => lsiAt(structure, rho),
  };
}

/** The generator seen on Y = ρ^{1/2}: K(Y) = σ^{1/4} L(σ^{-1/4} Y σ^{-1/4}) σ^{1/4}, its self-adjoint part. */
interface RootPicture {
  /** σ^{1/2}, which K annihilates. */
  readonly root: ComplexMatrix;
  readonly apply: (y: ComplexMatrix) => ComplexMatrix;
  /** ‖K‖ from above, up to the size of the algebra: the norm of K on a fixed element per unit norm. */
  readonly norm: number;
}

const pictures = new WeakMap<Structure, RootPicture>();

function rootPicture(structure: Structure): RootPicture {
  const known = pictures.get(structure);
  if (known) return known;
  const { generator } = structure;
  const state = stateOf(structure);
  const quarter = matrixFunction(state, (x) => x ** 0.25);
  const inverse = matrixFunction(state, (x) => x ** -0.25);
  const sandwich = (w: ComplexMatrix, a: ComplexMatrix): ComplexMatrix => multiply(w, multiply(a, w));
  const apply = (y: ComplexMatrix): ComplexMatrix => {
    const out = sandwich(quarter, applyGenerator(generator, sandwich(inverse, y)));
    addScaledInto(out, sandwich(inverse, applyGeneratorAdjoint(generator, sandwich(quarter, y))), 1);
    return scale(out, 0.5);
  };
  let norm = 0;
  for (let i = 0; i < structure.algebra.size; i++) {
    const e = zeros(structure.algebra.size);
    e.re[i * structure.algebra.size + i] = 1;
    norm = Math.max(norm, frobeniusNorm(apply(e)));
  }
  const picture = { root: matrixFunction(state, Math.sqrt), apply, norm };
  pictures.set(structure, picture);
  return picture;
}

/** E₂ = −Tr Z K(Z) with Z = ρ^{1/2} − σ^{1/2}, which does not cancel near σ, and K(ρ^{1/2}) = K(Z). */
function energyAt({ root, apply }: RootPicture, state: LogState): { energy: number; image: ComplexMatrix } {
  const z = addScaledInto(fromFrame({ lambda: state.logs.map((p) => Math.exp(p / 2)), u: state.u }), root, -1);
  const image = apply(z);
  return { energy: -innerProduct(z, image).re, image };
}

/** Derivative of E₂ in H: −Λ(√λ_a,√λ_b) K(Y)_ab − E₂ρ, in the original basis. */
function energyGradient(state: LogState, energy: number, image: ComplexMatrix): ComplexMatrix {
  const n = state.logs.length;
  const frame = multiplyAdjointFirst(state.u, multiply(image, state.u));
  const { blockOf } = state.algebra;
  for (let a = 0; a < n; a++) {
    for (let b = 0; b < n; b++) {
      const mean = blockOf[a] === blockOf[b] ? meanOfLogs(state.logs[a] / 2, state.logs[b] / 2) : 0;
      frame.re[a * n + b] *= -mean;
      frame.im[a * n + b] *= -mean;
    }
    frame.re[a * n + a] -= energy * state.lambda[a];
  }
  return multiply(state.u, multiplyAdjointSecond(frame, state.u));
}

function requirePrimitive({ fixedPoints }: Structure): void {
  if (fixedPoints?.primitive) return;
  throw new ThalwegError(
    'not-supported',
    'expected a primitive generator for a logarithmic Sobolev constant, got one with several fixed points; use mlsi or clsi',
  );
}
