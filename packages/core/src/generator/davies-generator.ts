import { type BlockAlgebra, offBlockResidual } from '../algebra/block-algebra.js';
import { blockEigen } from '../algebra/block-eigen.js';
import { ThalwegError } from '../errors.js';
import {
  type ComplexMatrix,
  frobeniusNorm,
  fromEntries,
  multiply,
  multiplyAdjointFirst,
  multiplyAdjointSecond,
  scale,
} from '../linalg/complex-matrix.js';
import { sparseFromDense } from '../linalg/sparse-matrix.js';
import { ENERGY_TOLERANCE, EPSILON, INPUT_TOLERANCE } from '../tolerances.js';
import { adjointClosureResidual } from './adjoint-closure.js';
import { requireAlgebraPreserved } from './algebra-preservation.js';
import { type BathSpectrum, bathRate } from './bath-spectrum.js';
import { clusterMiddles } from './cluster-values.js';
import type { Generator, Jump } from './generator.js';
import { type MatrixInput, requireFiniteNumber, requireHermitian, squareDense } from './matrix-input.js';

export interface DaviesForm {
  readonly algebra: BlockAlgebra;
  /** H, N×N Hermitian and block-diagonal; energies in the units of 1/β. */
  readonly hamiltonian: MatrixInput;
  /** S_k, N×N, each Hermitian or the list closed under adjoints. */
  readonly couplings: readonly MatrixInput[];
  /** Inverse temperature. */
  readonly beta: number;
  readonly spectrum: BathSpectrum;
}

/**
 * Weak-coupling generator L(A) = Σ_k Σ_ω g(ω)(S_k(ω)*AS_k(ω) − ½{S_k(ω)*S_k(ω),A}), S(ω) = Σ_{E'−E=ω} P_E S P_E', so that S(ω)
 * lowers the energy by ω (Davies, Commun. Math. Phys. 39 (1974)). Only this dissipative part: neither i[H,·] nor a Lamb shift
 * is added. The Gibbs state e^{−βH}/Z is declared; g(−ω) = e^{−βω}g(ω) makes L GNS-symmetric for it.
 * Energies and frequencies closer than ENERGY_TOLERANCE times the width of the spectrum are one.
 * Throws `not-hermitian`, `not-symmetric`, `spectrum-not-balanced`, `negative-rate`, `algebra-not-preserved`, `usage`.
 */
export function daviesGenerator(form: DaviesForm): Generator {
  const { algebra, beta } = form;
  requireFiniteNumber(beta, '/generator/beta', 'the inverse temperature');
  const h = squareDense(form.hamiltonian, algebra.size, '/generator/hamiltonian');
  requireHermitian(h, '/generator/hamiltonian', 'the Hamiltonian');
  requireBlockDiagonal(algebra, h);
  const { values, vectors } = blockEigen(algebra, h);
  const tolerance = ENERGY_TOLERANCE * Math.max(1, Math.max(...values) - Math.min(...values));
  const energies = clusterMiddles(values, tolerance);
  const couplings = form.couplings.map((s, k) => squareDense(s, algebra.size, `/generator/couplings/${k}`));
  requireClosed(couplings);
  const rate = bathRate(form.spectrum, beta, tolerance);
  const jumps = couplings.flatMap((s, k) => {
    const rotated = multiplyAdjointFirst(vectors, multiply(s, vectors));
    return energyParts(rotated, energies, tolerance).map(({ frequency, part }): Jump => {
      const jump = multiplyAdjointSecond(multiply(vectors, part), vectors);
      return {
        label: `S${k + 1}(${rounded(frequency)})`,
        matrix: sparseFromDense(scale(jump, Math.sqrt(rate(frequency)))),
      };
    });
  });
  return requireAlgebraPreserved(
    {
      algebra,
      hamiltonian: null,
      jumps: jumps.filter((jump) => jump.matrix.re.length > 0),
      superoperator: null,
      declaredState: gibbsState(energies, vectors, beta),
      origin: { kind: 'davies' },
    },
    '/generator/couplings',
  );
}

/** The parts of S (in the energy basis) of each Bohr frequency ω = E'−E, ω ascending and closed under sign; negligible parts are left out. */
function energyParts(
  s: ComplexMatrix,
  energies: Float64Array,
  tolerance: number,
): { frequency: number; part: ComplexMatrix }[] {
  const n = energies.length;
  const differences = new Float64Array(n * n);
  for (let i = 0; i < n; i++) for (let j = 0; j < n; j++) differences[i * n + j] = energies[j] - energies[i];
  const frequencies = clusterMiddles(differences, tolerance);
  const negligible = n * EPSILON * frobeniusNorm(s);
  const parts: { frequency: number; part: ComplexMatrix }[] = [];
  for (const frequency of [...new Set(frequencies)].sort((a, b) => a - b)) {
    const part = fromEntries(n, n, (i, j) =>
      frequencies[i * n + j] === frequency ? [s.re[i * n + j], s.im[i * n + j]] : [0, 0],
    );
    if (frobeniusNorm(part) > negligible) parts.push({ frequency, part });
  }
  return parts;
}

function gibbsState(energies: Float64Array, vectors: ComplexMatrix, beta: number): ComplexMatrix {
  const lowest = energies.reduce((low, e) => Math.min(low, beta * e), Infinity);
  const weights = energies.map((e) => Math.exp(lowest - beta * e));
  const total = weights.reduce((sum, w) => sum + w, 0);
  const n = energies.length;
  const scaled = fromEntries(n, n, (i, k) => {
    const weight = weights[k] / total;
    return [vectors.re[i * n + k] * weight, vectors.im[i * n + k] * weight];
  });
  return multiplyAdjointSecond(scaled, vectors);
}

function requireBlockDiagonal(algebra: BlockAlgebra, h: ComplexMatrix): void {
  const off = offBlockResidual(algebra, h);
  if (off <= INPUT_TOLERANCE * frobeniusNorm(h)) return;
  throw new ThalwegError(
    'algebra-not-preserved',
    `expected a Hamiltonian inside the blocks [${algebra.blocks.join(', ')}], got an entry of modulus ${off.toPrecision(3)} outside them`,
    { pointer: '/generator/hamiltonian', details: { residual: off } },
  );
}

function requireClosed(couplings: readonly ComplexMatrix[]): void {
  const residual = adjointClosureResidual(couplings);
  if (residual <= INPUT_TOLERANCE) return;
  throw new ThalwegError(
    'not-symmetric',
    `expected couplings that are Hermitian or closed under adjoints, got a relative residual of ${residual.toPrecision(3)}; give S* with every S`,
    { pointer: '/generator/couplings', details: { residual } },
  );
}

function rounded(frequency: number): string {
  return String(Number(frequency.toPrecision(6)));
}
