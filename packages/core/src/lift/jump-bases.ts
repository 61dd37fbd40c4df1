import { type ComplexMatrix, adjoint, innerProduct, scale, zeros } from '../linalg/complex-matrix.js';
import { sparseFromDense } from '../linalg/sparse-matrix.js';
import type { CanonicalForm, CanonicalJump } from '../structure/canonical-form.js';
import { JUMP_SYMMETRY_TOLERANCE } from '../tolerances.js';

/** The choice of jumps of a canonical form: those given, Pauli strings, or Weyl operators. */
export type JumpBasis = 'given' | 'pauli' | 'weyl';

/**
 * The canonical form with its jumps rewritten as multiples of Pauli strings or Weyl operators (one full block, all
 * frequencies zero); null when the generator is not diagonal in that basis. Mixing jumps of equal frequency by a unitary
 * leaves the generator and its metric alone, but more symmetries permute these.
 */
export function inJumpBasis(canonical: CanonicalForm, basis: JumpBasis): CanonicalForm | null {
  if (basis === 'given') return canonical;
  const { algebra, jumps } = canonical;
  const n = algebra.size;
  if (algebra.blocks.length > 1 || jumps.some(({ frequency }) => frequency !== 0)) return null;
  if (basis === 'pauli' && !Number.isInteger(Math.log2(n))) return null;
  if (basis === 'weyl' && (n === 2 || n > 16)) return null;
  const operators = basis === 'pauli' ? pauliOperators(Math.log2(n)) : weylOperators(n);
  const strengths = diagonalStrengths(jumps, operators);
  if (!strengths) return null;
  return { ...canonical, jumps: rewritten(operators, strengths) };
}

interface Operator {
  readonly label: string;
  readonly matrix: ComplexMatrix;
  /** Label of the adjoint, up to a phase. */
  readonly adjoint: string;
}

/** Strength of each operator, or null when the Gorini–Kossakowski–Sudarshan matrix is not diagonal in them. */
function diagonalStrengths(jumps: readonly CanonicalJump[], operators: readonly Operator[]): number[] | null {
  const n = operators[0].matrix.rows;
  const coefficients = jumps.map(({ matrix }) => operators.map((operator) => innerProduct(operator.matrix, matrix)));
  const strengths = operators.map(
    (_, p) => coefficients.reduce((sum, c) => sum + c[p].re ** 2 + c[p].im ** 2, 0) / n ** 2,
  );
  const top = Math.max(...strengths);
  for (let p = 0; p < operators.length; p++) {
    for (let q = 0; q < p; q++) {
      let re = 0;
      let im = 0;
      for (const c of coefficients) {
        re += c[p].re * c[q].re + c[p].im * c[q].im;
        im += c[p].im * c[q].re - c[p].re * c[q].im;
      }
      if (Math.hypot(re, im) / n ** 2 > JUMP_SYMMETRY_TOLERANCE * top) return null;
    }
  }
  return strengths.map((x) => (x > JUMP_SYMMETRY_TOLERANCE * top ? x : 0));
}

function rewritten(operators: readonly Operator[], strengths: readonly number[]): CanonicalJump[] {
  const kept = operators.filter((_, p) => strengths[p] > 0);
  const index = new Map(kept.map(({ label }, k) => [label, k]));
  const matrices: (ComplexMatrix | null)[] = kept.map(() => null);
  kept.forEach((operator, k) => {
    if (matrices[k]) return;
    const size = Math.sqrt(strengths[operators.indexOf(operator)]);
    const partner = index.get(operator.adjoint) as number;
    matrices[k] = scale(partner === k ? selfAdjoint(operator.matrix) : operator.matrix, size);
    if (partner !== k) matrices[partner] = adjoint(matrices[k] as ComplexMatrix);
  });
  return kept.map(({ label, adjoint: other }, k) => {
    const matrix = matrices[k] as ComplexMatrix;
    const norm = Math.sqrt(innerProduct(matrix, matrix).re);
    return { label, matrix, sparse: sparseFromDense(matrix), frequency: 0, partner: index.get(other) as number, norm };
  });
}

/** A phase times W that is self-adjoint, for W* a multiple of W. */
function selfAdjoint(w: ComplexMatrix): ComplexMatrix {
  const overlap = innerProduct(w, adjoint(w));
  const angle = Math.atan2(overlap.im, overlap.re) / 2;
  return scale(w, Math.cos(angle), Math.sin(angle));
}

/** X^aZ^b, all but 1: W_ab |k> = e^{2πi bk/n} |k+a>. */
function weylOperators(n: number): Operator[] {
  const out: Operator[] = [];
  for (let a = 0; a < n; a++) {
    for (let b = 0; b < n; b++) {
      if (a === 0 && b === 0) continue;
      const matrix = zeros(n);
      for (let k = 0; k < n; k++) {
        matrix.re[((k + a) % n) * n + k] = Math.cos((2 * Math.PI * b * k) / n);
        matrix.im[((k + a) % n) * n + k] = Math.sin((2 * Math.PI * b * k) / n);
      }
      out.push({ label: `X${a}Z${b}`, matrix, adjoint: `X${(n - a) % n}Z${(n - b) % n}` });
    }
  }
  return out;
}

function pauliOperators(qubits: number): Operator[] {
  const n = 2 ** qubits;
  const out: Operator[] = [];
  for (let code = 1; code < n * n; code++) {
    const letters = Array.from({ length: qubits }, (_, q) => (code >> (2 * (qubits - 1 - q))) & 3);
    const matrix = zeros(n);
    for (let k = 0; k < n; k++) {
      let to = k;
      let quarter = 0;
      letters.forEach((letter, q) => {
        const bit = 1 << (qubits - 1 - q);
        if (letter === 1 || letter === 2) to ^= bit;
        if (letter === 2) quarter += k & bit ? 3 : 1;
        if (letter === 3 && k & bit) quarter += 2;
      });
      matrix.re[to * n + k] = [1, 0, -1, 0][quarter % 4];
      matrix.im[to * n + k] = [0, 1, 0, -1][quarter % 4];
    }
    const label = letters.map((letter) => 'IXYZ'[letter]).join('');
    out.push({ label, matrix, adjoint: label });
  }
  return out;
}
