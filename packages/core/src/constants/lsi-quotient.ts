import { basisElement, toCoordinates } from '../algebra/block-algebra.js';
import {
  type DivergenceForms,
  divergenceForms,
  entropyGradient,
  fromStateFrame,
  toFrame,
} from '../entropy/entropy-gradient.js';
import { entropyModel } from '../entropy/entropy-model.js';
import { type LogState, logStateOf } from '../entropy/log-state.js';
import { meanOfLogs } from '../entropy/log-terms.js';
import { matrixAction } from '../entropy/matrix-action.js';
import { ThalwegError } from '../errors.js';
import { applyGenerator } from '../generator/apply-generator.js';
import { requireDenseDimension } from '../generator/superoperator-parts.js';
import {
  type ComplexMatrix,
  addScaledInto,
  frobeniusNorm,
  innerProduct,
  multiply,
  zeros,
} from '../linalg/complex-matrix.js';
import { matrixFunction } from '../linalg/matrix-function.js';
import { fromFrame } from '../metric/state-frame.js';
import type { Structure } from '../structure/structure.js';
import { EPSILON, QUOTIENT_ROUNDING } from '../tolerances.js';
import type { EntropyEvaluation, EntropyQuotientProblem } from './entropy-search.js';
import { type EntropyQuotient, requireResolved } from './mlsi-quotient.js';
import { stateOf } from './mlsi.js';

/**
 * 2 E₂/D at a faithful density matrix, an upper bound on `lsi`. Throws `not-supported` when the generator is not primitive,
 * `state-not-positive` when ρ is not faithful, `usage` when ρ is too near σ.
 */
export function lsiAt(structure: Structure, rho: ComplexMatrix): EntropyQuotient {
  requirePrimitive(structure);
  const model = entropyModel(structure);
  const state = logStateOf(model.algebra, rho);
  const forms = divergenceForms(model, state);
  const { entropy } = forms;
  requireResolved(entropy, model.entropyFloor);
  const picture = rootPicture(structure);
  const { energy, image } = energyAt(picture, state);
  const value = (2 * energy) / entropy;
  const smallestEigenvalue = Math.min(...state.lambda);
  // d√ρ has norm at most ‖dρ‖/(2√λ_min).
  const ofEnergy = (2 * frobeniusNorm(image)) / Math.sqrt(smallestEigenvalue);
  const derivative = (ofEnergy + value * frobeniusNorm(entropyGradient(forms))) / entropy;
  const sums = value + picture.norm / Math.sqrt(entropy);
  const margin = QUOTIENT_ROUNDING * state.logs.length * EPSILON * (derivative + sums);
  return { value, margin, entropy, smallestEigenvalue };
}

/** The quotient with its derivative in log ρ. */
export function lsiProblem(structure: Structure): EntropyQuotientProblem {
  const model = entropyModel(structure);
  const picture = rootPicture(structure);
  return {
    model,
    evaluate(state: LogState): EntropyEvaluation | null {
      const forms = divergenceForms(model, state);
      const { entropy } = forms;
      if (!(entropy >= model.entropyFloor)) return null;
      const { energy, image } = energyAt(picture, state);
      return { value: (2 * energy) / entropy, entropy, gradient: () => quotientGradient(state, forms, energy, image) };
    },
    at: (rho) => lsiAt(structure, rho),
  };
}

/** Throws `not-supported` for a generator with more than one fixed point, whose logarithmic Sobolev constant is zero. */
export function requirePrimitive({ fixedPoints }: Structure): void {
  if (fixedPoints?.primitive) return;
  throw new ThalwegError(
    'not-supported',
    'expected a primitive generator for a logarithmic Sobolev constant, got one with several fixed points; use mlsi or clsi',
  );
}

/** The generator seen on Y = ρ^{1/2}: the self-adjoint part of K(Y) = σ^{1/4} L(σ^{-1/4} Y σ^{-1/4}) σ^{1/4}. */
interface RootPicture {
  /** σ^{1/2}, which K annihilates. */
  readonly root: ComplexMatrix;
  readonly apply: (y: ComplexMatrix) => ComplexMatrix;
  /** Frobenius norm of K. */
  readonly norm: number;
}

const pictures = new WeakMap<Structure, RootPicture>();

function rootPicture(structure: Structure): RootPicture {
  const known = pictures.get(structure);
  if (known) return known;
  const { generator, algebra } = structure;
  requireDenseDimension(algebra, 'a logarithmic Sobolev constant');
  const state = stateOf(structure);
  const quarter = matrixFunction(state, (x) => x ** 0.25);
  const inverse = matrixFunction(state, (x) => x ** -0.25);
  const sandwich = (w: ComplexMatrix, a: ComplexMatrix): ComplexMatrix => multiply(w, multiply(a, w));
  const d = algebra.dimension;
  const k = new Float64Array(d * d);
  for (let l = 0; l < d; l++) {
    const image = sandwich(quarter, applyGenerator(generator, sandwich(inverse, basisElement(algebra, l))));
    toCoordinates(algebra, image).forEach((x, i) => {
      k[i * d + l] += x / 2;
      k[l * d + i] += x / 2;
    });
  }
  const norm = Math.sqrt(k.reduce((sum, x) => sum + x * x, 0));
  const picture = { root: matrixFunction(state, Math.sqrt), apply: matrixAction(algebra, k, false), norm };
  pictures.set(structure, picture);
  return picture;
}

/** E₂ = −Tr Z K(Z) with Z = ρ^{1/2} − σ^{1/2}, which does not cancel near σ, and K(ρ^{1/2}) = K(Z). */
function energyAt({ root, apply }: RootPicture, state: LogState): { energy: number; image: ComplexMatrix } {
  const z = addScaledInto(fromFrame({ lambda: state.logs.map((p) => Math.exp(p / 2)), u: state.u }), root, -1);
  const image = apply(z);
  return { energy: -innerProduct(z, image).re, image };
}

/**
 * Derivative of 2E₂/D in H, ρ = exp(H)/Tr exp(H), in the original basis: that of E₂ is −Λ(√λ_a,√λ_b) K(Y)_ab − E₂ρ in the
 * eigenbasis of ρ, that of D is Λ(λ_a,λ_b)(log ρ − log σ)_ab − Dρ. The multiples of ρ cancel in the quotient.
 */
function quotientGradient(
  state: LogState,
  { entropy, difference, mean }: DivergenceForms,
  energy: number,
  image: ComplexMatrix,
): ComplexMatrix {
  const n = state.logs.length;
  const { re, im } = toFrame(state, image);
  const out = zeros(n);
  const ofEnergy = -2 / entropy;
  const ofEntropy = (-2 * energy) / entropy ** 2;
  for (let a = 0; a < n; a++) {
    for (let b = 0; b < n; b++) {
      if (state.algebra.blockOf[a] !== state.algebra.blockOf[b]) continue;
      const k = a * n + b;
      const root = ofEnergy * meanOfLogs(state.logs[a] / 2, state.logs[b] / 2);
      const weight = ofEntropy * mean[k];
      out.re[k] = root * re[k] + weight * difference.re[k];
      out.im[k] = root * im[k] + weight * difference.im[k];
    }
  }
  return fromStateFrame(state, out);
}
