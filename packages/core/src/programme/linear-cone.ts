import { addProducts, addRowsTimes, BATCH, combineRows, type CoefficientRows } from './coefficient-rows.js';
import { type Cone } from './cone.js';
import { type LinearPattern } from './conic-form.js';

/** The non-negative orthant. */
export class LinearCone implements Cone {
  readonly degree: number;
  readonly #rows: CoefficientRows;
  readonly #offset: number;
  readonly #sum: Float64Array;
  readonly #products: Float64Array;
  readonly #x: Float64Array;
  readonly #s: Float64Array;

  constructor({ size, rows }: LinearPattern, offset: number) {
    this.degree = size;
    this.#rows = rows;
    this.#offset = offset;
    this.#sum = new Float64Array(size);
    this.#products = new Float64Array(BATCH * size);
    this.#x = new Float64Array(size);
    this.#s = new Float64Array(size);
  }

  setIdentity(x: Float64Array, value: number): void {
    this.#section(x).fill(value);
  }

  addValues(v: Float64Array, factor: number, out: Float64Array): void {
    addRowsTimes(this.#rows, this.#section(v), factor, out);
  }

  addAdjoint(y: Float64Array, factor: number, out: Float64Array): void {
    combineRows(this.#rows, y, this.#sum);
    const section = this.#section(out);
    for (let p = 0; p < this.degree; p++) section[p] += factor * this.#sum[p];
  }

  isPositive(v: Float64Array): boolean {
    return this.#section(v).every((value) => value > 0);
  }

  factorPrimal(x: Float64Array): boolean {
    this.#x.set(this.#section(x));
    return this.#x.every((value) => value > 0);
  }

  factorDual(s: Float64Array, inverse: Float64Array): boolean {
    this.#s.set(this.#section(s));
    const section = this.#section(inverse);
    for (let p = 0; p < this.degree; p++) section[p] = 1 / this.#s[p];
    return this.#s.every((value) => value > 0);
  }

  addSchur(x: Float64Array, inverse: Float64Array, matrix: Float64Array, order: number): void {
    const { count, start, coordinate, value } = this.#rows;
    const primal = this.#section(x);
    const dual = this.#section(inverse);
    const products = this.#products;
    for (let first = 0; first < count; first += BATCH) {
      products.fill(0);
      for (let t = first; t < Math.min(first + BATCH, count); t++) {
        for (let e = start[t]; e < start[t + 1]; e++) {
          const p = coordinate[e];
          products[(t - first) * this.degree + p] = value[e] * primal[p] * dual[p];
        }
      }
      addProducts(this.#rows, first, products, matrix, order);
    }
  }

  addRounding(x: Float64Array, inverse: Float64Array, level: Float64Array): void {
    const { count, start, coordinate, value, unknown } = this.#rows;
    const primal = this.#section(x);
    const dual = this.#section(inverse);
    // Every term is positive: nothing cancels.
    for (let t = 0; t < count; t++) {
      for (let e = start[t]; e < start[t + 1]; e++) {
        const p = coordinate[e];
        level[unknown[t]] += value[e] * value[e] * primal[p] * dual[p];
      }
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
    for (let p = this.#offset; p < this.#offset + this.degree; p++) {
      out[p] = (x[p] * d[p] + (e && f ? e[p] * f[p] : 0)) * inverse[p];
    }
  }

  primalBound(d: Float64Array): number {
    return this.#smallestRatio(this.#section(d), this.#x);
  }

  dualBound(d: Float64Array): number {
    return this.#smallestRatio(this.#section(d), this.#s);
  }

  #smallestRatio(d: Float64Array, base: Float64Array): number {
    let smallest = Infinity;
    for (let p = 0; p < this.degree; p++) smallest = Math.min(smallest, d[p] / base[p]);
    return smallest;
  }

  #section(flat: Float64Array): Float64Array {
    return flat.subarray(this.#offset, this.#offset + this.degree);
  }
}
