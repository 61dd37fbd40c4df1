/**
 * Times the linear algebra kernels against ml-matrix; rows give the best of many runs, which on a busy machine is the
 * only stable figure, and how many times longer ml-matrix takes.
 *
 *     npm run bench -- linalg
 */
import { CholeskyDecomposition, EigenvalueDecomposition, Matrix, SingularValueDecomposition } from 'ml-matrix';
import { choleskyReal } from '../src/linalg/cholesky-real.js';
import { multiplyAdjointSecond, type ComplexMatrix } from '../src/linalg/complex-matrix.js';
import { eigenvaluesGeneral } from '../src/linalg/general-eigenvalues.js';
import { hermitianEigen } from '../src/linalg/hermitian-eigen.js';
import { multiplyReal } from '../src/linalg/real-matrix.js';
import { svdComplex } from '../src/linalg/svd-complex.js';
import { symmetricEigen, symmetricEigenInto, symmetricWork } from '../src/linalg/symmetric-eigen.js';
import {
  pencilWork,
  smallestPencilWork,
  symmetricPencilInto,
  symmetricPencilSmallestInto,
} from '../src/linalg/symmetric-pencil.js';
import { smallestWork, symmetricSmallestInto } from '../src/linalg/symmetric-smallest.js';
import { seededRandom } from '../src/random.js';

/** Time spent on one line, in nanoseconds. */
const BUDGET = 3e8;

console.log('|   n | what                   |         time | ml-matrix |');
console.log('| --- | ---------------------- | ------------ | --------- |');
for (const n of [8, 16, 24, 64, 256]) {
  const random = seededRandom(`bench ${n}`);
  const general = Float64Array.from({ length: n * n }, () => random.normal());
  const across = (k: number): number => (k % n) * n + Math.floor(k / n);
  const symmetric = general.map((x, k) => x + general[across(k)]);
  const real: ComplexMatrix = { rows: n, cols: n, re: general, im: new Float64Array(n * n) };
  const definite = multiplyAdjointSecond(real, real).re.map((x, k) => (k === across(k) ? x + n : x));
  const hermitian: ComplexMatrix = { ...real, re: symmetric, im: general.map((x, k) => x - general[across(k)]) };
  const [values, vector, vectors] = [new Float64Array(n), new Float64Array(n), new Float64Array(n * n)];
  const [eigen, smallest, pencil, pencilSmallest] = [
    symmetricWork(n),
    smallestWork(n),
    pencilWork(n),
    smallestPencilWork(n),
  ];

  const reference = best(() => new EigenvalueDecomposition(matrix(symmetric, n), { assumeSymmetric: true }));
  report(n, 'symmetric, ml-matrix', reference);
  report(
    n,
    'symmetric, all pairs',
    best(() => symmetricEigen(symmetric, n)),
    reference,
  );
  report(
    n,
    '  in given buffers',
    best(() => symmetricEigenInto(symmetric, n, values, vectors, eigen)),
    reference,
  );
  report(
    n,
    '  values only',
    best(() => symmetricEigenInto(symmetric, n, values, null, eigen)),
    reference,
  );
  report(
    n,
    '  smallest pair',
    best(() => symmetricSmallestInto(symmetric, n, vector, smallest)),
    reference,
  );
  report(
    n,
    'Hermitian, all pairs',
    best(() => hermitianEigen(hermitian)),
    reference,
  );
  report(
    n,
    'pencil, all pairs',
    best(() => symmetricPencilInto(symmetric, definite, n, values, vectors, pencil)),
  );
  report(
    n,
    '  smallest pair',
    best(() => symmetricPencilSmallestInto(symmetric, definite, n, vector, pencilSmallest)),
  );
  const [mlGeneral, mlDefinite] = [matrix(general, n), matrix(definite, n)];
  report(
    n,
    'product',
    best(() => multiplyReal(general, general, n, n, n)),
    best(() => mlGeneral.mmul(mlGeneral)),
  );
  report(
    n,
    'Cholesky',
    best(() => choleskyReal(definite, n)),
    best(() => new CholeskyDecomposition(mlDefinite)),
  );
  // The references below take many seconds at 256.
  if (n > 64) continue;
  report(
    n,
    'general',
    best(() => eigenvaluesGeneral(general, n)),
    best(() => new EigenvalueDecomposition(mlGeneral)),
  );
  report(
    n,
    'singular',
    best(() => svdComplex(real)),
    best(() => new SingularValueDecomposition(mlGeneral)),
  );
}

function matrix(a: Float64Array, n: number): Matrix {
  return new Matrix(Array.from({ length: n }, (_, i) => Array.from(a.subarray(i * n, (i + 1) * n))));
}

/** Shortest time of one call in microseconds. */
function best(run: () => unknown): number {
  let least = Infinity;
  const start = process.hrtime.bigint();
  for (let count = 0; count < 5 || process.hrtime.bigint() - start < BigInt(BUDGET); count++) {
    const before = process.hrtime.bigint();
    run();
    least = Math.min(least, Number(process.hrtime.bigint() - before));
  }
  return least / 1000;
}

function report(n: number, what: string, time: number, reference?: number): void {
  const ratio = reference === undefined ? '' : `${(reference / time).toFixed(1)} ×`;
  console.log(
    `| ${String(n).padStart(3)} | ${what.padEnd(22)} | ${time.toFixed(1).padStart(9)} µs | ${ratio.padEnd(9)} |`,
  );
}
