import type { CanonicalModel } from '../../../src/checker/arithmetic/quotient-enclosure.js';
import type { ComplexMatrix } from '../../../src/linalg/complex-matrix.js';
import { type BigFloat, big, bigExp, bigLog, bigSqrt, compare, minus, over, plus, times } from './big-float.js';
import {
  type BigMatrix,
  bigAdd,
  bigAdjoint,
  bigDiagonal,
  bigMatrix,
  bigMultiply,
  bigPolar,
  bigScale,
  bigSubtract,
} from './big-matrix.js';

type Mean = (x: BigFloat, y: BigFloat) => BigFloat;

const MEANS: Record<CanonicalModel['mean'], Mean> = {
  logarithmic: (x, y) => (near(x, y) ? x : over(minus(x, y), bigLog(over(x, y)))),
  arithmetic: (x, y) => over(plus(x, y), big(2)),
  geometric: (x, y) => bigSqrt(times(x, y)),
  harmonic: (x, y) => over(times(big(2), times(x, y)), plus(x, y)),
  left: (x) => x,
  right: (_x, y) => y,
};

/** Step, relative, of the difference that stands for a derivative: its error is far below any enclosure's width. */
const STEP: BigFloat = { m: 1n, e: -220 };

function near(x: BigFloat, y: BigFloat): boolean {
  return compare(x, y) === 0;
}

/**
 * q_ρ(A) and ‖A‖²_ρ from the definitions in 700 bits, at the exactly unitary polar factor of u. Where two eigenvalues meet
 * the derivative is a central difference with relative step 2^-220.
 */
export function bigQuotient(
  model: CanonicalModel,
  frame: { readonly lambda: readonly number[]; readonly u: ComplexMatrix | null },
  observable: ComplexMatrix,
): { metric: BigFloat; curvature: BigFloat } {
  const n = frame.lambda.length;
  const lambda = frame.lambda.map(big);
  const u = frame.u ? bigPolar(bigMatrix(frame.u)) : null;
  const turn = (x: ComplexMatrix) => (u ? bigMultiply(bigAdjoint(u), bigMultiply(bigMatrix(x), u)) : bigMatrix(x));
  const owner = model.blocks.flatMap((size, b) => new Array<number>(size).fill(b));
  const onBlocks = (x: BigMatrix): BigMatrix => {
    const keep = (v: BigFloat, k: number) => (owner[Math.floor(k / n)] === owner[k % n] ? v : big(0));
    return { n, re: x.re.map(keep), im: x.im.map(keep) };
  };
  const a = turn(observable);
  const rho = bigDiagonal(lambda);
  const jumps = model.jumps.map((jump) => ({ v: turn(jump.matrix), omega: jump.frequency }));
  let image = bigScale(rho, big(0));
  let flow = bigScale(rho, big(0));
  for (const { v, omega } of jumps) {
    const w = bigExp(big(-omega / 2));
    const adjoint = bigAdjoint(v);
    const square = bigMultiply(adjoint, v);
    image = bigAdd(image, bigScale(lindblad(bigMultiply(adjoint, bigMultiply(a, v)), square, a), w));
    flow = bigAdd(flow, bigScale(lindblad(bigMultiply(v, bigMultiply(rho, adjoint)), square, rho), w));
  }
  image = onBlocks(image);
  flow = onBlocks(flow);
  let metric = big(0);
  let curvature = big(0);
  for (const { v, omega } of jumps) {
    const up = bigExp(big(omega / 2));
    const down = bigExp(big(-omega / 2));
    const f = (x: BigFloat, y: BigFloat) => MEANS[model.mean](times(up, x), times(down, y));
    const x = commutator(v, a);
    const y = commutator(v, image);
    const d = derivative(f, lambda, flow, x);
    for (let k = 0; k < n * n; k++) {
      const value = f(lambda[Math.floor(k / n)], lambda[k % n]);
      metric = plus(metric, times(value, dot(x, x, k)));
      curvature = minus(curvature, times(value, dot(x, y, k)));
      curvature = plus(curvature, over(dot(x, d, k), big(2)));
    }
  }
  return { metric, curvature };
}

/** 2X − {S, A}. */
function lindblad(x: BigMatrix, s: BigMatrix, a: BigMatrix): BigMatrix {
  return bigSubtract(bigScale(x, big(2)), bigAdd(bigMultiply(s, a), bigMultiply(a, s)));
}

function commutator(v: BigMatrix, a: BigMatrix): BigMatrix {
  return bigSubtract(bigMultiply(v, a), bigMultiply(a, v));
}

/** Re(conj(X_k) Y_k). */
function dot(x: BigMatrix, y: BigMatrix, k: number): BigFloat {
  return plus(times(x.re[k], y.re[k]), times(x.im[k], y.im[k]));
}

/** D[ρ;η]X from its formula with divided differences. */
function derivative(f: Mean, lambda: readonly BigFloat[], eta: BigMatrix, x: BigMatrix): BigMatrix {
  const n = lambda.length;
  const quotient = (g: (x: BigFloat) => BigFloat, s: BigFloat, t: BigFloat): BigFloat => {
    if (!near(s, t)) return over(minus(g(s), g(t)), minus(s, t));
    const h = times(s, STEP);
    return over(minus(g(plus(s, h)), g(minus(s, h))), times(big(2), h));
  };
  const left = (a: number, c: number, b: number) => quotient((s) => f(s, lambda[b]), lambda[a], lambda[c]);
  const right = (a: number, c: number, b: number) => quotient((s) => f(lambda[a], s), lambda[c], lambda[b]);
  const out = bigScale(x, big(0));
  const push = (k: number, p: number, q: number, u: BigMatrix, v: BigMatrix, factor: BigFloat) => {
    out.re[k] = plus(out.re[k], times(factor, minus(times(u.re[p], v.re[q]), times(u.im[p], v.im[q]))));
    out.im[k] = plus(out.im[k], times(factor, plus(times(u.re[p], v.im[q]), times(u.im[p], v.re[q]))));
  };
  for (let a = 0; a < n; a++) {
    for (let b = 0; b < n; b++) {
      for (let c = 0; c < n; c++) {
        push(a * n + b, a * n + c, c * n + b, eta, x, left(a, c, b));
        push(a * n + b, a * n + c, c * n + b, x, eta, right(a, c, b));
      }
    }
  }
  return out;
}
