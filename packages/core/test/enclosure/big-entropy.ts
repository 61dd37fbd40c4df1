import {
  type BigFloat,
  big,
  bigExp,
  bigLog,
  bigSqrt,
  minus,
  over,
  plus,
  times,
} from '../checker/arithmetic/big-float.js';
import { bigAdjoint, bigDiagonal, bigMatrix, bigMultiply, bigPolar } from '../checker/arithmetic/big-matrix.js';
import { type ComplexMatrix, identity, kronecker } from '../../src/linalg/complex-matrix.js';

/** A generator in canonical form with its state, all doubles exact. */
export interface BigModel {
  readonly jumps: readonly { readonly matrix: ComplexMatrix; readonly frequency: number }[];
  readonly sigma: ArrayLike<number>;
  readonly frame: ComplexMatrix | null;
}

/** ρ = Ũ diag(λ) Ũ* on M ⊗ M_k. */
export interface BigState {
  readonly lambda: ArrayLike<number>;
  readonly u: ComplexMatrix;
  readonly k: number;
}

/**
 * I(ρ)/(2D(ρ‖σ)) and 2E₂/D in 700 bits for k = 1, I and E₂ as the sums over jumps and eigenvectors, D = Tr ρ log ρ − Tr ρ log σ, σ and ρ
 * of trace one.
 */
export function bigEntropyQuotients(model: BigModel, state: BigState): { mlsi: BigFloat; lsi: BigFloat } {
  const n = state.lambda.length;
  const u = bigPolar(bigMatrix(state.u));
  const trace = sum(Array.from(state.lambda, big));
  const lambda = Array.from(state.lambda, (x) => over(big(x), trace));
  let production = big(0);
  let energy = big(0);
  for (const { matrix, frequency } of model.jumps) {
    const amplified = state.k === 1 ? matrix : kronecker(matrix, identity(state.k));
    const v = bigMultiply(bigAdjoint(u), bigMultiply(bigMatrix(amplified), u));
    for (let a = 0; a < n; a++) {
      for (let b = 0; b < n; b++) {
        const weight = plus(times(v.re[a * n + b], v.re[a * n + b]), times(v.im[a * n + b], v.im[a * n + b]));
        const x = times(bigExp(big(frequency / 2)), lambda[a]);
        const y = times(bigExp(big(-frequency / 2)), lambda[b]);
        const root = minus(bigSqrt(x), bigSqrt(y));
        production = plus(production, times(weight, times(minus(x, y), minus(bigLog(x), bigLog(y)))));
        energy = plus(energy, times(weight, times(root, root)));
      }
    }
  }
  const divergence = times(big(2), bigDivergence(model, lambda, u));
  return { mlsi: over(production, divergence), lsi: over(times(big(4), energy), divergence) };
}

function bigDivergence(
  { sigma, frame }: BigModel,
  lambda: readonly BigFloat[],
  u: ReturnType<typeof bigPolar>,
): BigFloat {
  const n = lambda.length;
  const w = frame ? bigPolar(bigMatrix(frame)) : bigDiagonal(lambda.map(() => big(1)));
  const overlaps = bigMultiply(bigAdjoint(u), w);
  const trace = sum(Array.from(sigma, big));
  const logs = Array.from(sigma, (x) => bigLog(over(big(x), trace)));
  let total = sum(lambda.map((x) => times(x, bigLog(x))));
  for (let a = 0; a < n; a++) {
    for (let b = 0; b < n; b++) {
      const { re, im } = overlaps;
      const weight = plus(times(re[a * n + b], re[a * n + b]), times(im[a * n + b], im[a * n + b]));
      total = minus(total, times(weight, times(lambda[a], logs[b])));
    }
  }
  return total;
}

/**
 * I(ρ)/(2D(ρ‖diag ρ)) in 700 bits for jumps that are diagonal matrices, whose fixed points are the diagonal ones: D is the entropy of
 * the diagonal less that of ρ.
 */
export function bigDephasingQuotient(model: Pick<BigModel, 'jumps'>, state: BigState): BigFloat {
  const n = state.lambda.length;
  const { mlsi } = bigEntropyQuotients({ ...model, sigma: Array.from({ length: n }, () => 1), frame: null }, state);
  const u = bigPolar(bigMatrix(state.u));
  const trace = sum(Array.from(state.lambda, big));
  const lambda = Array.from(state.lambda, (x) => over(big(x), trace));
  const diagonal = lambda.map((_, i) =>
    sum(
      lambda.map((x, a) => {
        const k = i * n + a;
        return times(x, plus(times(u.re[k], u.re[k]), times(u.im[k], u.im[k])));
      }),
    ),
  );
  const negentropy = (list: readonly BigFloat[]) => sum(list.map((x) => times(x, bigLog(x))));
  const toMixed = plus(negentropy(lambda), bigLog(big(n)));
  const toDiagonal = minus(negentropy(lambda), negentropy(diagonal));
  return over(times(mlsi, toMixed), toDiagonal);
}

function sum(values: readonly BigFloat[]): BigFloat {
  return values.reduce(plus, big(0));
}
