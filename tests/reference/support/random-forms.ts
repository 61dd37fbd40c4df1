import {
  type BlockAlgebra,
  type ComplexMatrix,
  type Random,
  add,
  adjoint,
  diagonal,
  directSum,
  fromEntries,
  hermitianExp,
  hermitianPart,
  identity,
  kronecker,
  multiply,
  multiplyAdjointFirst,
  multiplyAdjointSecond,
  projectToAlgebra,
  qrComplex,
  scale,
  subtract,
  trace,
  transpose,
} from '@thalweg/core';
import { type ModelDocument, encodeMatrix } from '@thalweg/format';

type Form<K extends string> = Extract<ModelDocument['generator'], { form: K }>;

function randomMatrix(random: Random, n: number): ComplexMatrix {
  return fromEntries(n, n, () => [random.normal(), random.normal()]);
}

/** A Hermitian element of the algebra. */
export function randomHermitian(random: Random, algebra: BlockAlgebra): ComplexMatrix {
  return projectToAlgebra(algebra, hermitianPart(randomMatrix(random, algebra.size)));
}

/** exp(0.7 G)/Tr for a Gaussian Hermitian G: eigenvalues some powers of e apart, none near zero. */
export function randomState(random: Random, algebra: BlockAlgebra): ComplexMatrix {
  const positive = hermitianExp(scale(randomHermitian(random, algebra), 0.7));
  return scale(positive, 1 / trace(positive).re);
}

/** A Hamiltonian, a jump in every block, and a jump each way between neighbouring blocks. */
export function lindbladForm(random: Random, algebra: BlockAlgebra): Form<'lindblad'> {
  return {
    form: 'lindblad',
    hamiltonian: encodeMatrix(randomHermitian(random, algebra)),
    jumps: lindbladJumps(random, algebra).map((matrix, m) => ({ rate: 0.2 + 0.3 * m, matrix: encodeMatrix(matrix) })),
  };
}

function lindbladJumps(random: Random, algebra: BlockAlgebra): ComplexMatrix[] {
  return algebra.blocks.flatMap((_, b) => {
    const next = (b + 1) % algebra.blocks.length;
    return [corner(random, algebra, b, b), ...(next === b ? [] : [corner(random, algebra, b, next)])];
  });
}

/** A random matrix with rows in block b and columns in block c. */
function corner(random: Random, { size, blockOf }: BlockAlgebra, b: number, c: number): ComplexMatrix {
  return fromEntries(size, size, (i, j) =>
    blockOf[i] === b && blockOf[j] === c ? [random.normal(), random.normal()] : [0, 0],
  );
}

/**
 * V_j from random pairs of levels of a reference state whose log-eigenvalues are multiples of one step, so that frequencies
 * and eigenvalues coincide, all in a random basis of every block; each with its adjoint.
 */
export function balancedForm(random: Random, algebra: BlockAlgebra): Form<'balanced'> {
  const { size: n, blockOf } = algebra;
  const step = 0.3 + random.uniform();
  const levels = Array.from({ length: n }, () => random.integer(3));
  const u = directSum(algebra.blocks.map((size) => qrComplex(randomMatrix(random, size)).q));
  const turned = (a: ComplexMatrix): ComplexMatrix => multiplyAdjointSecond(multiply(u, a), u);
  const weights = levels.map((level) => Math.exp(-step * level));
  const sum = weights.reduce((total, w) => total + w, 0);
  // A path through all levels makes the model primitive; two more pairs couple it further.
  const pairs = levels.slice(1).map((_, k) => [k, k + 1] as const);
  const more = [0, 1].map(() => [random.integer(n), random.integer(n)] as const).filter(([k, l]) => k !== l);
  const terms = [...pairs, ...more].flatMap(([k, l]) => {
    const distance = (levels[k] ?? 0) - (levels[l] ?? 0);
    const matrix = turned(
      fromEntries(n, n, (i, j) => {
        const sameCorner = blockOf[i] === blockOf[k] && blockOf[j] === blockOf[l];
        const resonant = (levels[i] ?? 0) - (levels[j] ?? 0) === distance;
        return sameCorner && resonant ? [random.normal() / 2, random.normal() / 2] : [0, 0];
      }),
    );
    const frequency = step * distance;
    return [
      { matrix: encodeMatrix(matrix), frequency },
      { matrix: encodeMatrix(adjoint(matrix)), frequency: -frequency },
    ];
  });
  return { form: 'balanced', state: encodeMatrix(hermitianPart(turned(diagonal(weights.map((w) => w / sum))))), terms };
}

/** Random rates between n points, in detailed balance with random weights or not. */
export function ratesForm(random: Random, n: number, reversible: boolean): Form<'rates'> {
  const weights = Array.from({ length: n }, () => 0.2 + random.uniform());
  const flow = fromEntries(n, n, () => [random.uniform(), 0]);
  const symmetric = hermitianPart(flow);
  const rate = (x: number, y: number): number =>
    reversible ? (symmetric.re[x * n + y] ?? 0) / (weights[x] ?? 1) : (flow.re[x * n + y] ?? 0);
  const points = Array.from({ length: n }, (_, x) => x);
  return { form: 'rates', rates: points.map((x) => points.map((y) => (x === y ? 0 : rate(x, y)))) };
}

/** A random H with couplings in every block and between neighbouring ones. */
export function daviesForm(
  random: Random,
  algebra: BlockAlgebra,
  spectrum: Form<'davies'>['spectrum'],
  hamiltonian = randomHermitian(random, algebra),
): Form<'davies'> {
  const couplings = lindbladJumps(random, algebra).map((s) => encodeMatrix(hermitianPart(s)));
  return { form: 'davies', hamiltonian: encodeMatrix(hamiltonian), couplings, beta: 0.8, spectrum };
}

/** The matrix of a random Lindblad generator on all N×N matrices: vec(XAY) = (X ⊗ Yᵀ) vec A by rows, (Yᵀ ⊗ X) vec A by columns. */
export function superoperatorForm(
  random: Random,
  n: number,
  picture: 'heisenberg' | 'schrodinger',
  stacking: 'rows' | 'columns',
): Form<'superoperator'> {
  const one = identity(n);
  const sandwich = (x: ComplexMatrix, y: ComplexMatrix): ComplexMatrix =>
    stacking === 'rows' ? kronecker(x, transpose(y)) : kronecker(transpose(y), x);
  const h = hermitianPart(randomMatrix(random, n));
  const sign = picture === 'heisenberg' ? 1 : -1;
  let sum = scale(subtract(sandwich(h, one), sandwich(one, h)), 0, sign);
  for (const r of [randomMatrix(random, n), randomMatrix(random, n)]) {
    const square = multiplyAdjointFirst(r, r);
    sum = add(sum, picture === 'heisenberg' ? sandwich(adjoint(r), r) : sandwich(r, adjoint(r)));
    sum = subtract(sum, scale(add(sandwich(square, one), sandwich(one, square)), 0.5));
  }
  return { form: 'superoperator', matrix: encodeMatrix(sum), picture, stacking };
}
