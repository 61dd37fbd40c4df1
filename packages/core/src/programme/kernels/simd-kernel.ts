import { COLS, ROWS, simdBytes } from './simd-bytes.js';

/** The part of WebAssembly that is used; not in the language's own library. */
interface WebAssemblyHost {
  readonly validate: (bytes: Uint8Array) => boolean;
  readonly Module: new (bytes: Uint8Array) => object;
  readonly Instance: new (module: object, imports: object) => { readonly exports: Record<string, unknown> };
  readonly Memory: new (options: { initial: number }) => SimdMemory;
}

interface SimdMemory {
  readonly buffer: ArrayBuffer;
  grow(pages: number): number;
}

type Multiply = (
  a: number,
  b: number,
  c: number,
  rowTiles: number,
  colTiles: number,
  inner: number,
  stride: number,
) => void;

/** Row-major areas of the kernel's memory: A is rows × inner, B is cols × inner, C is rows × cols; all padded. */
export interface SimdAreas {
  readonly data: Float64Array;
  readonly a: number;
  readonly b: number;
  readonly c: number;
  /** `inner` rounded up to an even number: the row length of A and B; the caller clears the padding. */
  readonly inner: number;
  /** Row length of C. */
  readonly cols: number;
}

const PAGE = 65536;

/** The WebAssembly product with its scratch memory, which holds nothing between two calls. */
export class SimdKernel {
  readonly #memory: SimdMemory;
  readonly #multiply: Multiply;
  #data: Float64Array;

  /** Null where the engine has no WebAssembly with SIMD. */
  static create(): SimdKernel | null {
    const host = (globalThis as { WebAssembly?: WebAssemblyHost }).WebAssembly;
    const bytes = simdBytes();
    return host?.validate(bytes) ? new SimdKernel(host, bytes) : null;
  }

  private constructor(host: WebAssemblyHost, bytes: Uint8Array) {
    this.#memory = new host.Memory({ initial: 1 });
    this.#data = new Float64Array(this.#memory.buffer);
    const instance = new host.Instance(new host.Module(bytes), { host: { memory: this.#memory } });
    this.#multiply = instance.exports['multiply'] as Multiply;
  }

  reserve(rows: number, cols: number, inner: number): SimdAreas {
    const width = inner + (inner & 1);
    const height = ROWS * Math.ceil(rows / ROWS);
    const stride = COLS * Math.ceil(cols / COLS);
    const needed = height * width + stride * width + height * stride;
    if (needed > this.#data.length) {
      this.#memory.grow(Math.ceil((8 * (needed - this.#data.length)) / PAGE));
      this.#data = new Float64Array(this.#memory.buffer);
    }
    return { data: this.#data, a: 0, b: height * width, c: (height + stride) * width, inner: width, cols: stride };
  }

  /** C ← A Bᵀ; rows of A and B beyond the given ones only reach padding of C. */
  multiply({ a, b, c, inner, cols }: SimdAreas, rows: number): void {
    this.#multiply(8 * a, 8 * b, 8 * c, Math.ceil(rows / ROWS), cols / COLS, 8 * inner, 8 * cols);
  }
}
