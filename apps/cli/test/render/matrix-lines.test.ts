import { expect, test } from 'vitest';
import { matrixLines } from '../../src/render/matrix-lines.js';

test('a real matrix, decimal points below each other', () => {
  expect(matrixLines([[0.5, -0.25], [-0.25, 12.5]], 80, 2)).toEqual(['   0.50000   −0.25000', '  −0.25000   12.50000']); // prettier-ignore
});

test('imaginary parts only where there are any, without the noise of rounding', () => {
  const re = [[0.75, 1e-12], [1e-12, 0.25]]; // prettier-ignore
  expect(matrixLines({ re, im: [[0, -1e-12], [1e-12, 0]] }, 80, 2)).toEqual(['  0.750000   0', '  0          0.250000']); // prettier-ignore
  expect(matrixLines({ re, im: [[0, -0.1], [0.1, 0]] }, 80, 2)).toEqual([
    '  0.750000               0        − 0.100000i',
    '  0        + 0.100000i   0.250000',
  ]); // prettier-ignore
});

test('a small eigenvalue on the diagonal is not shown as zero', () => {
  expect(matrixLines([[1, 0], [0, 3e-10]], 80, 0)).toEqual(['1.000000   0', '0          3.0e−10']); // prettier-ignore
});

test('what is too large, too wide, or written otherwise is left out', () => {
  expect(
    matrixLines(
      Array.from({ length: 7 }, () => Array<number>(7).fill(1)),
      80,
      0,
    ),
  ).toBeNull();
  expect(matrixLines([[1, 1], [1, 1]], 15, 0)).toBeNull(); // prettier-ignore
  expect(matrixLines({ pauli: 'X' }, 80, 0)).toBeNull();
});
