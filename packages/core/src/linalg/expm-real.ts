import { solveReal } from './lu-real.js';
import { multiplyReal, oneNormReal } from './real-matrix.js';
import { requireFinite, requireLength } from './shape-checks.js';

/** Coefficients of the diagonal Padé numerator of degree 13, and the one-norm up to which it is accurate to rounding. */
const PADE_13 = [
  64764752532480000, 32382376266240000, 7771770303897600, 1187353796428800, 129060195264000, 10559470521600,
  670442572800, 33522128640, 1323241920, 40840800, 960960, 16380, 182, 1,
];
const PADE_13_NORM = 5.371920351148152;

/**
 * e^a of a real n × n matrix by scaling and squaring with the Padé approximant of degree 13 (Higham, SIAM J. Matrix Anal.
 * Appl. 26 (2005), Algorithm 2.3). Throws `dimension-mismatch`, `not-finite`.
 */
export function expmReal(a: Float64Array, n: number): Float64Array {
  requireLength(a, n * n);
  requireFinite(a);
  const norm = oneNormReal(a, n, n);
  const squarings = norm > PADE_13_NORM ? Math.ceil(Math.log2(norm / PADE_13_NORM)) : 0;
  const scaled = a.map((x) => x / 2 ** squarings);
  let e = pade13(scaled, n);
  for (let i = 0; i < squarings; i++) e = multiplyReal(e, e, n, n, n);
  requireFinite(e);
  return e;
}

/** (V − U)⁻¹ (V + U), U odd and V even in a. */
function pade13(a: Float64Array, n: number): Float64Array {
  const product = (x: Float64Array, y: Float64Array): Float64Array => multiplyReal(x, y, n, n, n);
  const b = PADE_13;
  const a2 = product(a, a);
  const a4 = product(a2, a2);
  const a6 = product(a4, a2);
  const sum = (c6: number, c4: number, c2: number, c0: number): Float64Array => {
    const s = new Float64Array(n * n);
    for (let k = 0; k < n * n; k++) s[k] = c6 * a6[k] + c4 * a4[k] + c2 * a2[k];
    for (let i = 0; i < n; i++) s[i * n + i] += c0;
    return s;
  };
  const high = (c12: number, c10: number, c8: number): Float64Array => product(a6, sum(c12, c10, c8, 0));
  const odd = sum(b[7], b[5], b[3], b[1]);
  const even = sum(b[6], b[4], b[2], b[0]);
  high(b[13], b[11], b[9]).forEach((x, k) => (odd[k] += x));
  high(b[12], b[10], b[8]).forEach((x, k) => (even[k] += x));
  const u = product(a, odd);
  return solveReal(
    even.map((x, k) => x - u[k]),
    n,
    even.map((x, k) => x + u[k]),
    n,
  );
}
