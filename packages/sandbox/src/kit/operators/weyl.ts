import { rootOfUnity } from '../functions/root-of-unity.js';
import { fromTriplets, SIDE_LIMIT, type Entry, type Matrix } from '../matrix/matrix.js';
import { requireWhole } from '../require.js';

/** X^a Z^b on C^n with X e_j = e_{j+1}, Z e_j = e^{2πij/n} e_j; a and b modulo n. */
export function weyl(n: number, a: number, b: number): Matrix {
  requireWhole(n, 1, SIDE_LIMIT, 'the dimension');
  requireWhole(a, -(2 ** 31), 2 ** 31, 'a');
  requireWhole(b, -(2 ** 31), 2 ** 31, 'b');
  const triplets = Array.from({ length: n }, (_, j): Entry => {
    const { re, im } = rootOfUnity(j * b, n);
    return [(((j + a) % n) + n) % n, j, re, im];
  });
  return fromTriplets(n, n, triplets);
}
