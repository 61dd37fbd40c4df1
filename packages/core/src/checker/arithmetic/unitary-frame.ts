import { ThalwegError } from '../../errors.js';
import type { ComplexMatrix } from '../../linalg/complex-matrix.js';
import { binaryParts } from './binary-parts.js';
import {
  FIXED_ONE,
  type FixedMatrix,
  fixedAdjoint,
  fixedInterval,
  fixedProduct,
  fixedSubmatrix,
} from './fixed-matrix.js';
import { type ComplexIntervalMatrix, complexIntervalZeros, complexPointMatrix, setEntry } from './interval-matrix.js';
import { POLAR_STEPS, UNITARITY_LIMIT } from './limits.js';
import { addDown, divUp, sqrtDown, subDown } from './rounding.js';
import { encloseUnitarityDefect } from './unitarity-defect.js';

/** The exactly unitary polar factor Ũ = u(u*u)^{-1/2} of a matrix u of doubles. */
export interface UnitaryFrame {
  /** Independent parts: u vanishes between the rows of one and the columns of another. Null for the identity. */
  readonly parts: readonly FramePart[] | null;
  /** Bound of ‖Ũ − u‖₂. */
  readonly distance: number;
}

interface FramePart {
  readonly rows: readonly number[];
  readonly cols: readonly number[];
  /** Fixed-point matrix within `error` units of the part of Ũ, in the Frobenius norm. */
  readonly matrix: FixedMatrix;
  readonly error: bigint;
}

/**
 * Find Ũ to nearly FIXED_BITS bits. With ‖u*u − 1‖ ≤ ε < 1 the singular values s of u obey |s² − 1| ≤ ε, whence
 * ‖Ũ − u‖ = max|1 − s| ≤ 1 − √(1−ε). Throws `usage` when u is not nearly unitary, `not-finite`.
 */
export function unitaryFrame(u: ComplexMatrix | null): UnitaryFrame {
  if (!u) return { parts: null, distance: 0 };
  const defect = encloseUnitarityDefect(u).hi;
  if (!(defect < UNITARITY_LIMIT)) {
    throw new ThalwegError('usage', `expected a nearly unitary frame of the state, got ‖u*u − 1‖ up to ${defect}`);
  }
  return {
    parts: connectedParts(u).map(({ rows, cols }) => ({ rows, cols, ...polarFactor(fixedSubmatrix(u, rows, cols)) })),
    distance: divUp(defect, addDown(1, sqrtDown(subDown(1, defect)))),
  };
}

/** Enclosure of Ũ*XŨ for a square matrix of finite doubles: zero between parts where X is, and a unit or so wide elsewhere. */
export function rotated({ parts }: UnitaryFrame, x: ComplexMatrix): ComplexIntervalMatrix {
  if (!parts) return complexPointMatrix(x);
  complexPointMatrix(x); // refuses entries that are not finite
  const out = complexIntervalZeros(x.rows);
  const top = largestPart(x);
  if (!(top > 0)) return out;
  const { exponent } = binaryParts(top);
  for (const left of parts) {
    for (const right of parts) rotateBetween(out, x, exponent, left, right);
  }
  return out;
}

/**
 * Fill the entries of Ũ*XŨ between two parts of sides m, m'. In units of X's scale entries are below 2√2, so that the
 * norm of the block is below 3·max(m, m'): the errors of the two factors of Ũ enter with it. Conversion and the two
 * products drop less than √2(1 + √m(1 + √m')) units an entry.
 */
function rotateBetween(
  out: ComplexIntervalMatrix,
  x: ComplexMatrix,
  exponent: number,
  left: FramePart,
  right: FramePart,
): void {
  const block = fixedSubmatrix(x, left.rows, right.rows, exponent);
  if ([...block.re, ...block.im].every((y) => y === 0n) && block.exact) return;
  const product = fixedProduct(fixedAdjoint(left.matrix), fixedProduct(block, right.matrix));
  const m = left.rows.length;
  const n = right.rows.length;
  const frames = left.error + right.error + (left.error * right.error) / FIXED_ONE;
  const rotation = frames > 0n ? BigInt(3 * Math.max(m, n)) * (frames + 1n) : 0n;
  const radius = rotation + (product.exact ? 0n : BigInt(8 * (m + n + 1) ** 2));
  for (let i = 0; i < m; i++) {
    for (let j = 0; j < n; j++) {
      setEntry(out, left.cols[i], right.cols[j], {
        re: fixedInterval(product.re[i * n + j], radius, exponent),
        im: fixedInterval(product.im[i * n + j], radius, exponent),
      });
    }
  }
}

/**
 * The polar factor by Newton–Schulz steps U ← U(1 − D/2), D = U*U − 1. Exact steps keep it; each of k rounded ones moves U by
 * less than 3m units (Frobenius) and its polar factor by less than twice that (R.-C. Li, SIAM J. Matrix Anal. Appl. 16 (1995),
 * singular values being above 1/2). At the end U itself is within ‖D‖ of its polar factor.
 */
function polarFactor(start: FixedMatrix): { matrix: FixedMatrix; error: bigint } {
  const m = BigInt(start.rows);
  let matrix = start;
  for (let step = 0; ; step++) {
    const square = fixedProduct(fixedAdjoint(matrix), matrix);
    const defect = { ...square, re: square.re.map((x, k) => (k % (start.cols + 1) === 0 ? x - FIXED_ONE : x)) };
    const size = [...defect.re, ...defect.im].reduce((top, x) => (x > top ? x : -x > top ? -x : top), 0n);
    if (size === 0n && step === 0 && square.exact) return { matrix, error: 0n };
    if (size <= 8n * m || step === POLAR_STEPS) {
      return { matrix, error: 2n * m * (size + 2n) + 8n * m * BigInt(step + 1) };
    }
    const change = fixedProduct(matrix, defect);
    matrix = {
      ...matrix,
      re: matrix.re.map((x, k) => x - change.re[k] / 2n),
      im: matrix.im.map((x, k) => x - change.im[k] / 2n),
      exact: false,
    };
  }
}

/** Rows and columns joined by non-zero entries. */
function connectedParts(u: ComplexMatrix): { rows: number[]; cols: number[] }[] {
  const n = u.rows;
  const joined = (i: number, j: number) => u.re[i * n + j] !== 0 || u.im[i * n + j] !== 0;
  const rowSeen = new Uint8Array(n);
  const colSeen = new Uint8Array(n);
  const parts: { rows: number[]; cols: number[] }[] = [];
  for (let start = 0; start < n; start++) {
    if (rowSeen[start]) continue;
    rowSeen[start] = 1;
    const rows = [start];
    const cols: number[] = [];
    for (const i of rows) {
      for (let j = 0; j < n; j++) {
        if (colSeen[j] || !joined(i, j)) continue;
        colSeen[j] = 1;
        cols.push(j);
        for (let k = 0; k < n; k++) {
          if (rowSeen[k] || !joined(k, j)) continue;
          rowSeen[k] = 1;
          rows.push(k);
        }
      }
    }
    parts.push({ rows, cols });
  }
  return parts;
}

function largestPart(x: ComplexMatrix): number {
  let top = 0;
  for (let k = 0; k < x.re.length; k++) top = Math.max(top, Math.abs(x.re[k]), Math.abs(x.im[k]));
  return top;
}
