/**
 * A WebAssembly module (128-bit SIMD, in every engine since 2021) with one function
 *
 *     multiply(a, b, c, rowTiles, colTiles, innerBytes, strideBytes)
 *
 * that overwrites C with A Bᵀ: byte addresses in the imported memory; A has 4 · rowTiles rows and B has 2 · colTiles rows of
 * innerBytes each, a positive multiple of 16, stored without gaps; rows of C are strideBytes apart. The eight sums of a
 * tile stay in registers. Plain multiplications and additions only, so every machine gives the same bits.
 */
export function simdBytes(): Uint8Array {
  const body = [...loops(), END];
  const locals = [2, count(SUM - FIRST_LOCAL), I32, count(TILE + COLS + 1), V128].flat();
  const code = [...locals, ...body];
  return Uint8Array.from([
    ...[0x00, 0x61, 0x73, 0x6d, 0x01, 0x00, 0x00, 0x00],
    ...section(1, [1, 0x60, 7, ...Array<number>(7).fill(I32), 0]),
    ...section(2, [1, ...name('host'), ...name('memory'), 2, 0, 1]),
    ...section(3, [1, 0]),
    ...section(7, [1, ...name('multiply'), 0, 0]),
    ...section(10, [1, ...count(code.length), ...code]),
  ]);
}

/** Rows of A and rows of B in a tile; eight accumulators and four operands fit the sixteen registers of x86. */
export const ROWS = 4;
export const COLS = 2;
const TILE = ROWS * COLS;

// Parameters, then 32-bit locals, then vector locals.
const [A, B, C, ROW_TILES, COL_TILES, INNER, STRIDE] = [0, 1, 2, 3, 4, 5, 6];
const FIRST_LOCAL = 7;
const [COLUMN, OFFSET, B_TILE, C_TILE, A_ROW] = [7, 8, 9, 10, 11];
const B_ROW = A_ROW + ROWS;
const SUM = B_ROW + COLS;
const RIGHT = SUM + TILE;
const LEFT = RIGHT + COLS;

const I32 = 0x7f;
const V128 = 0x7b;
const END = 0x0b;
const ADD = [0x6a];
const SUBTRACT = [0x6b];
const LESS = [0x49];
const LOOP = [0x03, 0x40];
const BRANCH_IF = [0x0d, 0x00];
const VECTOR_LOAD = [0xfd, 0x00, 3, 0];
const VECTOR_ZERO = [0xfd, 0x0c, ...Array<number>(16).fill(0)];
const VECTOR_ADD = [0xfd, 0xf0, 0x01];
const VECTOR_MULTIPLY = [0xfd, 0xf2, 0x01];
const lane = (k: number): number[] => [0xfd, 0x21, k];
const DOUBLE_ADD = [0xa0];
const doubleStore = (offset: number): number[] => [0x39, 3, ...count(offset)];
const get = (local: number): number[] => [0x20, ...count(local)];
const set = (local: number): number[] => [0x21, ...count(local)];
const tee = (local: number): number[] => [0x22, ...count(local)];
/** 0 ≤ value < 64. */
const constant = (value: number): number[] => [0x41, value];
const each = (n: number, make: (k: number) => number[]): number[] =>
  Array.from({ length: n }, (_, k) => make(k)).flat();

/** for each row tile of A, for each row tile of B: clear the sums, run over the inner index, store. */
function loops(): number[] {
  return [
    ...LOOP,
    ...[...get(A), ...set(A_ROW)],
    ...each(ROWS - 1, (r) => [...get(A_ROW + r), ...get(INNER), ...ADD, ...set(A_ROW + r + 1)]),
    ...[...get(B), ...set(B_TILE), ...get(C), ...set(C_TILE), ...get(COL_TILES), ...set(COLUMN)],
    ...LOOP,
    ...[...get(B_TILE), ...set(B_ROW)],
    ...each(COLS - 1, (s) => [...get(B_ROW + s), ...get(INNER), ...ADD, ...set(B_ROW + s + 1)]),
    ...each(TILE, (k) => [...VECTOR_ZERO, ...set(SUM + k)]),
    ...[...constant(0), ...set(OFFSET)],
    ...LOOP,
    ...innerStep(),
    ...[...get(OFFSET), ...constant(16), ...ADD, ...tee(OFFSET), ...get(INNER), ...LESS, ...BRANCH_IF, END],
    ...storeTile(),
    ...[...get(C_TILE), ...constant(8 * COLS), ...ADD, ...set(C_TILE)],
    ...[...get(B_ROW + COLS - 1), ...get(INNER), ...ADD, ...set(B_TILE)],
    ...[...get(COLUMN), ...constant(1), ...SUBTRACT, ...tee(COLUMN), ...BRANCH_IF, END],
    ...[...get(A_ROW + ROWS - 1), ...get(INNER), ...ADD, ...set(A)],
    ...[...get(C), ...each(ROWS, () => [...get(STRIDE), ...ADD]), ...set(C)],
    ...[...get(ROW_TILES), ...constant(1), ...SUBTRACT, ...tee(ROW_TILES), ...BRANCH_IF, END],
  ];
}

function innerStep(): number[] {
  const load = (row: number): number[] => [...get(row), ...get(OFFSET), ...ADD, ...VECTOR_LOAD];
  return [
    ...each(COLS, (s) => [...load(B_ROW + s), ...set(RIGHT + s)]),
    ...each(ROWS, (r) => [
      ...[...load(A_ROW + r), ...set(LEFT)],
      ...each(COLS, (s) => {
        const sum = SUM + r * COLS + s;
        return [...get(sum), ...get(LEFT), ...get(RIGHT + s), ...VECTOR_MULTIPLY, ...VECTOR_ADD, ...set(sum)];
      }),
    ]),
  ];
}

/** The two lanes of each sum belong to even and odd inner indices. */
function storeTile(): number[] {
  return [
    ...[...get(C_TILE), ...set(OFFSET)],
    ...each(ROWS, (r) => [
      ...each(COLS, (s) => {
        const sum = get(SUM + r * COLS + s);
        return [...get(OFFSET), ...sum, ...lane(0), ...sum, ...lane(1), ...DOUBLE_ADD, ...doubleStore(8 * s)];
      }),
      ...[...get(OFFSET), ...get(STRIDE), ...ADD, ...set(OFFSET)],
    ]),
  ];
}

function section(id: number, content: readonly number[]): number[] {
  return [id, ...count(content.length), ...content];
}

function name(text: string): number[] {
  return [text.length, ...Array.from(text, (letter) => letter.charCodeAt(0))];
}

/** Unsigned LEB128. */
function count(value: number): number[] {
  return value < 128 ? [value] : [(value & 127) | 128, ...count(value >>> 7)];
}
