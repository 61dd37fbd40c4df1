import { addProducts, BATCH } from './coefficient-rows.js';
import { type ConePattern } from './cone-pattern.js';
import { multiplyAdjoint } from './kernels/multiply-adjoint.js';
import { schurPlan, type SchurPlan } from './schur-plan.js';

/**
 * The Schur complement <A_i, x A_j s⁻¹> of one matrix cone. With R the rows touched by A_j and T = (A_j s⁻¹)_{R·}, packed
 * rows make every entry of x A_j s⁻¹ one real inner product:
 *
 *     left row p = [Re x_pR | −Im x_pR],  right row q = [Re T_Rq | Im T_Rq]  (real part),  [Im T_Rq | −Re T_Rq]  (imaginary).
 */
export class SchurAssembly {
  readonly #pattern: ConePattern;
  readonly #plan: SchurPlan;
  readonly #parts: number;
  readonly #left: Float64Array;
  readonly #right: Float64Array;
  readonly #product: Float64Array;
  readonly #denseCoefficient: Float64Array;
  readonly #whole: Float64Array;
  readonly #vectors: Float64Array;

  constructor(pattern: ConePattern) {
    const { size, rows, complex } = pattern;
    this.#pattern = pattern;
    this.#plan = schurPlan(pattern);
    this.#parts = complex ? 2 : 1;
    const packed = size * this.#plan.mostTouched * this.#parts;
    const whole = this.#plan.wholeMatrix.some((flag) => flag === 1) ? size * size : 0;
    this.#left = new Float64Array(packed);
    this.#right = new Float64Array(packed * this.#parts);
    this.#product = new Float64Array(packed);
    this.#denseCoefficient = new Float64Array(this.#plan.denseProduct.some((flag) => flag === 1) ? packed : 0);
    this.#whole = new Float64Array(whole * this.#parts);
    this.#vectors = new Float64Array(BATCH * rows.width);
  }

  /** Adds each product to one of the two places of its pair in the order × order matrix. */
  add(x: Float64Array, inverse: Float64Array, matrix: Float64Array, order: number): void {
    const { rows } = this.#pattern;
    const { count, width, prefix } = rows;
    for (let first = 0; first < count; first += BATCH) {
      for (let t = first; t < Math.min(first + BATCH, count); t++) {
        const out = this.#vectors.subarray((t - first) * width, (t - first + 1) * width);
        this.#packLeft(t, x);
        if (this.#plan.denseProduct[t]) this.#packRightDense(t, inverse);
        else this.#packRight(t, inverse);
        if (this.#plan.wholeMatrix[t]) this.#wholeCoordinates(t, out);
        else this.#neededCoordinates(t, out);
        // Entries that only earlier rows use are not formed; the joint kernel of the batch still reads them.
        out.fill(0, prefix[t], prefix[first]);
      }
      addProducts(rows, first, this.#vectors, matrix, order);
    }
  }

  #packLeft(t: number, x: Float64Array): void {
    if (this.#plan.sameAsPrevious[t]) return;
    const { touched, touchedStart } = this.#plan;
    const { size, leading, complex } = this.#pattern;
    const first = touchedStart[t];
    const count = touchedStart[t + 1] - first;
    const stride = count * this.#parts;
    for (let p = 0; p < leading[t]; p++) {
      const target = p * stride;
      const row = p * size;
      for (let r = 0; r < count; r++) this.#left[target + r] = x[row + touched[first + r]];
      if (!complex) continue;
      const imaginary = size * size + row;
      for (let r = 0; r < count; r++) this.#left[target + count + r] = -x[imaginary + touched[first + r]];
    }
  }

  /** T by adding multiples of rows of s⁻¹, then packed. */
  #packRight(t: number, inverse: Float64Array): void {
    const { touchedStart, entryRow, entryCol } = this.#plan;
    const { size, leading, complex, row, col, imaginary, rows } = this.#pattern;
    const count = touchedStart[t + 1] - touchedStart[t];
    const width = leading[t];
    const product = this.#product;
    product.fill(0, 0, count * width * this.#parts);
    const half = count * width;
    const square = size * size;
    for (let e = rows.start[t]; e < rows.start[t + 1]; e++) {
      const c = rows.coordinate[e];
      const value = row[c] === col[c] ? rows.value[e] : Math.SQRT1_2 * rows.value[e];
      const upper = entryRow[e] * width;
      const lower = entryCol[e] * width;
      const p = row[c] * size;
      const q = col[c] * size;
      if (imaginary[c]) {
        addMultiple(product, upper, inverse, square + q, width, -value);
        addMultiple(product, half + upper, inverse, q, width, value);
        addMultiple(product, lower, inverse, square + p, width, value);
        addMultiple(product, half + lower, inverse, p, width, -value);
        continue;
      }
      addMultiple(product, upper, inverse, q, width, value);
      if (complex) addMultiple(product, half + upper, inverse, square + q, width, value);
      if (p === q) continue;
      addMultiple(product, lower, inverse, p, width, value);
      if (complex) addMultiple(product, half + lower, inverse, square + p, width, value);
    }
    this.#packProduct(count, width);
  }

  #packProduct(count: number, width: number): void {
    const product = this.#product;
    const stride = count * this.#parts;
    const half = count * width;
    const right = this.#right;
    for (let r = 0; r < count; r++) {
      for (let q = 0, target = r; q < width; q++, target += stride) {
        const re = product[r * width + q];
        right[target] = re;
        if (this.#parts === 1) continue;
        const im = product[half + r * width + q];
        const turned = width * stride + target;
        right[target + count] = im;
        right[turned] = im;
        right[turned + count] = -re;
      }
    }
  }

  /** T by a dense product: T_Rq = Σ_s A_Rs conj(s⁻¹_qs). */
  #packRightDense(t: number, inverse: Float64Array): void {
    const { touchedStart } = this.#plan;
    const { size, leading, complex } = this.#pattern;
    const count = touchedStart[t + 1] - touchedStart[t];
    const stride = count * this.#parts;
    this.#expandCoefficient(t, count);
    // s⁻¹ A_R* has the conjugates of T as its rows.
    const width = leading[t];
    const right = this.#right;
    multiplyAdjoint(
      { data: right, start: 0, stride, imaginary: count },
      { data: inverse, start: 0, stride: size, imaginary: size * size },
      { data: this.#denseCoefficient, start: 0, stride: size, imaginary: count * size },
      [width, count, size],
      { complex },
    );
    if (!complex) return;
    for (let q = 0; q < width; q++) {
      for (let r = q * stride; r < q * stride + count; r++) {
        const im = -right[r + count];
        right[r + count] = im;
        right[width * stride + r] = im;
        right[width * stride + r + count] = -right[r];
      }
    }
  }

  /** The touched rows of A_t: count × size real parts, then the imaginary ones. */
  #expandCoefficient(t: number, count: number): void {
    const { entryRow, entryCol } = this.#plan;
    const { size, row, col, imaginary, rows } = this.#pattern;
    const a = this.#denseCoefficient.fill(0, 0, count * size * this.#parts);
    for (let e = rows.start[t]; e < rows.start[t + 1]; e++) {
      const c = rows.coordinate[e];
      const value = row[c] === col[c] ? rows.value[e] : Math.SQRT1_2 * rows.value[e];
      const start = imaginary[c] ? count * size : 0;
      a[start + entryRow[e] * size + col[c]] = value;
      if (row[c] !== col[c]) a[start + entryCol[e] * size + row[c]] = imaginary[c] ? -value : value;
    }
  }

  #neededCoordinates(t: number, out: Float64Array): void {
    const { touchedStart } = this.#plan;
    const { row, col, imaginary, rows, leading } = this.#pattern;
    const inner = (touchedStart[t + 1] - touchedStart[t]) * this.#parts;
    const left = this.#left;
    const right = this.#right;
    for (let c = 0; c < rows.prefix[t]; c++) {
      const p = row[c] * inner;
      const q = col[c] * inner;
      const turned = imaginary[c] ? leading[t] * inner : 0;
      let upper = 0;
      let lower = 0;
      for (let k = 0; k < inner; k++) {
        upper += left[p + k] * right[turned + q + k];
        lower += left[q + k] * right[turned + p + k];
      }
      if (p === q) out[c] = upper;
      else out[c] = Math.SQRT1_2 * (imaginary[c] ? upper - lower : upper + lower);
    }
  }

  #wholeCoordinates(t: number, out: Float64Array): void {
    const { touchedStart } = this.#plan;
    const { row, col, imaginary, rows, leading } = this.#pattern;
    const stride = (touchedStart[t + 1] - touchedStart[t]) * this.#parts;
    const n = leading[t];
    const width = n * this.#parts;
    multiplyAdjoint(
      { data: this.#whole, start: 0, stride: width, imaginary: 0 },
      { data: this.#left, start: 0, stride, imaginary: 0 },
      { data: this.#right, start: 0, stride, imaginary: 0 },
      [n, width, stride],
      { complex: false },
    );
    const whole = this.#whole;
    for (let c = 0; c < rows.prefix[t]; c++) {
      const shift = imaginary[c] * n;
      const upper = row[c] * width + shift + col[c];
      const lower = col[c] * width + shift + row[c];
      if (imaginary[c]) out[c] = Math.SQRT1_2 * (whole[upper] - whole[lower]);
      else if (upper === lower) out[c] = whole[upper];
      else out[c] = Math.SQRT1_2 * (whole[upper] + whole[lower]);
    }
  }
}

function addMultiple(
  target: Float64Array,
  start: number,
  source: Float64Array,
  from: number,
  count: number,
  factor: number,
): void {
  for (let k = 0; k < count; k++) target[start + k] += factor * source[from + k];
}
