import { fromCoordinates } from '../algebra/block-algebra.js';
import { applyGenerator, applyGeneratorAdjoint } from '../generator/apply-generator.js';
import type { Generator } from '../generator/generator.js';
import type { UnitForm } from '../generator/unit-form.js';
import { MAX_DENSE_DIMENSION } from '../generator/superoperator-parts.js';
import {
  type ComplexMatrix,
  addScaledInto,
  frobeniusNorm,
  multiply,
  scale,
  subtract,
  zeros,
} from '../linalg/complex-matrix.js';
import { matrixFunction } from '../linalg/matrix-function.js';
import { seededRandom } from '../random.js';
import { INPUT_TOLERANCE, SYMMETRY_TOLERANCE } from '../tolerances.js';
import { generatorInStateBasis } from './generator-in-basis.js';
import type { ReferenceState } from './reference-state.js';
import { stateError } from './state-accuracy.js';

export type SymmetryKind = 'tracial' | 'GNS' | 'KMS' | 'none';

export interface Symmetry {
  /** The strongest symmetry within the tolerance; tracial asks for σ ∝ 1, every one but `none` for a faithful σ. */
  readonly kind: SymmetryKind;
  /** ‖L − L^adjoint‖_F/‖L‖_F in the orthonormalised product of each kind: Tr A*B, Tr σA*B, Tr σ^{1/2}A*σ^{1/2}B. */
  readonly residuals: { readonly tracial: number; readonly gns: number; readonly kms: number };
  /** SYMMETRY_TOLERANCE, plus what the accuracy of an inexact σ with small eigenvalues makes of it. */
  readonly tolerance: number;
  /** True when random observables were used instead of the whole algebra, because it is large. */
  readonly probed: boolean;
}

/** Which symmetry L has for the state σ; for a state that is not faithful the residuals are those of the degenerate products. */
export function symmetryOf(g: Generator, state: ReferenceState): Symmetry {
  const probed = g.algebra.dimension > MAX_DENSE_DIMENSION;
  const residuals = probed ? probedResiduals(g, state) : exactResiduals(generatorInStateBasis(g, state), state);
  const tolerance = symmetryTolerance(state);
  return { kind: kindOf(residuals, state, tolerance), residuals, tolerance, probed };
}

/** Residual up to which a symmetry for this state is accepted. */
export function symmetryTolerance(state: ReferenceState): number {
  return SYMMETRY_TOLERANCE + stateError(state);
}

function kindOf(residuals: Symmetry['residuals'], state: ReferenceState, tolerance: number): SymmetryKind {
  if (!state.faithful) return 'none';
  const mixed = 1 / state.values.length;
  const flat = state.values.every((x) => Math.abs(x - mixed) <= INPUT_TOLERANCE * mixed);
  if (flat && residuals.tracial <= SYMMETRY_TOLERANCE) return 'tracial';
  if (residuals.gns <= tolerance) return 'GNS';
  return residuals.kms <= tolerance ? 'KMS' : 'none';
}

/** In the eigenbasis of σ, <e_kk',X> is σ_k' X_kk' (GNS), √(σ_kσ_k') X_kk' (KMS), X_kk' (trace). */
function exactResiduals(form: UnitForm, state: ReferenceState): Symmetry['residuals'] {
  const { row, col, count } = form.units;
  const { values, faithful } = state;
  const positive = values.map((x) => Math.max(x, 0));
  const residual = (weight: (k: number, k2: number) => number): number => {
    const w = Float64Array.from({ length: count }, (_, p) => weight(row[p], col[p]));
    return weightedResidual(form.matrix, w, faithful);
  };
  return {
    tracial: residual(() => 1),
    gns: residual((_, k2) => positive[k2]),
    kms: residual((k, k2) => Math.sqrt(positive[k] * positive[k2])),
  };
}

/** ‖X−X*‖/‖X‖ for X = W^{1/2} M W^{−1/2}, or for X = WM when some weight is zero. */
function weightedResidual(m: ComplexMatrix, w: Float64Array, invertible: boolean): number {
  const d = m.rows;
  const left = invertible ? w.map(Math.sqrt) : w;
  const right = invertible ? left.map((x) => 1 / x) : w.map(() => 1);
  let difference = 0;
  let total = 0;
  for (let p = 0; p < d; p++) {
    for (let q = 0, at = p * d, mirror = p; q < d; q++, at++, mirror += d) {
      const f = left[p] * right[q];
      const h = left[q] * right[p];
      const re = f * m.re[at];
      const im = f * m.im[at];
      total += re * re + im * im;
      difference += (re - h * m.re[mirror]) ** 2 + (im + h * m.im[mirror]) ** 2;
    }
  }
  return total > 0 ? Math.sqrt(difference / total) : 0;
}

const PROBES = 2;

/** The same ratio on seeded random matrices of the algebra: ‖(X−X†)A‖/‖XA‖, whose squares have the Frobenius norms as means. */
function probedResiduals(g: Generator, state: ReferenceState): Symmetry['residuals'] {
  const power = (p: number): ComplexMatrix => matrixFunction(state, (x) => Math.max(x, 0) ** p);
  const residual = (
    apply: (a: ComplexMatrix) => ComplexMatrix,
    adjoint: (a: ComplexMatrix) => ComplexMatrix,
  ): number => {
    const random = seededRandom('symmetry probes');
    let difference = 0;
    let total = 0;
    for (let k = 0; k < PROBES; k++) {
      const a = randomElement(g, () => random.normal());
      const image = apply(a);
      total += frobeniusNorm(image) ** 2;
      difference += frobeniusNorm(subtract(image, adjoint(a))) ** 2;
    }
    return total > 0 ? Math.sqrt(difference / total) : 0;
  };
  const tracial = residual(
    (a) => applyGenerator(g, a),
    (a) => applyGeneratorAdjoint(g, a),
  );
  if (!state.faithful) return { tracial, gns: 1, kms: 1 };
  const [half, minusHalf, quarter, minusQuarter] = [power(0.5), power(-0.5), power(0.25), power(-0.25)];
  const both = (s: ComplexMatrix, a: ComplexMatrix): ComplexMatrix => multiply(s, multiply(a, s));
  return {
    tracial,
    gns: residual(
      (a) => multiply(applyGenerator(g, multiply(a, minusHalf)), half),
      (a) => multiply(applyGeneratorAdjoint(g, multiply(a, half)), minusHalf),
    ),
    kms: residual(
      (a) => both(quarter, applyGenerator(g, both(minusQuarter, a))),
      (a) => both(minusQuarter, applyGeneratorAdjoint(g, both(quarter, a))),
    ),
  };
}

function randomElement(g: Generator, normal: () => number): ComplexMatrix {
  const draw = (): ComplexMatrix =>
    fromCoordinates(g.algebra, Float64Array.from({ length: g.algebra.dimension }, normal));
  return addScaledInto(addScaledInto(zeros(g.algebra.size), draw(), 1), scale(draw(), 0, 1), 1);
}
