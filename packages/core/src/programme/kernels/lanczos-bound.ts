import { tridiagonalQL } from '../../linalg/tridiagonal-ql.js';
import { seededRandom } from '../../random.js';
import { LANCZOS_ACCURACY, LANCZOS_FEWEST, LANCZOS_STEPS } from '../../tolerances.js';
import { solveLower, solveLowerAdjoint } from './triangular-solve.js';

/**
 * Bounds the smallest eigenvalue of L⁻¹ D L⁻* from below by Lanczos iteration with full reorthogonalisation: Ritz value
 * minus residual (Toh, SIAM J. Optim. 13 (2002)). Starts from a fixed vector, so that results are reproducible.
 */
export class LanczosBound {
  readonly #n: number;
  readonly #complex: boolean;
  readonly #length: number;
  readonly #steps: number;
  readonly #start: Float64Array;
  readonly #basis: Float64Array[];
  readonly #image: Float64Array;
  readonly #copy: Float64Array;
  readonly #alpha: Float64Array;
  readonly #beta: Float64Array;
  readonly #d: Float64Array;
  readonly #e: Float64Array;
  readonly #last: Float64Array;
  readonly #c: Float64Array;
  readonly #s: Float64Array;

  constructor(n: number, complex: boolean) {
    const steps = Math.min(n, LANCZOS_STEPS);
    this.#n = n;
    this.#complex = complex;
    this.#length = complex ? 2 * n : n;
    this.#steps = steps;
    const random = seededRandom(n);
    this.#start = Float64Array.from({ length: this.#length }, () => random.normal());
    this.#basis = Array.from({ length: steps }, () => new Float64Array(this.#length));
    this.#image = new Float64Array(this.#length);
    this.#copy = new Float64Array(this.#length);
    const vector = (): Float64Array => new Float64Array(steps);
    this.#alpha = vector();
    this.#beta = vector();
    this.#d = vector();
    this.#e = vector();
    this.#last = vector();
    this.#c = vector();
    this.#s = vector();
  }

  /** `factor` in the storage of `choleskyFactor`; `d` Hermitian n × n in the same storage. */
  smallest(factor: Float64Array, d: Float64Array): number {
    const { length: size } = this.#start;
    let norm = Math.sqrt(dot(this.#start, this.#start, size));
    this.#image.set(this.#start);
    let bound = -Infinity;
    for (let k = 0; k < this.#steps; k++) {
      const v = this.#basis[k];
      for (let i = 0; i < size; i++) v[i] = this.#image[i] / norm;
      this.#apply(factor, d, v);
      this.#alpha[k] = dot(v, this.#image, size);
      this.#orthogonalise(k);
      norm = Math.sqrt(dot(this.#image, this.#image, size));
      this.#beta[k] = norm;
      const final = k === this.#steps - 1;
      if (!final && (k < LANCZOS_FEWEST || k % 4 > 0) && norm > 0) continue;
      const { ritz, residual } = this.#ritz(k + 1);
      // With all n steps done the Ritz value is exact, whatever rounding left in the remainder.
      bound = final && this.#steps === this.#n ? ritz : ritz - residual;
      if (residual <= LANCZOS_ACCURACY * Math.max(Math.abs(ritz), 1) || !(norm > 0)) return bound;
    }
    return bound;
  }

  /** image ← L⁻¹ D L⁻* v. */
  #apply(factor: Float64Array, d: Float64Array, v: Float64Array): void {
    const n = this.#n;
    const x = this.#copy;
    const y = this.#image;
    x.set(v);
    solveLowerAdjoint(factor, n, this.#complex, x);
    for (let i = 0; i < n; i++) {
      const row = i * n;
      let re = 0;
      let im = 0;
      if (this.#complex) {
        for (let k = 0, p = row, q = n * n + row; k < n; k++, p++, q++) {
          re += d[p] * x[k] - d[q] * x[n + k];
          im += d[p] * x[n + k] + d[q] * x[k];
        }
        y[n + i] = im;
      } else {
        for (let k = 0; k < n; k++) re += d[row + k] * x[k];
      }
      y[i] = re;
    }
    solveLower(factor, n, this.#complex, y);
  }

  /** Removes from the image its components along the basis vectors 0 … k, twice. */
  #orthogonalise(k: number): void {
    const n = this.#n;
    const w = this.#image;
    for (let pass = 0; pass < 2; pass++) {
      for (let j = 0; j <= k; j++) {
        const v = this.#basis[j];
        const re = dot(v, w, this.#length);
        for (let i = 0; i < this.#length; i++) w[i] -= re * v[i];
        if (!this.#complex) continue;
        let im = 0;
        for (let i = 0; i < n; i++) im += v[i] * w[n + i] - v[n + i] * w[i];
        for (let i = 0; i < n; i++) {
          w[i] += im * v[n + i];
          w[n + i] -= im * v[i];
        }
      }
    }
  }

  /** Smallest Ritz value of the first k steps and the norm of its residual. */
  #ritz(k: number): { ritz: number; residual: number } {
    const d = this.#d;
    const last = this.#last.subarray(0, k);
    d.set(this.#alpha);
    this.#e.set(this.#beta);
    last.fill(0);
    last[k - 1] = 1;
    tridiagonalQL(d, this.#e, k, [last], this.#c, this.#s);
    let best = 0;
    for (let i = 1; i < k; i++) if (d[i] < d[best]) best = i;
    return { ritz: d[best], residual: this.#beta[k - 1] * Math.abs(last[best]) };
  }
}

function dot(x: Float64Array, y: Float64Array, n: number): number {
  let sum = 0;
  for (let i = 0; i < n; i++) sum += x[i] * y[i];
  return sum;
}
