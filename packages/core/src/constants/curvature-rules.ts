import { applyGenerator, generatorMatrix } from '../generator/apply-generator.js';
import type { Generator } from '../generator/generator.js';
import {
  type ComplexMatrix,
  addScaledInto,
  anticommutator,
  commutator,
  frobeniusNorm,
  innerProduct,
  multiply,
  multiplyAdjointFirst,
  scale,
  trace,
  zeros,
} from '../linalg/complex-matrix.js';
import { basisElement, fromCoordinates } from '../algebra/block-algebra.js';
import type { End } from '../sheet/bracket.js';
import type { CanonicalForm } from '../structure/canonical-form.js';
import { type Structure, analyse } from '../structure/structure.js';
import { DENSE_LIMIT, EPSILON, RULE_TOLERANCE } from '../tolerances.js';

/**
 * A lower end of `cge` from a theorem about the form of the generator, or null when none applies; the best that applies. Above
 * DENSE_LIMIT only tensor products are looked at: the other hypotheses are about all observables.
 */
export function completeCurvatureRule(structure: Structure): End | null {
  const known = rules.get(structure);
  if (known !== undefined) return known;
  const direct = [expectationRule, intertwiningRule, reflectionRule];
  const usable = structure.algebra.dimension <= DENSE_LIMIT ? [...direct, tensorRule] : [tensorRule];
  const end = best(usable.map((rule) => rule(structure)));
  rules.set(structure, end);
  return end;
}

const rules = new WeakMap<Structure, End | null>();

/** A lower end of `ge` that is not one of `cge`: r(½ + 1/N) for r(E−id) with E onto the scalars, tracial. */
export function curvatureRule(structure: Structure): End | null {
  if (structure.algebra.dimension > DENSE_LIMIT) return null;
  const rate = expectationRate(structure);
  if (rate === null || !structure.fixedPoints?.primitive) return null;
  const n = structure.algebra.size;
  return {
    value: rate.value * (0.5 + 1 / n),
    grade: 'certified',
    by: `identity minus expectation onto scalars: ½ + 1/${n} times the rate`,
    margin: rate.margin,
  };
}

/** The end with the largest value. */
function best(ends: readonly (End | null)[]): End | null {
  let found: End | null = null;
  for (const end of ends) if (end && (!found || end.value > found.value)) found = end;
  return found;
}

/**
 * r/2 for r(E−id), E the trace-preserving conditional expectation onto the fixed points: q_ρ = ½‖A‖²_ρ + ½D[ρ;Eρ] and
 * ρ ↦ ‖A‖²_ρ is concave and homogeneous, so the second term is not negative; the same holds with an ancilla.
 */
function expectationRule(structure: Structure): End | null {
  const rate = expectationRate(structure);
  if (rate === null) return null;
  return {
    value: rate.value / 2,
    grade: 'certified',
    by: 'identity minus a conditional expectation: ½ the rate',
    margin: rate.margin,
  };
}

/** r with L = r(E−id) up to rounding, tracial symmetry; null when L has another form. */
function expectationRate(structure: Structure): { value: number; margin: number } | null {
  const { generator, fixedPoints, algebra, symmetry } = structure;
  if (!fixedPoints || symmetry.kind !== 'tracial' || fixedPoints.dimension === algebra.dimension) return null;
  const l = generatorMatrix(generator);
  const d = algebra.dimension;
  let traceL = 0;
  for (let k = 0; k < d; k++) traceL -= l[k * d + k];
  const rate = traceL / (d - fixedPoints.dimension);
  let worst = 0;
  for (let k = 0; k < d; k++) {
    for (let j = 0; j < d; j++) {
      const expected = rate * (fixedPoints.expectation[k * d + j] - (k === j ? 1 : 0));
      worst = Math.max(worst, Math.abs(l[k * d + j] - expected));
    }
  }
  return worst <= RULE_TOLERANCE * rate ? { value: rate, margin: worst + d * EPSILON * rate } : null;
}

/** The least of the factors' ends for L₁⊗id + id⊗L₂ (complete gradient estimates are stable under tensor products). */
function tensorRule(structure: Structure): End | null {
  const { origin } = structure.generator;
  if (origin.kind !== 'tensor') return null;
  const ends = origin.factors.map((factor) => completeCurvatureRule(analyse(factor)));
  let least: End | null = null;
  for (const end of ends) {
    if (!end) return null;
    if (!least || end.value < least.value) least = end;
  }
  return least && { ...least, by: `tensor product, least factor: ${least.by}` };
}

/**
 * min_j a_j when ∂_jL − L∂_j = −a_j∂_j for every jump of the canonical form, L on the right extended to all N×N matrices
 * by the same jumps: then ∂_jP_t = e^{−a_jt}P_t∂_j (Carlen & Maas 2017, §10).
 */
function intertwiningRule({ canonical, generator }: Structure): End | null {
  if (!canonical || canonical.jumps.length === 0) return null;
  if (!intertwinesOnOne(generator, canonical)) return null;
  const basis = Array.from({ length: generator.algebra.dimension }, (_, k) => basisElement(generator.algebra, k));
  const images = basis.map((b) => applyGenerator(generator, b));
  const norm = Math.max(...images.map(frobeniusNorm));
  let least = Infinity;
  let residual = 0;
  for (const { matrix } of canonical.jumps) {
    const derivatives = basis.map((b) => commutator(matrix, b));
    const defects = basis.map((_, k) => {
      const defect = commutator(matrix, images[k]);
      return addScaledInto(defect, extendedGenerator(canonical, derivatives[k]), -1);
    });
    const { factor, worst } = proportionality(derivatives, defects);
    if (worst > RULE_TOLERANCE * norm) return null;
    least = Math.min(least, -factor);
    residual = Math.max(residual, worst);
  }
  return {
    value: least,
    grade: 'certified',
    by: 'intertwining: ∂L = L∂ − a∂, least a',
    margin: residual + 64 * EPSILON * norm,
  };
}

/**
 * 4 min_k c_k when every V_k is self-adjoint, V_k² = c_k·1, and any two commute or anticommute (Pauli strings, Clifford
 * generators, mixed-commutation spins). Lift: (L̂ξ)_k = Σ_m 2(b_mk V_mξ_kV_m − c_mξ_k) − 4c_kξ_k·(m=k), with b_mk = ±1 the
 * commutation sign for m ≠ k and −1 for m = k. Completing squares in §6's forms leaves 2(4c_k − K)ξ_kξ_k*.
 */
function reflectionRule({ canonical, symmetry }: Structure): End | null {
  if (!canonical || symmetry.kind !== 'tracial' || canonical.jumps.length === 0) return null;
  const squares: number[] = [];
  let residual = 0;
  for (const [j, { matrix, partner }] of canonical.jumps.entries()) {
    if (partner !== j) return null;
    const square = multiply(matrix, matrix);
    const c = trace(square).re / matrix.rows;
    for (let i = 0; i < matrix.rows; i++) square.re[i * matrix.rows + i] -= c;
    residual = Math.max(residual, frobeniusNorm(square) / c);
    squares.push(c);
  }
  canonical.jumps.forEach(({ matrix: v }, j) => {
    canonical.jumps.slice(0, j).forEach(({ matrix: w }, k) => {
      const size = Math.sqrt(squares[j] * squares[k]);
      residual = Math.max(
        residual,
        Math.min(frobeniusNorm(commutator(v, w)), frobeniusNorm(anticommutator(v, w))) / size,
      );
    });
  });
  if (residual > RULE_TOLERANCE) return null;
  const least = Math.min(...squares);
  return {
    value: 4 * least,
    grade: 'certified',
    by: 'commuting or anticommuting reflections: 4 min c, V² = c',
    margin: 4 * least * (residual + 64 * EPSILON),
  };
}

/** The hypothesis on one observable without symmetry: cheap, and it fails for almost every generator to which the rule does not apply. */
function intertwinesOnOne(generator: Generator, canonical: CanonicalForm): boolean {
  const { algebra } = generator;
  const a = fromCoordinates(
    algebra,
    Float64Array.from({ length: algebra.dimension }, (_, k) => Math.sin(k + 1)),
  );
  const image = applyGenerator(generator, a);
  return canonical.jumps.every(({ matrix }) => {
    const derivative = commutator(matrix, a);
    const defect = addScaledInto(commutator(matrix, image), extendedGenerator(canonical, derivative), -1);
    return proportionality([derivative], [defect]).worst <= RULE_TOLERANCE * frobeniusNorm(image);
  });
}

/** Σ_j e^{−ω_j/2}(2V_j*ξV_j − {V_j*V_j,ξ}) on any N×N matrix ξ. */
function extendedGenerator(canonical: CanonicalForm, xi: ComplexMatrix): ComplexMatrix {
  const out = zeros(xi.rows);
  for (const { matrix: v, frequency } of canonical.jumps) {
    const w = Math.exp(-frequency / 2);
    addScaledInto(out, multiplyAdjointFirst(v, multiply(xi, v)), 2 * w);
    addScaledInto(out, anticommutator(multiplyAdjointFirst(v, v), xi), -w);
  }
  return out;
}

/** The factor f that makes y_k ≈ f·x_k for all k at once, and the largest deviation. */
function proportionality(x: readonly ComplexMatrix[], y: readonly ComplexMatrix[]): { factor: number; worst: number } {
  let cross = 0;
  let norm = 0;
  x.forEach((a, k) => {
    cross += innerProduct(a, y[k]).re;
    norm += innerProduct(a, a).re;
  });
  const factor = norm > 0 ? cross / norm : 0;
  let worst = 0;
  x.forEach((a, k) => {
    worst = Math.max(worst, frobeniusNorm(addScaledInto(scale(a, -factor), y[k], 1)));
  });
  return { factor, worst };
}
