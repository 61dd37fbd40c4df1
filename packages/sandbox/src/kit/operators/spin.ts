import { add, adjoint, scale, subtract } from '../matrix/arithmetic.js';
import { fromTriplets, SIDE_LIMIT, type Entry, type Matrix } from '../matrix/matrix.js';
import { requireWhole } from '../require.js';

/** S_z of spin s = ½, 1, 3/2, …: diag(s, s−1, …, −s). */
export function spinZ(s: number): Matrix {
  const n = dimension(s);
  return fromTriplets(
    n,
    n,
    Array.from({ length: n }, (_, k): Entry => [k, k, s - k, 0]),
  );
}

/** S_+ of spin s, highest weight first: entries √(s(s+1) − m(m+1)) above the diagonal. */
export function spinRaising(s: number): Matrix {
  const n = dimension(s);
  const triplets = Array.from({ length: n - 1 }, (_, k): Entry => {
    const m = s - k - 1;
    return [k, k + 1, Math.sqrt(s * (s + 1) - m * (m + 1)), 0];
  });
  return fromTriplets(n, n, triplets);
}

/** S_−, the adjoint of S_+. */
export function spinLowering(s: number): Matrix {
  return adjoint(spinRaising(s));
}

/** S_x = (S_+ + S_−)/2. */
export function spinX(s: number): Matrix {
  return scale(0.5, add(spinRaising(s), spinLowering(s)));
}

/** S_y = (S_+ − S_−)/2i. */
export function spinY(s: number): Matrix {
  return scale({ re: 0, im: -0.5 }, subtract(spinRaising(s), spinLowering(s)));
}

function dimension(s: number): number {
  requireWhole(2 * s, 1, SIDE_LIMIT - 1, 'twice the spin');
  return 2 * s + 1;
}
