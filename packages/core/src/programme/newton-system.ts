import { STEP_REFINEMENTS, STEP_RESIDUAL } from '../tolerances.js';
import { type Cone } from './cone.js';
import { type ConicForm } from './conic-form.js';
import { LinearCone } from './linear-cone.js';
import { MatrixCone } from './matrix-cone.js';
import { dot } from '../linalg/real-vector.js';
import { SchurSystem } from './schur-system.js';

/** A step (dX, dy, dS), and how far it can be followed: 1 at most. */
export interface NewtonStep {
  readonly x: Float64Array;
  readonly y: Float64Array;
  readonly s: Float64Array;
  primalLength: number;
  dualLength: number;
}

/**
 * The point (X, y, S) of an interior-point method and the Newton equations
 *
 *     A(dX) = b − A(X),   Aᵀ dy + dS = C − S − Aᵀ y,   dX + H((X dS + E) S⁻¹) = σμ S⁻¹ − X,
 *
 * with H the Hermitian part and E a second-order term (Helmberg, Rendl, Vanderbei & Wolkowicz, SIAM J. Optim. 6 (1996);
 * Kojima, Shindoh & Hara, ibid. 7 (1997); Monteiro, ibid.). All quantities are those of the scaled form.
 */
export class NewtonSystem {
  readonly form: ConicForm;
  readonly degree: number;
  readonly x: Float64Array;
  readonly y: Float64Array;
  readonly s: Float64Array;
  /** b − A(X) and C − S − Aᵀ y. */
  readonly primalResidual: Float64Array;
  readonly dualResidual: Float64Array;
  readonly system: SchurSystem;
  readonly #cones: Cone[];
  readonly #inverse: Float64Array;
  readonly #curvature: Float64Array;
  readonly #scratch: Float64Array;
  readonly #right: Float64Array;
  readonly #product: Float64Array;
  readonly #correction: Float64Array;

  constructor(form: ConicForm) {
    const flat = (): Float64Array => new Float64Array(form.length);
    const m = form.unknowns.length;
    this.form = form;
    this.#cones = form.cones.map((pattern, k) => new MatrixCone(pattern, form.offsets[k]));
    if (form.linear.size > 0) this.#cones.push(new LinearCone(form.linear, form.linearOffset));
    this.degree = this.#cones.reduce((sum, cone) => sum + cone.degree, 0);
    this.x = flat();
    this.s = flat();
    this.y = new Float64Array(m);
    this.primalResidual = new Float64Array(m);
    this.dualResidual = flat();
    this.system = new SchurSystem(m);
    this.#inverse = flat();
    this.#curvature = flat();
    this.#scratch = flat();
    this.#right = new Float64Array(m);
    this.#product = flat();
    this.#correction = new Float64Array(m);
  }

  newStep(): NewtonStep {
    const flat = (): Float64Array => new Float64Array(this.form.length);
    return { x: flat(), s: flat(), y: new Float64Array(this.y.length), primalLength: 0, dualLength: 0 };
  }

  /** X = ξ_k 1, y = 0, S = η_k 1, sized after Toh, Todd & Tütüncü (Optim. Methods Softw. 11 (1999)). */
  start(): void {
    const largest = this.form.objective.reduce((top, b) => Math.max(top, Math.abs(b)), 0);
    this.y.fill(0);
    for (const cone of this.#cones) {
      const n = cone.degree;
      cone.setIdentity(this.x, Math.max(10, Math.sqrt(n), n * (1 + largest)));
      cone.setIdentity(this.s, Math.max(10, Math.sqrt(n)));
    }
  }

  /** Whether the flat v is positive definite. */
  isPositive(v: Float64Array): boolean {
    return this.#cones.every((cone) => cone.isPositive(v));
  }

  /** out += factor · A(v). */
  addValues(v: Float64Array, factor: number, out: Float64Array): void {
    for (const cone of this.#cones) cone.addValues(v, factor, out);
  }

  /** out += factor · Aᵀ y. */
  addAdjoint(y: Float64Array, factor: number, out: Float64Array): void {
    for (const cone of this.#cones) cone.addAdjoint(y, factor, out);
  }

  updateResiduals(): void {
    this.primalResidual.set(this.form.objective);
    this.addValues(this.x, -1, this.primalResidual);
    this.dualSlack(this.dualResidual);
    for (let i = 0; i < this.s.length; i++) this.dualResidual[i] -= this.s[i];
  }

  /** out ← C − Aᵀ y. */
  dualSlack(out: Float64Array): void {
    out.set(this.form.constant);
    this.addAdjoint(this.y, -1, out);
  }

  /** Factorises X, S and the Schur complement at the present point; false if that fails. */
  prepare(): boolean {
    if (!this.#cones.every((cone) => cone.factorPrimal(this.x) && cone.factorDual(this.s, this.#inverse))) return false;
    const { matrix, rounding } = this.system;
    matrix.fill(0);
    rounding.fill(0);
    for (const cone of this.#cones) {
      cone.addSchur(this.x, this.#inverse, matrix, this.y.length);
      cone.addRounding(this.x, this.#inverse, rounding);
    }
    return this.system.factorise();
  }

  /** Solves the Newton equations with σμ = `target` and E = dX dS of `previous` (0 if null). */
  solve(target: number, previous: NewtonStep | null, step: NewtonStep): void {
    const { form, x } = this;
    const curvature = this.#curvature;
    const e = previous && previous.x;
    const f = previous && previous.s;
    for (const cone of this.#cones) cone.scaledProduct(x, this.dualResidual, e, f, this.#inverse, curvature);
    for (let i = 0; i < curvature.length; i++) curvature[i] -= target * this.#inverse[i];
    this.#right.set(form.objective);
    this.addValues(curvature, 1, this.#right);
    this.system.solve(this.#right, step.y);
    step.s.set(this.dualResidual);
    for (let i = 0; i < curvature.length; i++) step.x[i] = -curvature[i] - x[i];
    this.#follow(step.y, step);
    this.#refine(step);
    step.primalLength = 1;
    step.dualLength = 1;
  }

  /** Adds the part of a step that belongs to dy: −Aᵀ dy to dS, and H(X Aᵀ(dy) S⁻¹) to dX. */
  #follow(dy: Float64Array, step: NewtonStep): void {
    const image = this.#scratch.fill(0);
    this.addAdjoint(dy, 1, image);
    const product = this.#product;
    for (const cone of this.#cones) cone.scaledProduct(this.x, image, null, null, this.#inverse, product);
    for (let i = 0; i < image.length; i++) {
      step.s[i] -= image[i];
      step.x[i] += product[i];
    }
  }

  /**
   * Iterative refinement of A(dX) = b − A(X) on the dX that was computed: where S is nearly singular, rounding in the
   * products that make dX is far larger than in the Schur complement's solution.
   */
  #refine(step: NewtonStep): void {
    const r = this.#right;
    const correction = this.#correction;
    let last = Infinity;
    for (let k = 0; k < STEP_REFINEMENTS; k++) {
      r.set(this.primalResidual);
      this.addValues(step.x, -1, r);
      const size = Math.sqrt(dot(r, r));
      if (!(size > STEP_RESIDUAL) || size > 0.5 * last) return;
      last = size;
      this.system.solve(r, correction);
      for (let i = 0; i < r.length; i++) step.y[i] += correction[i];
      this.#follow(correction, step);
    }
  }

  /** Sets the lengths of a step to the fraction `damping` of the way to the boundary, at most 1. */
  measureStep(step: NewtonStep, damping: number): void {
    const length = (bound: number): number => (bound < -damping ? damping / -bound : 1);
    step.primalLength = Math.min(1, ...this.#cones.map((cone) => length(cone.primalBound(step.x))));
    step.dualLength = Math.min(1, ...this.#cones.map((cone) => length(cone.dualBound(step.s))));
  }
}
