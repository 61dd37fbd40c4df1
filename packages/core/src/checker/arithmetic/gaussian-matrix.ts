import { ThalwegError } from '../../errors.js';
import type { ComplexMatrix } from '../../linalg/complex-matrix.js';
import {
  GAUSSIAN_ONE,
  GAUSSIAN_ZERO,
  type GaussianRational,
  addGaussian,
  conjugateGaussian,
  equalGaussian,
  gaussianFromDoubles,
  isZeroGaussian,
  multiplyGaussian,
  subtractGaussian,
} from './gaussian-rational.js';

/** A rows × cols matrix of Gaussian rationals, row-major. */
export interface GaussianMatrix {
  readonly rows: number;
  readonly cols: number;
  readonly entries: readonly GaussianRational[];
}

/** The matrix with the given entries; throws `dimension-mismatch` for a wrong count. */
export function gaussianMatrix(rows: number, cols: number, entries: readonly GaussianRational[]): GaussianMatrix {
  if (entries.length !== rows * cols) {
    throw new ThalwegError(
      'dimension-mismatch',
      `expected ${rows * cols} entries for a ${rows} × ${cols} matrix, got ${entries.length}`,
    );
  }
  return { rows, cols, entries };
}

export function gaussianZeros(rows: number, cols: number = rows): GaussianMatrix {
  return { rows, cols, entries: new Array<GaussianRational>(rows * cols).fill(GAUSSIAN_ZERO) };
}

export function gaussianIdentity(n: number): GaussianMatrix {
  return gaussianFromEntries(n, n, (i, j) => (i === j ? GAUSSIAN_ONE : GAUSSIAN_ZERO));
}

/** The matrix with entry(i, j). */
export function gaussianFromEntries(
  rows: number,
  cols: number,
  entry: (i: number, j: number) => GaussianRational,
): GaussianMatrix {
  return { rows, cols, entries: Array.from({ length: rows * cols }, (_, k) => entry(Math.floor(k / cols), k % cols)) };
}

/** The exact value of a matrix of finite doubles. */
export function gaussianFromMatrix(a: ComplexMatrix): GaussianMatrix {
  return gaussianFromEntries(a.rows, a.cols, (i, j) => gaussianFromDoubles(a.re[i * a.cols + j], a.im[i * a.cols + j]));
}

export function addGaussianMatrix(a: GaussianMatrix, b: GaussianMatrix): GaussianMatrix {
  requireSameShape(a, b);
  return { ...a, entries: a.entries.map((x, k) => addGaussian(x, b.entries[k])) };
}

export function subtractGaussianMatrix(a: GaussianMatrix, b: GaussianMatrix): GaussianMatrix {
  requireSameShape(a, b);
  return { ...a, entries: a.entries.map((x, k) => subtractGaussian(x, b.entries[k])) };
}

export function scaleGaussianMatrix(a: GaussianMatrix, factor: GaussianRational): GaussianMatrix {
  return { ...a, entries: a.entries.map((x) => multiplyGaussian(x, factor)) };
}

/** AB; throws `dimension-mismatch` when the inner sides differ. */
export function multiplyGaussianMatrix(a: GaussianMatrix, b: GaussianMatrix): GaussianMatrix {
  if (a.cols !== b.rows) {
    throw new ThalwegError('dimension-mismatch', `expected equal inner sides, got ${a.cols} and ${b.rows}`);
  }
  const entries = new Array<GaussianRational>(a.rows * b.cols).fill(GAUSSIAN_ZERO);
  for (let i = 0; i < a.rows; i++) {
    for (let k = 0; k < a.cols; k++) {
      const x = a.entries[i * a.cols + k];
      if (isZeroGaussian(x)) continue;
      for (let j = 0; j < b.cols; j++) {
        const y = b.entries[k * b.cols + j];
        if (isZeroGaussian(y)) continue;
        entries[i * b.cols + j] = addGaussian(entries[i * b.cols + j], multiplyGaussian(x, y));
      }
    }
  }
  return { rows: a.rows, cols: b.cols, entries };
}

export function adjointGaussianMatrix(a: GaussianMatrix): GaussianMatrix {
  return gaussianFromEntries(a.cols, a.rows, (i, j) => conjugateGaussian(a.entries[j * a.cols + i]));
}

export function equalGaussianMatrix(a: GaussianMatrix, b: GaussianMatrix): boolean {
  return a.rows === b.rows && a.cols === b.cols && a.entries.every((x, k) => equalGaussian(x, b.entries[k]));
}

export function isHermitianGaussian(a: GaussianMatrix): boolean {
  return equalGaussianMatrix(a, adjointGaussianMatrix(a));
}

function requireSameShape(a: GaussianMatrix, b: GaussianMatrix): void {
  if (a.rows !== b.rows || a.cols !== b.cols) {
    throw new ThalwegError(
      'dimension-mismatch',
      `expected matrices of one shape, got ${a.rows} × ${a.cols} and ${b.rows} × ${b.cols}`,
    );
  }
}
