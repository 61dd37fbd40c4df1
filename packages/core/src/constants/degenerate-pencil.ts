import {
  type ComplexMatrix,
  addScaledInto,
  frobeniusNorm,
  hermitianPart,
  multiply,
  multiplyAdjointFirst,
  zeros,
} from '../linalg/complex-matrix.js';
import { hermitianEigen } from '../linalg/hermitian-eigen.js';
import { hermitianPencil } from '../linalg/hermitian-pencil.js';
import { EPSILON, KERNEL_GAP, KERNEL_TOLERANCE } from '../tolerances.js';

/** Largest κ with X − κY ⪰ 0 for Hermitian X and Y ⪰ 0 that may be singular. */
export interface DegeneratePencil {
  /** −∞ when X is negative, or has a cross term that cannot be balanced, on ker Y; +∞ when Y = 0 and X ⪰ 0. */
  readonly value: number;
  /** A vector at which the bound is attained, or that shows it is −∞. */
  readonly vector: ComplexMatrix;
  /** Bound, up to a modest factor, on the floating-point error of `value`. */
  readonly margin: number;
  /** Smallest eigenvalue of Y kept and largest dropped, relative to the largest: the decision on ker Y. */
  readonly kept: number;
  readonly dropped: number;
  /** False when an eigenvalue of Y or of X on ker Y falls where zero and non-zero cannot be told apart. */
  readonly decided: boolean;
}

/**
 * Solve by the Schur complement on ker Y. With X = [[P, C],[C*, Z]] over ran Y ⊕ ker Y: −∞ if Z has a negative
 * eigenvalue or C* reaches ker Z; otherwise the smallest eigenvalue of (P − C Z⁺ C*, Y restricted to its range).
 */
export function degeneratePencil(x: ComplexMatrix, y: ComplexMatrix, scale = frobeniusNorm(x)): DegeneratePencil {
  const n = x.rows;
  const eigenY = hermitianEigen(y);
  const top = Math.max(n > 0 ? eigenY.values[n - 1] : 0, 0);
  let kernel = 0;
  while (kernel < n && eigenY.values[kernel] <= KERNEL_TOLERANCE * top) kernel++;
  if (top === 0) kernel = n;
  const kept = kernel < n ? eigenY.values[kernel] / top : 0;
  const dropped = kernel > 0 && top > 0 ? Math.abs(eigenY.values[kernel - 1]) / top : 0;
  const range = columns(eigenY.vectors, kernel, n);
  const nullBasis = columns(eigenY.vectors, 0, kernel);
  const xRange = multiply(x, range);
  const p = multiplyAdjointFirst(range, xRange);
  const settled = { kept, dropped, decided: kernel === n || kept >= KERNEL_GAP };
  const rounding = 8 * n * EPSILON * scale;
  let reduced = p;
  let lift = zeros(0, n - kernel);
  if (kernel > 0) {
    const onKernel = kernelPart(x, xRange, nullBasis, scale);
    if (onKernel.direction) {
      return {
        value: -Infinity,
        vector: onKernel.direction,
        margin: 0,
        ...settled,
        decided: settled.decided && onKernel.decided,
      };
    }
    reduced = p;
    addScaledInto(reduced, multiplyAdjointFirst(onKernel.cross, onKernel.solved), -1);
    lift = onKernel.solved;
    settled.decided &&= onKernel.decided;
  }
  if (kernel === n) return { value: Infinity, vector: zeros(n, 1), margin: 0, ...settled };
  const yRange = zeros(n - kernel);
  for (let i = 0; i < n - kernel; i++) yRange.re[i * (n - kernel) + i] = eigenY.values[kernel + i];
  const { values, vectors } = hermitianPencil(hermitianPart(reduced), yRange);
  const c = columns(vectors, 0, 1);
  const vector = multiply(range, c);
  if (kernel > 0) addScaledInto(vector, multiply(nullBasis, multiply(lift, c)), -1);
  return {
    value: values[0],
    vector,
    margin: rounding / (kept * top) + 8 * n * EPSILON * Math.abs(values[0]),
    ...settled,
  };
}

interface KernelPart {
  /** C* between ker Y and ran Y. */
  readonly cross: ComplexMatrix;
  /** Z⁺C*. */
  readonly solved: ComplexMatrix;
  readonly direction: ComplexMatrix | null;
  readonly decided: boolean;
}

function kernelPart(x: ComplexMatrix, xRange: ComplexMatrix, nullBasis: ComplexMatrix, scale: number): KernelPart {
  const cross = multiplyAdjointFirst(nullBasis, xRange);
  const z = hermitianPart(multiplyAdjointFirst(nullBasis, multiply(x, nullBasis)));
  const eigen = hermitianEigen(z);
  const m = z.rows;
  const none = zeros(m, cross.cols);
  if (eigen.values[0] < -KERNEL_TOLERANCE * scale) {
    return {
      cross,
      solved: none,
      direction: multiply(nullBasis, columns(eigen.vectors, 0, 1)),
      decided: eigen.values[0] < -KERNEL_GAP * scale,
    };
  }
  let zero = 0;
  while (zero < m && eigen.values[zero] <= KERNEL_TOLERANCE * scale) zero++;
  let decided = zero === m || eigen.values[zero] >= KERNEL_GAP * scale;
  const coordinates = multiplyAdjointFirst(eigen.vectors, cross);
  for (let i = 0; i < zero; i++) {
    const size = rowNorm(coordinates, i);
    if (size > Math.sqrt(KERNEL_TOLERANCE) * scale) {
      return { cross, solved: none, direction: multiply(nullBasis, columns(eigen.vectors, i, i + 1)), decided };
    }
    if (size > 1e3 * KERNEL_TOLERANCE * scale) decided = false;
  }
  for (let i = 0; i < m; i++) {
    const factor = i < zero ? 0 : 1 / eigen.values[i];
    for (let j = 0; j < cross.cols; j++) {
      coordinates.re[i * cross.cols + j] *= factor;
      coordinates.im[i * cross.cols + j] *= factor;
    }
  }
  return { cross, solved: multiply(eigen.vectors, coordinates), direction: null, decided };
}

function columns(a: ComplexMatrix, from: number, to: number): ComplexMatrix {
  const out = zeros(a.rows, to - from);
  for (let i = 0; i < a.rows; i++) {
    for (let j = from; j < to; j++) {
      out.re[i * (to - from) + j - from] = a.re[i * a.cols + j];
      out.im[i * (to - from) + j - from] = a.im[i * a.cols + j];
    }
  }
  return out;
}

function rowNorm(a: ComplexMatrix, i: number): number {
  let sum = 0;
  for (let j = 0; j < a.cols; j++) sum += a.re[i * a.cols + j] ** 2 + a.im[i * a.cols + j] ** 2;
  return Math.sqrt(sum);
}
