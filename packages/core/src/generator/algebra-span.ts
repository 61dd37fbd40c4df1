import { norm } from '../linalg/real-vector.js';
import { type BlockAlgebra, fromCoordinates, offBlockResidual, toCoordinates } from '../algebra/block-algebra.js';
import { ThalwegError } from '../errors.js';
import { type ComplexMatrix, frobeniusNorm, identity, multiply, scale } from '../linalg/complex-matrix.js';
import { ALGEBRA_TOLERANCE } from '../tolerances.js';

/**
 * An orthonormal basis (coordinates in the Hermitian basis of M) of the Hermitian part of the complex span of the given
 * matrices, after checking that the span is a *-subalgebra with 1. Throws `not-an-algebra` naming what fails.
 */
export function algebraSpan(
  algebra: BlockAlgebra,
  matrices: readonly ComplexMatrix[],
  pointer: string,
): Float64Array[] {
  matrices.forEach((a, k) => requireInside(algebra, a, `${pointer}/${k}`));
  const basis: Float64Array[] = [];
  for (const a of matrices) {
    // Re and Im of A span the same as A and A* do; whether A* was in the span is checked by counting below.
    extend(basis, toCoordinates(algebra, a));
    extend(basis, toCoordinates(algebra, scale(a, 0, -1)));
  }
  if (basis.length > complexRank(matrices)) {
    fail(pointer, 'to contain the adjoint of each of its elements', 'give A* with every A');
  }
  if (!inSpan(basis, toCoordinates(algebra, identity(algebra.size)))) {
    fail(pointer, 'to contain the identity', 'add the identity matrix');
  }
  const elements = basis.map((x) => fromCoordinates(algebra, x));
  elements.forEach((a, i) =>
    elements.forEach((b, j) => {
      // ba = (ab)* for Hermitian a, b, so half of the products suffice.
      if (j < i) return;
      const product = multiply(a, b);
      const parts = [product, scale(product, 0, -1)].map((x) => toCoordinates(algebra, x));
      if (parts.every((x) => inSpan(basis, x))) return;
      fail(pointer, 'to contain all products of its elements', 'add the missing products');
    }),
  );
  return basis;
}

function requireInside(algebra: BlockAlgebra, a: ComplexMatrix, pointer: string): void {
  const off = offBlockResidual(algebra, a);
  if (off <= ALGEBRA_TOLERANCE * frobeniusNorm(a)) return;
  throw new ThalwegError(
    'dimension-mismatch',
    `expected a matrix inside the blocks [${algebra.blocks.join(', ')}], got an entry of modulus ${off.toPrecision(3)} outside them`,
    { pointer, details: { residual: off } },
  );
}

function fail(pointer: string, expected: string, advice: string): never {
  throw new ThalwegError('not-an-algebra', `expected the span ${expected}, got one that does not; ${advice}`, {
    pointer,
  });
}

/** Append the normalised part of x orthogonal to the basis, unless it is negligible. */
function extend(basis: Float64Array[], x: Float64Array): void {
  const size = norm(x);
  const rest = remainder(basis, x);
  const left = norm(rest);
  if (left > ALGEBRA_TOLERANCE * size) basis.push(rest.map((v) => v / left));
}

function inSpan(basis: readonly Float64Array[], x: Float64Array): boolean {
  const size = norm(x);
  return norm(remainder(basis, x)) <= ALGEBRA_TOLERANCE * Math.max(size, 1 / Math.sqrt(x.length));
}

/** x minus its projection on the span, orthogonalised twice. */
function remainder(basis: readonly Float64Array[], x: Float64Array): Float64Array {
  const rest = x.slice();
  for (let pass = 0; pass < 2; pass++) {
    for (const b of basis) {
      let dot = 0;
      for (let k = 0; k < b.length; k++) dot += b[k] * rest[k];
      for (let k = 0; k < b.length; k++) rest[k] -= dot * b[k];
    }
  }
  return rest;
}

/** Dimension over the complex numbers of the span of the matrices. */
function complexRank(matrices: readonly ComplexMatrix[]): number {
  // A complex vector z spans (over C) what (Re z, Im z) and (−Im z, Re z) span over R, twice the dimension.
  const basis: Float64Array[] = [];
  for (const a of matrices) {
    extend(basis, stacked(a));
    extend(basis, stacked(scale(a, 0, 1)));
  }
  return basis.length / 2;
}

function stacked(a: ComplexMatrix): Float64Array {
  const x = new Float64Array(2 * a.re.length);
  x.set(a.re);
  x.set(a.im, a.re.length);
  return x;
}
