import type { BlockAlgebra } from '../algebra/block-algebra.js';
import { ThalwegError } from '../errors.js';
import { type ComplexMatrix, frobeniusNorm, multiply, scale, subtract } from '../linalg/complex-matrix.js';
import { hermitianEigenvalues } from '../linalg/hermitian-eigen.js';
import { sparseFromDense } from '../linalg/sparse-matrix.js';
import { FREQUENCY_TOLERANCE, INPUT_TOLERANCE } from '../tolerances.js';
import { adjointClosureResidual } from './adjoint-closure.js';
import { requireAlgebraPreserved } from './algebra-preservation.js';
import { densityMatrix } from './declared-state.js';
import type { Generator } from './generator.js';
import { type MatrixInput, requireFiniteNumber, squareDense } from './matrix-input.js';

export interface BalancedForm {
  readonly algebra: BlockAlgebra;
  /** σ, N×N, positive definite with trace one. */
  readonly state: MatrixInput;
  readonly terms: readonly {
    readonly label?: string;
    /** V_j, N×N, units 1/√time. */
    readonly matrix: MatrixInput;
    /** ω_j, dimensionless: σ V_j σ^{-1} = e^{−ω_j} V_j. */
    readonly frequency: number;
  }[];
}

interface Term {
  readonly label?: string;
  readonly v: ComplexMatrix;
  readonly frequency: number;
}

/**
 * The generator of the canonical form, L(A) = Σ_j e^{−ω_j/2}(2V_j*AV_j − {V_j*V_j,A}), with jumps R_j = √2 e^{−ω_j/4} V_j
 * (Alicki 1976; Carlen & Maas, J. Funct. Anal. 273 (2017), Theorem 3.1). σ becomes the declared state.
 * Throws `state-not-positive` when σ is not faithful, `spectrum-not-balanced` when some V_j has not the frequency given,
 * `not-symmetric` when the list is not closed under adjoints (up to unitary mixing inside one frequency).
 */
export function balancedGenerator(form: BalancedForm): Generator {
  const { algebra } = form;
  const sigma = faithfulState(algebra, form.state);
  const terms = form.terms.map((term, j): Term => {
    const at = `/generator/terms/${j}`;
    requireFiniteNumber(term.frequency, `${at}/frequency`, 'a frequency');
    const v = squareDense(term.matrix, algebra.size, `${at}/matrix`);
    requireModular(sigma, v, term.frequency, j);
    return { label: term.label, v, frequency: term.frequency };
  });
  requireClosed(terms);
  const jumps = terms.map(({ label, v, frequency }) => {
    const matrix = sparseFromDense(scale(v, Math.SQRT2 * Math.exp(-frequency / 4)));
    return label === undefined ? { matrix } : { label, matrix };
  });
  return requireAlgebraPreserved(
    { algebra, hamiltonian: null, jumps, superoperator: null, declaredState: sigma, origin: { kind: 'balanced' } },
    '/generator',
  );
}

function faithfulState(algebra: BlockAlgebra, state: MatrixInput): ComplexMatrix {
  const pointer = '/generator/state';
  const sigma = densityMatrix(algebra, state, pointer);
  const smallest = hermitianEigenvalues(sigma)[0];
  if (smallest > 0) return sigma;
  throw new ThalwegError(
    'state-not-positive',
    `expected a positive definite reference state, got the smallest eigenvalue ${smallest}; drop the levels that carry no weight`,
    { pointer, details: { smallestEigenvalue: smallest } },
  );
}

/** σV = e^{−ω}Vσ, so that no inverse of σ is needed. */
function requireModular(sigma: ComplexMatrix, v: ComplexMatrix, frequency: number, j: number): void {
  const left = multiply(sigma, v);
  const right = scale(multiply(v, sigma), Math.exp(-frequency));
  const size = frobeniusNorm(left) + frobeniusNorm(right);
  const residual = frobeniusNorm(subtract(left, right));
  if (residual <= INPUT_TOLERANCE * size) return;
  throw new ThalwegError(
    'spectrum-not-balanced',
    `expected σVσ⁻¹ = e^{−ω}V with ω = ${frequency} for term ${j}, got a relative residual of ${(residual / size).toPrecision(3)}; ` +
      'the frequency of e_kl is log(σ_l/σ_k)',
    { pointer: `/generator/terms/${j}/frequency`, details: { residual: residual / size } },
  );
}

function requireClosed(terms: readonly Term[]): void {
  const residual = adjointClosureResidual(terms.map((term) => term.v));
  if (residual <= INPUT_TOLERANCE) return;
  const lonely = terms.findIndex((term) => !terms.some((other) => opposite(term.frequency, other.frequency)));
  throw new ThalwegError(
    'not-symmetric',
    `expected the terms to be closed under adjoints, got a relative residual of ${residual.toPrecision(3)}` +
      (lonely >= 0 ? `; term ${lonely} has no partner of frequency ${-terms[lonely].frequency}` : '') +
      '; for every V of frequency ω give V* with −ω',
    { pointer: '/generator/terms', details: { residual } },
  );
}

function opposite(a: number, b: number): boolean {
  return Math.abs(a + b) <= FREQUENCY_TOLERANCE * (1 + Math.abs(a));
}
