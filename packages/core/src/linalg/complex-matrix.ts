import { ThalwegError } from '../errors.js';
import { multiplyInto } from './complex-multiply.js';
import { requireInner, requireSameShape, requireSquare } from './shape-checks.js';

/** A complex rows × cols matrix, row-major, real and imaginary parts apart. Operations return new matrices. */
export interface ComplexMatrix {
  readonly rows: number;
  readonly cols: number;
  readonly re: Float64Array;
  readonly im: Float64Array;
}

export type Complex = { readonly re: number; readonly im: number };

export function zeros(rows: number, cols: number = rows): ComplexMatrix {
  return { rows, cols, re: new Float64Array(rows * cols), im: new Float64Array(rows * cols) };
}

export function identity(n: number): ComplexMatrix {
  const a = zeros(n);
  for (let i = 0; i < n; i++) a.re[i * n + i] = 1;
  return a;
}

/** The matrix with entry(i, j) = [re, im]. */
export function fromEntries(
  rows: number,
  cols: number,
  entry: (i: number, j: number) => readonly [number, number],
): ComplexMatrix {
  const a = zeros(rows, cols);
  for (let i = 0, k = 0; i < rows; i++) {
    for (let j = 0; j < cols; j++, k++) [a.re[k], a.im[k]] = entry(i, j);
  }
  return a;
}

/** From nested arrays; throws `ragged-matrix` when the rows differ in length, `dimension-mismatch` when the parts do. */
export function fromRows(re: readonly (readonly number[])[], im?: readonly (readonly number[])[]): ComplexMatrix {
  const rows = re.length;
  const cols = rows > 0 ? re[0].length : 0;
  if (im && im.length !== rows) {
    throw new ThalwegError(
      'dimension-mismatch',
      `expected ${rows} imaginary rows as in the real part, got ${im.length}`,
    );
  }
  const a = zeros(rows, cols);
  for (let i = 0; i < rows; i++) {
    for (const row of im ? [re[i], im[i]] : [re[i]]) {
      if (row.length !== cols) {
        throw new ThalwegError('ragged-matrix', `expected ${cols} entries in row ${i}, got ${row.length}`);
      }
    }
    a.re.set(re[i], i * cols);
    if (im) a.im.set(im[i], i * cols);
  }
  return a;
}

export function diagonal(values: ArrayLike<number>): ComplexMatrix {
  const n = values.length;
  const a = zeros(n);
  for (let i = 0; i < n; i++) a.re[i * n + i] = values[i];
  return a;
}

export function copy(a: ComplexMatrix): ComplexMatrix {
  return { rows: a.rows, cols: a.cols, re: a.re.slice(), im: a.im.slice() };
}

export function add(a: ComplexMatrix, b: ComplexMatrix): ComplexMatrix {
  return addScaledInto(copy(a), b, 1);
}

export function subtract(a: ComplexMatrix, b: ComplexMatrix): ComplexMatrix {
  return addScaledInto(copy(a), b, -1);
}

/** (re + i im) A. */
export function scale(a: ComplexMatrix, re: number, im: number = 0): ComplexMatrix {
  const c = zeros(a.rows, a.cols);
  for (let k = 0; k < c.re.length; k++) {
    c.re[k] = re * a.re[k] - im * a.im[k];
    c.im[k] = re * a.im[k] + im * a.re[k];
  }
  return c;
}

/** target += (re + i im) A, in place; returns the target. */
export function addScaledInto(target: ComplexMatrix, a: ComplexMatrix, re: number, im: number = 0): ComplexMatrix {
  requireSameShape(target, a);
  for (let k = 0; k < a.re.length; k++) {
    const x = a.re[k];
    const y = a.im[k];
    target.re[k] += re * x - im * y;
    target.im[k] += re * y + im * x;
  }
  return target;
}

export function multiply(a: ComplexMatrix, b: ComplexMatrix): ComplexMatrix {
  requireInner(a.cols, b.rows);
  const c = zeros(a.rows, b.cols);
  multiplyInto(c, a, b);
  return c;
}

/** A* B. */
export function multiplyAdjointFirst(a: ComplexMatrix, b: ComplexMatrix): ComplexMatrix {
  return multiply(adjoint(a), b);
}

/** A B*. */
export function multiplyAdjointSecond(a: ComplexMatrix, b: ComplexMatrix): ComplexMatrix {
  return multiply(a, adjoint(b));
}

export function adjoint(a: ComplexMatrix): ComplexMatrix {
  return transposed(a, -1);
}

export function transpose(a: ComplexMatrix): ComplexMatrix {
  return transposed(a, 1);
}

/** Entrywise complex conjugate. */
export function conjugate(a: ComplexMatrix): ComplexMatrix {
  return { rows: a.rows, cols: a.cols, re: a.re.slice(), im: a.im.map((y) => -y) };
}

/** AB − BA. */
export function commutator(a: ComplexMatrix, b: ComplexMatrix): ComplexMatrix {
  return addScaledInto(multiply(a, b), multiply(b, a), -1);
}

/** AB + BA. */
export function anticommutator(a: ComplexMatrix, b: ComplexMatrix): ComplexMatrix {
  return addScaledInto(multiply(a, b), multiply(b, a), 1);
}

/** Unnormalised trace. */
export function trace(a: ComplexMatrix): Complex {
  requireSquare(a);
  let re = 0;
  let im = 0;
  for (let i = 0; i < a.rows; i++) {
    re += a.re[i * a.cols + i];
    im += a.im[i * a.cols + i];
  }
  return { re, im };
}

/** Tr A* B, conjugate-linear in the first argument. */
export function innerProduct(a: ComplexMatrix, b: ComplexMatrix): Complex {
  requireSameShape(a, b);
  let re = 0;
  let im = 0;
  for (let k = 0; k < a.re.length; k++) {
    re += a.re[k] * b.re[k] + a.im[k] * b.im[k];
    im += a.re[k] * b.im[k] - a.im[k] * b.re[k];
  }
  return { re, im };
}

/** Frobenius norm, safe against overflow and underflow. */
export function frobeniusNorm(a: ComplexMatrix): number {
  const top = maxAbs(a);
  // Squares of entries in this range neither overflow nor lose digits to the subnormal range.
  const factor = top > 1e-130 && top < 1e130 ? 1 : top;
  if (!(top > 0) || top === Infinity) return top;
  let sum = 0;
  for (let k = 0; k < a.re.length; k++) {
    const x = a.re[k] / factor;
    const y = a.im[k] / factor;
    sum += x * x + y * y;
  }
  return factor * Math.sqrt(sum);
}

/** Largest modulus of an entry; 0 for an empty matrix, NaN if any entry is NaN. */
export function maxAbs(a: ComplexMatrix): number {
  let top = 0;
  for (let k = 0; k < a.re.length; k++) {
    const x = Math.abs(a.re[k]);
    const y = Math.abs(a.im[k]);
    if (x + y > top) top = Math.max(top, Math.hypot(x, y));
    else if (x + y !== x + y) return NaN;
  }
  return top;
}

/** A ⊗ B, row index i_A · rows(B) + i_B. */
export function kronecker(a: ComplexMatrix, b: ComplexMatrix): ComplexMatrix {
  const c = zeros(a.rows * b.rows, a.cols * b.cols);
  for (let i = 0, k = 0; i < c.rows; i++) {
    const rowA = Math.floor(i / b.rows) * a.cols;
    const rowB = (i % b.rows) * b.cols;
    for (let p = rowA; p < rowA + a.cols; p++) {
      for (let q = rowB; q < rowB + b.cols; q++, k++) {
        c.re[k] = a.re[p] * b.re[q] - a.im[p] * b.im[q];
        c.im[k] = a.re[p] * b.im[q] + a.im[p] * b.re[q];
      }
    }
  }
  return c;
}

/** Block-diagonal matrix with the given blocks, in order. */
export function directSum(blocks: readonly ComplexMatrix[]): ComplexMatrix {
  const total = (side: 'rows' | 'cols'): number => blocks.reduce((n, b) => n + b[side], 0);
  const c = zeros(total('rows'), total('cols'));
  let row = 0;
  let col = 0;
  for (const b of blocks) {
    for (let i = 0; i < b.rows; i++) {
      c.re.set(b.re.subarray(i * b.cols, (i + 1) * b.cols), (row + i) * c.cols + col);
      c.im.set(b.im.subarray(i * b.cols, (i + 1) * b.cols), (row + i) * c.cols + col);
    }
    row += b.rows;
    col += b.cols;
  }
  return c;
}

/** (A + A*) / 2. */
export function hermitianPart(a: ComplexMatrix): ComplexMatrix {
  requireSquare(a);
  return scale(addScaledInto(adjoint(a), a, 1), 0.5);
}

/** ‖A − A*‖_F. */
export function hermiticityResidual(a: ComplexMatrix): number {
  return frobeniusNorm(subtract(a, adjoint(a)));
}

export function isFiniteMatrix(a: ComplexMatrix): boolean {
  return a.re.every(Number.isFinite) && a.im.every(Number.isFinite);
}

function transposed(a: ComplexMatrix, sign: number): ComplexMatrix {
  const c = zeros(a.cols, a.rows);
  for (let i = 0, k = 0; i < a.rows; i++) {
    for (let j = 0; j < a.cols; j++, k++) {
      c.re[j * a.rows + i] = a.re[k];
      c.im[j * a.rows + i] = sign * a.im[k];
    }
  }
  return c;
}
