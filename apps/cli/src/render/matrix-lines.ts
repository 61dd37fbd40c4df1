import type { MatrixDocument } from '@thalweg/format';
import { decimalColumn } from './decimal-column.js';
import { listNumber, scaleOf } from './number-text.js';

/** Entries off the diagonal, and imaginary parts, below this part of the largest are shown as 0. */
const NOISE = 1e-9;

/** Larger matrices are left to the JSON document. */
const LARGEST_SHOWN = 6;

type Rows = readonly (readonly number[])[];

/** The rows of a small matrix, decimal points below each other; null for one too large, too wide or written otherwise. */
export function matrixLines(matrix: MatrixDocument, width: number, indent: number): string[] | null {
  const parts = Array.isArray(matrix) ? { re: matrix as Rows, im: null } : 're' in matrix ? partsOf(matrix) : null;
  if (parts === null || parts.re.length > LARGEST_SHOWN) return null;
  const { re, im } = parts;
  const scale = scaleOf([...re.flat(), ...(im ?? []).flat()]);
  const columns = (re[0] ?? []).map((_, j) =>
    columnTexts(
      re.map((row, i) => listNumber(row[j] ?? 0, scale, i === j ? undefined : NOISE)),
      re.map((_row, i) => im?.[i]?.[j] ?? 0),
      scale,
    ),
  );
  const lines = re.map((_, i) => ' '.repeat(indent) + columns.map((column) => column[i] ?? '').join('   '));
  return lines.every((line) => line.length <= width) ? lines.map((line) => line.trimEnd()) : null;
}

function partsOf({ re, im }: { readonly re: Rows; readonly im?: Rows | undefined }): { re: Rows; im: Rows | null } {
  return { re, im: im ?? null };
}

function columnTexts(re: readonly string[], im: readonly number[], scale: number): string[] {
  const real = decimalColumn(re);
  const size = im.map((y) => listNumber(Math.abs(y), scale, NOISE));
  if (size.every((text) => text === '0')) return real;
  const imaginary = decimalColumn(size.map((text) => (text === '0' ? '' : text)));
  return real.map((text, i) => {
    const y = imaginary[i] ?? '';
    return y.trim() === '' ? `${text}   ${y} ` : `${text} ${(im[i] ?? 0) < 0 ? '−' : '+'} ${y}i`;
  });
}
