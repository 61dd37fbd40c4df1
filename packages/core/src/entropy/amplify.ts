import { type BlockAlgebra, blockAlgebra } from '../algebra/block-algebra.js';
import { type ComplexMatrix, adjoint, zeros } from '../linalg/complex-matrix.js';

/** M ⊗ M_k: block b has side n_b·k; an N·k × N·k matrix has row index i·k + c, i of M and c of M_k. */
export function amplifiedAlgebra(algebra: BlockAlgebra, k: number): BlockAlgebra {
  return k === 1 ? algebra : blockAlgebra(algebra.blocks.map((n) => n * k));
}

/** (f ⊗ id)(A) for a map f of N×N matrices with f(A*) = f(A)*, and Hermitian A of side N·k. */
export function amplifyMap(
  f: (a: ComplexMatrix) => ComplexMatrix,
  size: number,
  k: number,
  a: ComplexMatrix,
): ComplexMatrix {
  if (k === 1) return f(a);
  const out = zeros(size * k);
  for (let c = 0; c < k; c++) {
    for (let d = c; d < k; d++) {
      const image = f(slice(a, size, k, c, d));
      place(out, image, size, k, c, d);
      if (c !== d) place(out, adjoint(image), size, k, d, c);
    }
  }
  return out;
}

/** A ⊗ 1_k for N×N A. */
export function amplifyOperator(a: ComplexMatrix, k: number): ComplexMatrix {
  if (k === 1) return a;
  const out = zeros(a.rows * k);
  for (let c = 0; c < k; c++) place(out, a, a.rows, k, c, c);
  return out;
}

/** The k×k partial trace over the first factor of an N·k × N·k matrix. */
export function ancillaTrace(a: ComplexMatrix, size: number, k: number): ComplexMatrix {
  const out = zeros(k);
  const width = size * k;
  for (let i = 0; i < size; i++) {
    for (let c = 0; c < k; c++) {
      for (let d = 0; d < k; d++) {
        out.re[c * k + d] += a.re[(i * k + c) * width + i * k + d];
        out.im[c * k + d] += a.im[(i * k + c) * width + i * k + d];
      }
    }
  }
  return out;
}

/** The N×N part of A that stands beside e_cd. */
function slice(a: ComplexMatrix, size: number, k: number, c: number, d: number): ComplexMatrix {
  const out = zeros(size);
  const width = size * k;
  for (let i = 0; i < size; i++) {
    for (let j = 0; j < size; j++) {
      out.re[i * size + j] = a.re[(i * k + c) * width + j * k + d];
      out.im[i * size + j] = a.im[(i * k + c) * width + j * k + d];
    }
  }
  return out;
}

function place(out: ComplexMatrix, a: ComplexMatrix, size: number, k: number, c: number, d: number): void {
  const width = size * k;
  for (let i = 0; i < size; i++) {
    for (let j = 0; j < size; j++) {
      out.re[(i * k + c) * width + j * k + d] = a.re[i * size + j];
      out.im[(i * k + c) * width + j * k + d] = a.im[i * size + j];
    }
  }
}
