import { ThalwegError } from '../errors.js';
import { type SparseMatrix } from '../linalg/sparse-matrix.js';
import { INPUT_TOLERANCE } from '../tolerances.js';
import { type Programme, type ProgrammeBlock } from './programme.js';

/** Throws `dimension-mismatch`, `not-finite`, `not-hermitian` or `usage` unless the programme is well formed. */
export function checkProgramme({ objective, blocks }: Programme): void {
  for (let i = 0; i < objective.length; i++) {
    if (!Number.isFinite(objective[i])) {
      throw new ThalwegError('not-finite', `expected a finite objective coefficient ${i}, got ${objective[i]}`);
    }
  }
  blocks.forEach((block, k) => checkBlock(block, k, objective.length));
}

function checkBlock(block: ProgrammeBlock, k: number, unknowns: number): void {
  if (!Number.isInteger(block.size) || block.size < 0) {
    throw new ThalwegError('usage', `expected block ${k} to have an integer size ≥ 0, got ${block.size}`);
  }
  checkMatrix(block.constant, block, `the constant of block ${k}`);
  const seen = new Set<number>();
  for (const { unknown, matrix } of block.coefficients) {
    if (!Number.isInteger(unknown) || unknown < 0 || unknown >= unknowns || seen.has(unknown)) {
      throw new ThalwegError(
        'usage',
        `expected coefficients of distinct unknowns 0 … ${unknowns - 1} in block ${k}, got unknown ${unknown}` +
          (seen.has(unknown) ? ' twice; add the matrices' : ''),
      );
    }
    seen.add(unknown);
    checkMatrix(matrix, block, `coefficient ${unknown} of block ${k}`);
  }
}

function checkMatrix(a: SparseMatrix, { kind, size }: ProgrammeBlock, name: string): void {
  if (a.rows !== size || a.cols !== size) {
    throw new ThalwegError('dimension-mismatch', `expected ${name} to be ${size}×${size}, got ${a.rows}×${a.cols}`);
  }
  let top = 0;
  for (let p = 0; p < a.re.length; p++) {
    const modulus = Math.abs(a.re[p]) + Math.abs(a.im[p]);
    if (!Number.isFinite(modulus)) {
      throw new ThalwegError('not-finite', `expected finite entries in ${name}, got ${a.re[p]} + ${a.im[p]}i`);
    }
    top = Math.max(top, modulus);
  }
  for (let i = 0; i < size; i++) {
    for (let p = a.rowStart[i]; p < a.rowStart[i + 1]; p++) {
      const j = a.colIndex[p];
      if (kind === 'diagonal' && i !== j) {
        throw new ThalwegError('usage', `expected ${name} to be diagonal, got an entry at (${i}, ${j})`);
      }
      const other = position(a, j, i);
      const re = other < 0 ? 0 : a.re[other];
      const im = other < 0 ? 0 : a.im[other];
      const defect = Math.abs(a.re[p] - re) + Math.abs(a.im[p] + im) + (kind === 'hermitian' ? 0 : Math.abs(a.im[p]));
      if (defect > INPUT_TOLERANCE * top) {
        throw new ThalwegError(
          'not-hermitian',
          `expected ${name} to be ${kind === 'hermitian' ? 'Hermitian' : 'real symmetric'} with both triangles stored, ` +
            `got a defect of ${defect.toExponential(2)} at (${i}, ${j})`,
        );
      }
    }
  }
}

/** Where the entry (i, j) is stored, or −1. */
function position(a: SparseMatrix, i: number, j: number): number {
  let low = a.rowStart[i];
  let high = a.rowStart[i + 1] - 1;
  while (low <= high) {
    const middle = (low + high) >> 1;
    if (a.colIndex[middle] === j) return middle;
    if (a.colIndex[middle] < j) low = middle + 1;
    else high = middle - 1;
  }
  return -1;
}
