import { fromCoordinates, toCoordinates } from '../algebra/block-algebra.js';
import { ThalwegError } from '../errors.js';
import { type ComplexMatrix, zeros } from '../linalg/complex-matrix.js';
import { type SparseMatrix, sparseAdd } from '../linalg/sparse-matrix.js';
import type { Generator } from './generator.js';
import { requireDenseDimension } from './superoperator-parts.js';
import { type TensorAlgebra, embedSparse, tensorAlgebra, tensorElement } from './tensor-algebra.js';

/**
 * Σ_f id ⊗ L_f ⊗ id on the tensor product of any number of algebras. Blocks (b_1,…,b_F) follow in lexicographic order. The
 * product of the declared states is declared when every factor declares one.
 * Throws `usage` for an empty list and `too-large` when the matrices would be.
 */
export function tensorGenerator(factors: readonly Generator[]): Generator {
  if (factors.length === 0) {
    throw new ThalwegError('usage', 'expected at least one factor of a tensor product, got none', {
      pointer: '/generator/factors',
    });
  }
  const tensor = tensorAlgebra(factors.map((g) => g.algebra));
  const jumps = factors.flatMap((g, f) =>
    g.jumps.map(({ label, matrix }) => {
      const embedded = embedSparse(tensor, f, matrix);
      return label === undefined ? { matrix: embedded } : { label: `${label}(${f + 1})`, matrix: embedded };
    }),
  );
  const states = factors.flatMap((g) => (g.declaredState ? [g.declaredState] : []));
  return {
    algebra: tensor.algebra,
    hamiltonian: totalHamiltonian(tensor, factors),
    jumps,
    superoperator: totalSuperoperator(tensor, factors),
    declaredState: states.length === factors.length ? tensorElement(tensor, states) : null,
    origin: { kind: 'tensor', factors },
  };
}

function totalHamiltonian(tensor: TensorAlgebra, factors: readonly Generator[]): SparseMatrix | null {
  let total: SparseMatrix | null = null;
  for (const [f, { hamiltonian }] of factors.entries()) {
    if (!hamiltonian) continue;
    const part = embedSparse(tensor, f, hamiltonian);
    total = total ? sparseAdd(total, part) : part;
  }
  return total;
}

function totalSuperoperator(tensor: TensorAlgebra, factors: readonly Generator[]): Float64Array | null {
  if (factors.every((g) => !g.superoperator)) return null;
  requireDenseDimension(tensor.algebra, 'a tensor product with a factor given as a superoperator');
  const d = tensor.algebra.dimension;
  const out = new Float64Array(d * d);
  factors.forEach((g, f) => {
    if (g.superoperator) addFactor(out, tensor, f, unitImages(g));
  });
  return out;
}

/** S(e_ij) of a factor for each of its matrix units, at i·n+j; null outside the blocks. */
function unitImages(g: Generator): (ComplexMatrix | null)[] {
  const { algebra } = g;
  const { size: n, dimension: d, row, col, blockOf } = algebra;
  const s = g.superoperator as Float64Array;
  const column = (k: number): ComplexMatrix =>
    fromCoordinates(
      algebra,
      Float64Array.from({ length: d }, (_, at) => s[at * d + k]),
    );
  const place = new Map(Array.from(row, (i, k) => [i * n + col[k], k]));
  return Array.from({ length: n * n }, (_, at) => {
    const i = Math.floor(at / n);
    const j = at % n;
    if (blockOf[i] !== blockOf[j]) return null;
    if (i === j) return column(place.get(at) as number);
    // e_ij = (B − iB')/√2 and e_ji = (B + iB')/√2 with B, B' the real and imaginary basis elements of the pair i<j.
    const upper = Math.min(i, j) * n + Math.max(i, j);
    const lower = Math.max(i, j) * n + Math.min(i, j);
    const real = column(place.get(upper) as number);
    const imaginary = column(place.get(lower) as number);
    const sign = i < j ? -1 : 1;
    const image = zeros(n);
    for (let k = 0; k < n * n; k++) {
      image.re[k] = (real.re[k] - sign * imaginary.im[k]) * Math.SQRT1_2;
      image.im[k] = (real.im[k] + sign * imaginary.re[k]) * Math.SQRT1_2;
    }
    return image;
  });
}

/** out += id ⊗ S_f ⊗ id in the Hermitian basis of the product, column by column. */
function addFactor(
  out: Float64Array,
  tensor: TensorAlgebra,
  f: number,
  images: readonly (ComplexMatrix | null)[],
): void {
  const { algebra, factors, position } = tensor;
  const { dimension: d, size: n, row, col } = algebra;
  const m = factors[f].size;
  const after = factors.slice(f + 1).reduce((product, x) => product * x.size, 1);
  const plain = new Int32Array(n);
  position.forEach((at, kappa) => (plain[at] = kappa));
  const image = zeros(n);
  const coordinates = new Float64Array(d);
  for (let l = 0; l < d; l++) {
    const real = row[l] <= col[l];
    const i = plain[Math.min(row[l], col[l])];
    const j = plain[Math.max(row[l], col[l])];
    const fi = Math.floor(i / after) % m;
    const fj = Math.floor(j / after) % m;
    const local = images[fi * m + fj];
    if (!local) continue;
    image.re.fill(0);
    image.im.fill(0);
    // The Hermitian basis element is the Hermitian part of √2 e_IJ or i√2 e_IJ (of e_II on the diagonal), and S commutes with *.
    const factor = row[l] === col[l] ? 1 : Math.SQRT2;
    for (let p = 0; p < m; p++) {
      for (let q = 0; q < m; q++) {
        const to = position[i + (p - fi) * after] * n + position[j + (q - fj) * after];
        const re = factor * local.re[p * m + q];
        const im = factor * local.im[p * m + q];
        image.re[to] = real ? re : -im;
        image.im[to] = real ? im : re;
      }
    }
    toCoordinates(algebra, image, coordinates);
    for (let k = 0; k < d; k++) out[k * d + l] += coordinates[k];
  }
}
