import { dot, norm } from '../linalg/real-vector.js';
import { EPSILON, SCHUR_PIVOT, SCHUR_REFINEMENTS, SCHUR_RESIDUAL, SCHUR_SHIFTS } from '../tolerances.js';
import { symmetrise } from './dependent-coefficients.js';
import { choleskyFactor } from './kernels/cholesky-factor.js';
import { solveLower, solveLowerAdjoint } from './kernels/triangular-solve.js';

/**
 * The m × m linear system of the Newton step: Cholesky factor with pivots lost to rounding skipped, used as the
 * preconditioner of conjugate gradients on the system itself.
 */
export class SchurSystem {
  /** Filled by the cones; each pair of entries in either place. */
  readonly matrix: Float64Array;
  /** Filled by the cones: absolute size of rounding on the diagonal, in units of 2⁻⁵². */
  readonly rounding: Float64Array;
  /** Raise of the diagonal in the last factor, in units of its rounding. */
  shift = 0;
  readonly #order: number;
  readonly #factor: Float64Array;
  readonly #floors: Float64Array;
  readonly #diagonal: Float64Array;
  readonly #skipped: Uint8Array;
  readonly #residual: Float64Array;
  readonly #preconditioned: Float64Array;
  readonly #direction: Float64Array;
  readonly #image: Float64Array;
  readonly #candidate: Float64Array;

  constructor(order: number) {
    const vector = (): Float64Array => new Float64Array(order);
    this.#order = order;
    this.matrix = new Float64Array(order * order);
    this.#factor = new Float64Array(order * order);
    this.rounding = vector();
    this.#floors = vector();
    this.#diagonal = vector();
    this.#skipped = new Uint8Array(order);
    this.#residual = vector();
    this.#preconditioned = vector();
    this.#direction = vector();
    this.#image = vector();
    this.#candidate = vector();
  }

  /**
   * False if the matrix is not finite. When pivots are lost to rounding, the diagonal is raised for the factor (not for the
   * system) until none is: a direction in which the matrix is rounding is then damped, whatever its coordinates.
   */
  factorise(): boolean {
    const m = this.#order;
    symmetrise(this.matrix, m);
    for (let i = 0; i < m; i++) {
      this.#diagonal[i] = this.matrix[i * m + i];
      this.#floors[i] = SCHUR_PIVOT * EPSILON * this.rounding[i];
    }
    let failed = -1;
    for (const shift of SCHUR_SHIFTS) {
      for (let i = 0; i < m; i++) this.matrix[i * m + i] = this.#diagonal[i] + shift * EPSILON * this.rounding[i];
      this.#skipped.fill(0);
      failed = choleskyFactor(this.matrix, m, false, this.#factor, { floors: this.#floors, skipped: this.#skipped });
      this.shift = shift;
      if (failed >= 0 || !this.#skipped.includes(1)) break;
    }
    for (let i = 0; i < m; i++) this.matrix[i * m + i] = this.#diagonal[i];
    return failed < 0;
  }

  /** Solves for y; the best of the refined solutions by the norm of the residual. */
  solve(right: Float64Array, y: Float64Array): void {
    const r = this.#residual;
    const z = this.#preconditioned;
    const p = this.#direction;
    const x = this.#candidate;
    const target = SCHUR_RESIDUAL * norm(right);
    x.set(right);
    this.#precondition(x);
    this.#subtractImage(right, x, r);
    let best = norm(r);
    y.set(x);
    let rho = 0;
    for (let k = 0; k < SCHUR_REFINEMENTS && best > target; k++) {
      z.set(r);
      this.#precondition(z);
      const next = dot(r, z);
      const beta = k === 0 ? 0 : next / rho;
      rho = next;
      for (let i = 0; i < p.length; i++) p[i] = z[i] + beta * p[i];
      this.#multiply(p, this.#image);
      const curvature = dot(p, this.#image);
      if (!(curvature > 0) || !(rho > 0)) break;
      const step = rho / curvature;
      for (let i = 0; i < p.length; i++) x[i] += step * p[i];
      this.#subtractImage(right, x, r);
      const size = norm(r);
      if (size < best) {
        best = size;
        y.set(x);
      }
    }
  }

  #precondition(x: Float64Array): void {
    solveLower(this.#factor, this.#order, false, x);
    solveLowerAdjoint(this.#factor, this.#order, false, x);
  }

  #subtractImage(right: Float64Array, x: Float64Array, out: Float64Array): void {
    this.#multiply(x, out);
    for (let i = 0; i < out.length; i++) out[i] = right[i] - out[i];
  }

  #multiply(x: Float64Array, out: Float64Array): void {
    const m = this.#order;
    for (let i = 0; i < m; i++) {
      let sum = 0;
      for (let j = 0, q = i * m; j < m; j++, q++) sum += this.matrix[q] * x[j];
      out[i] = sum;
    }
  }
}
