import { addRowsTimes, combineRows } from './coefficient-rows.js';
import { type Cone } from './cone.js';
import { type ConePattern } from './cone-pattern.js';
import { choleskyFactor } from './kernels/cholesky-factor.js';
import { choleskyInverse } from './kernels/cholesky-inverse.js';
import { LanczosBound } from './kernels/lanczos-bound.js';
import { multiplyAdjoint, squarePanel } from './kernels/multiply-adjoint.js';
import { SchurAssembly } from './schur-assembly.js';

/** Positive semidefinite n × n matrices, real or complex, with the HKM scaling of the Newton equation. */
export class MatrixCone implements Cone {
  readonly degree: number;
  readonly #pattern: ConePattern;
  readonly #offset: number;
  readonly #length: number;
  readonly #primalFactor: Float64Array;
  readonly #dualFactor: Float64Array;
  readonly #work: Float64Array;
  readonly #work2: Float64Array;
  readonly #coordinates: Float64Array;
  readonly #assembly: SchurAssembly;
  readonly #bound: LanczosBound;

  constructor(pattern: ConePattern, offset: number) {
    const { size, complex } = pattern;
    this.degree = size;
    this.#pattern = pattern;
    this.#offset = offset;
    this.#length = size * size * (complex ? 2 : 1);
    this.#primalFactor = new Float64Array(this.#length);
    this.#dualFactor = new Float64Array(this.#length);
    this.#work = new Float64Array(this.#length);
    this.#work2 = new Float64Array(this.#length);
    this.#coordinates = new Float64Array(pattern.rows.width);
    this.#assembly = new SchurAssembly(pattern);
    this.#bound = new LanczosBound(size, complex);
  }

  setIdentity(x: Float64Array, value: number): void {
    const section = this.#section(x).fill(0);
    for (let i = 0; i < this.degree; i++) section[i * this.degree + i] = value;
  }

  addValues(v: Float64Array, factor: number, out: Float64Array): void {
    const { size, row, col, imaginary, rows } = this.#pattern;
    const section = this.#section(v);
    const coordinates = this.#coordinates;
    for (let c = 0; c < coordinates.length; c++) {
      const value = section[imaginary[c] * size * size + row[c] * size + col[c]];
      coordinates[c] = row[c] === col[c] ? value : Math.SQRT2 * value;
    }
    addRowsTimes(rows, coordinates, factor, out);
  }

  addAdjoint(y: Float64Array, factor: number, out: Float64Array): void {
    const { size, row, col, imaginary, rows } = this.#pattern;
    const section = this.#section(out);
    const coordinates = this.#coordinates;
    combineRows(rows, y, coordinates);
    for (let c = 0; c < coordinates.length; c++) {
      const p = row[c];
      const q = col[c];
      if (p === q) {
        section[p * size + p] += factor * coordinates[c];
        continue;
      }
      const value = factor * Math.SQRT1_2 * coordinates[c];
      const start = imaginary[c] * size * size;
      section[start + p * size + q] += value;
      section[start + q * size + p] += imaginary[c] ? -value : value;
    }
  }

  isPositive(v: Float64Array): boolean {
    return choleskyFactor(this.#section(v), this.degree, this.#pattern.complex, this.#work) < 0;
  }

  factorPrimal(x: Float64Array): boolean {
    return choleskyFactor(this.#section(x), this.degree, this.#pattern.complex, this.#primalFactor) < 0;
  }

  factorDual(s: Float64Array, inverse: Float64Array): boolean {
    const { size, complex } = this.#pattern;
    if (choleskyFactor(this.#section(s), size, complex, this.#dualFactor) >= 0) return false;
    choleskyInverse(this.#dualFactor, size, complex, this.#section(inverse), this.#work);
    return true;
  }

  addSchur(x: Float64Array, inverse: Float64Array, matrix: Float64Array, order: number): void {
    this.#assembly.add(this.#section(x), this.#section(inverse), matrix, order);
  }

  addRounding(x: Float64Array, inverse: Float64Array, level: Float64Array): void {
    const { count, unknown, start, value } = this.#pattern.rows;
    const size = largest(this.#section(x)) * largest(this.#section(inverse));
    for (let t = 0; t < count; t++) {
      let square = 0;
      for (let e = start[t]; e < start[t + 1]; e++) square += value[e] * value[e];
      level[unknown[t]] += size * square;
    }
  }

  scaledProduct(
    x: Float64Array,
    d: Float64Array,
    e: Float64Array | null,
    f: Float64Array | null,
    inverse: Float64Array,
    out: Float64Array,
  ): void {
    const { size, complex } = this.#pattern;
    // Right factors are Hermitian, so A B* is the product A B.
    const multiply = (c: Float64Array, a: Float64Array, b: Float64Array, accumulate: boolean): void =>
      multiplyAdjoint(squarePanel(c, size), squarePanel(a, size), squarePanel(b, size), [size, size, size], {
        complex,
        accumulate,
      });
    multiply(this.#work, this.#section(x), this.#section(d), false);
    if (e && f) multiply(this.#work, this.#section(e), this.#section(f), true);
    multiply(this.#work2, this.#work, this.#section(inverse), false);
    hermitianPartInto(this.#section(out), this.#work2, size, complex);
  }

  primalBound(d: Float64Array): number {
    return this.#bound.smallest(this.#primalFactor, this.#section(d));
  }

  dualBound(d: Float64Array): number {
    return this.#bound.smallest(this.#dualFactor, this.#section(d));
  }

  #section(flat: Float64Array): Float64Array {
    return flat.subarray(this.#offset, this.#offset + this.#length);
  }
}

function hermitianPartInto(out: Float64Array, a: Float64Array, n: number, complex: boolean): void {
  for (let part = 0; part < (complex ? 2 : 1); part++) {
    const start = part * n * n;
    const sign = part === 0 ? 1 : -1;
    for (let i = 0; i < n; i++) {
      for (let j = 0; j <= i; j++) {
        const value = 0.5 * (a[start + i * n + j] + sign * a[start + j * n + i]);
        out[start + i * n + j] = value;
        out[start + j * n + i] = sign * value;
      }
    }
  }
}

function largest(a: Float64Array): number {
  let top = 0;
  for (let k = 0; k < a.length; k++) top = Math.max(top, Math.abs(a[k]));
  return top;
}
