import { RATIONAL_ZERO, type Rational } from '../checker/arithmetic/rational.js';
import { connectedRows } from '../checker/form-blocks.js';
import type { LiftForm } from '../checker/lift-form.js';
import type { Complex } from '../checker/ring.js';
import { frobeniusNorm, zeros } from '../linalg/complex-matrix.js';
import { hermitianEigen } from '../linalg/hermitian-eigen.js';
import { guessRational } from './rational-guess.js';

/** A vector over the rows of a form. */
export type RationalVector = ReadonlyMap<number, { readonly re: Rational; readonly im: Rational }>;

/** Eigenvalues below this, relative to the scaled form, span its kernel: the solver stops short of the boundary by about 1e-5. */
const KERNEL_TOLERANCE = 1e-3;
const ENTRY_DENOMINATOR = 60;
const ENTRY_TOLERANCE = 2e-4;

/**
 * The kernel of a nearly singular form as rational vectors: in each block the eigenvectors of almost zero eigenvalue, brought to
 * reduced echelon form and rounded. Null when entries do not stand for simple fractions.
 */
export function rationalKernel({ rows, weights }: LiftForm<Complex>): RationalVector[] | null {
  const out: RationalVector[] = [];
  for (const block of connectedRows(rows)) {
    const n = block.length;
    const matrix = zeros(n);
    const place = new Map(block.map((row, k) => [row, k]));
    block.forEach((row, i) => {
      for (const [column, x] of rows[row]) {
        const j = place.get(column) as number;
        const scale = 1 / Math.sqrt(weights[row].re * weights[column].re);
        matrix.re[i * n + j] = x.re * scale;
        matrix.im[i * n + j] = x.im * scale;
      }
    });
    const { values, vectors } = hermitianEigen(matrix);
    const limit = (KERNEL_TOLERANCE * frobeniusNorm(matrix)) / Math.sqrt(n);
    const count = values.filter((x) => x <= limit).length;
    const basis = Array.from({ length: count }, (_, c) =>
      block.map((row, i): Complex => {
        const scale = 1 / Math.sqrt(weights[row].re);
        return { re: vectors.re[i * n + c] * scale, im: vectors.im[i * n + c] * scale };
      }),
    );
    for (const vector of reduced(basis)) {
      const rounded = new Map<number, { re: Rational; im: Rational }>();
      for (let i = 0; i < n; i++) {
        const re = guessRational(vector[i].re, ENTRY_DENOMINATOR, ENTRY_TOLERANCE);
        const im = guessRational(vector[i].im, ENTRY_DENOMINATOR, ENTRY_TOLERANCE);
        if (!re || !im) return null;
        if (re !== RATIONAL_ZERO || im !== RATIONAL_ZERO) rounded.set(block[i], { re, im });
      }
      out.push(rounded);
    }
  }
  return out;
}

/** Reduced echelon form, pivots by size. */
function reduced(basis: Complex[][]): Complex[][] {
  basis.forEach((row, r) => {
    let pivot = 0;
    for (let i = 1; i < row.length; i++) if (modulus(row[i]) > 1.0001 * modulus(row[pivot])) pivot = i;
    const p = row[pivot];
    const size = modulus(p) ** 2;
    basis[r] = row.map((x) => times(x, { re: p.re / size, im: -p.im / size }));
    basis.forEach((other, s) => {
      if (s === r) return;
      const factor = other[pivot];
      basis[s] = other.map((x, i) => minus(x, times(factor, basis[r][i])));
    });
  });
  return basis;
}

function modulus({ re, im }: Complex): number {
  return Math.hypot(re, im);
}

function times(x: Complex, y: Complex): Complex {
  return { re: x.re * y.re - x.im * y.im, im: x.re * y.im + x.im * y.re };
}

function minus(x: Complex, y: Complex): Complex {
  return { re: x.re - y.re, im: x.im - y.im };
}
